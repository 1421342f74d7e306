namespace Tare;

/// <content>The same over parallel features and labels.</content>
public static partial class ThreeWay
{
    /// <summary>Cuts rows in three at random; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<TRow[], TLabel[]> Random<TRow, TLabel>(TRow[] x, TLabel[] y, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.Random(x, y, testShare, seed);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.Random(restX, restY, inner, Second(seed));
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three at random; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<List<TRow>, List<TLabel>> Random<TRow, TLabel>(List<TRow> x, List<TLabel> y, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.Random(x, y, testShare, seed);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.Random(restX, restY, inner, Second(seed));
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three at random; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<TRow[], TLabel[]> Random<TRow, TLabel>(IReadOnlyList<TRow> x, IReadOnlyList<TLabel> y, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.Random(x, y, testShare, seed);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.Random(restX, restY, inner, Second(seed));
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three from the end, for rows in time order or any order that must not be mixed; features and labels stay together. The test rows are the last, the validation rows come before them.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<TRow[], TLabel[]> Tail<TRow, TLabel>(TRow[] x, TLabel[] y, double validationShare = 0.2, double testShare = 0.2)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.Tail(x, y, testShare);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.Tail(restX, restY, inner);
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three from the end, for rows in time order or any order that must not be mixed; features and labels stay together. The test rows are the last, the validation rows come before them.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<List<TRow>, List<TLabel>> Tail<TRow, TLabel>(List<TRow> x, List<TLabel> y, double validationShare = 0.2, double testShare = 0.2)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.Tail(x, y, testShare);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.Tail(restX, restY, inner);
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three from the end, for rows in time order or any order that must not be mixed; features and labels stay together. The test rows are the last, the validation rows come before them.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<TRow[], TLabel[]> Tail<TRow, TLabel>(IReadOnlyList<TRow> x, IReadOnlyList<TLabel> y, double validationShare = 0.2, double testShare = 0.2)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.Tail(x, y, testShare);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.Tail(restX, restY, inner);
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three at random within each label, so that both parts hold the labels in the same proportions; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows a label, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<TRow[], TLabel[]> Stratified<TRow, TLabel>(TRow[] x, TLabel[] y, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.Stratified(x, y, testShare, seed);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.Stratified(restX, restY, inner, Second(seed));
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three at random within each label, so that both parts hold the labels in the same proportions; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows a label, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<List<TRow>, List<TLabel>> Stratified<TRow, TLabel>(List<TRow> x, List<TLabel> y, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.Stratified(x, y, testShare, seed);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.Stratified(restX, restY, inner, Second(seed));
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three at random within each label, so that both parts hold the labels in the same proportions; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows a label, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<TRow[], TLabel[]> Stratified<TRow, TLabel>(IReadOnlyList<TRow> x, IReadOnlyList<TLabel> y, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.Stratified(x, y, testShare, seed);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.Stratified(restX, restY, inner, Second(seed));
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="groups">Group key of each row, parallel.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows or groups, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<TRow[], TLabel[]> ByGroup<TRow, TLabel, TKey>(TRow[] x, TLabel[] y, IReadOnlyList<TKey> groups, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.ByGroup(x, y, groups, testShare, seed);
        TKey[] groupsLeft = Cut.Pick(groups, Cut.ByGroup(groups, testShare, seed, nameof(groups)), false);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.ByGroup(restX, restY, groupsLeft, inner, Second(seed));
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="groups">Group key of each row, parallel.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows or groups, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<List<TRow>, List<TLabel>> ByGroup<TRow, TLabel, TKey>(List<TRow> x, List<TLabel> y, IReadOnlyList<TKey> groups, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.ByGroup(x, y, groups, testShare, seed);
        TKey[] groupsLeft = Cut.Pick(groups, Cut.ByGroup(groups, testShare, seed, nameof(groups)), false);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.ByGroup(restX, restY, groupsLeft, inner, Second(seed));
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }

    /// <summary>Cuts rows in three by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="groups">Group key of each row, parallel.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows or groups, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<TRow[], TLabel[]> ByGroup<TRow, TLabel, TKey>(IReadOnlyList<TRow> x, IReadOnlyList<TLabel> y, IReadOnlyList<TKey> groups, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var restX, var restY, var testX, var testY) = HoldOut.ByGroup(x, y, groups, testShare, seed);
        TKey[] groupsLeft = Cut.Pick(groups, Cut.ByGroup(groups, testShare, seed, nameof(groups)), false);
        (var trainingX, var trainingY, var validationX, var validationY) = HoldOut.ByGroup(restX, restY, groupsLeft, inner, Second(seed));
        return new(trainingX, trainingY, validationX, validationY, testX, testY);
    }
}
