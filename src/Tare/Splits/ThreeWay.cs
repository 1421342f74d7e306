namespace Tare;

/// <summary>Cuts rows in three: training rows fit, validation rows choose, test rows judge once.</summary>
/// <remarks>
/// Cut the held-out rows the way the test rows were cut: from the end where rows are in order, by group where rows belong together,
/// stratified, and at random only where the test rows were drawn at random. The parts hold the caller's own row objects.
/// </remarks>
public static partial class ThreeWay
{
    /// <summary>Cuts rows in three at random.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<T[]> Random<T>(T[] rows, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.Random(rows, testShare, seed);
        (var training, var validation) = HoldOut.Random(rest, inner, Second(seed));
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three at random.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<List<T>> Random<T>(List<T> rows, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.Random(rows, testShare, seed);
        (var training, var validation) = HoldOut.Random(rest, inner, Second(seed));
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three at random.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<T[]> Random<T>(IReadOnlyList<T> rows, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.Random(rows, testShare, seed);
        (var training, var validation) = HoldOut.Random(rest, inner, Second(seed));
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three from the end, for rows in time order or any order that must not be mixed. The test rows are the last, the validation rows come before them.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<T[]> Tail<T>(T[] rows, double validationShare = 0.2, double testShare = 0.2)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.Tail(rows, testShare);
        (var training, var validation) = HoldOut.Tail(rest, inner);
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three from the end, for rows in time order or any order that must not be mixed. The test rows are the last, the validation rows come before them.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<List<T>> Tail<T>(List<T> rows, double validationShare = 0.2, double testShare = 0.2)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.Tail(rows, testShare);
        (var training, var validation) = HoldOut.Tail(rest, inner);
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three from the end, for rows in time order or any order that must not be mixed. The test rows are the last, the validation rows come before them.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<T[]> Tail<T>(IReadOnlyList<T> rows, double validationShare = 0.2, double testShare = 0.2)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.Tail(rows, testShare);
        (var training, var validation) = HoldOut.Tail(rest, inner);
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three at random within each label, so that both parts hold the labels in the same proportions.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="label">Reads a row's label.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows a label, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<T[]> Stratified<T, TLabel>(T[] rows, Func<T, TLabel> label, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.Stratified(rows, label, testShare, seed);
        (var training, var validation) = HoldOut.Stratified(rest, label, inner, Second(seed));
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three at random within each label, so that both parts hold the labels in the same proportions.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="label">Reads a row's label.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows a label, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<List<T>> Stratified<T, TLabel>(List<T> rows, Func<T, TLabel> label, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.Stratified(rows, label, testShare, seed);
        (var training, var validation) = HoldOut.Stratified(rest, label, inner, Second(seed));
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three at random within each label, so that both parts hold the labels in the same proportions.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="label">Reads a row's label.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows a label, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<T[]> Stratified<T, TLabel>(IReadOnlyList<T> rows, Func<T, TLabel> label, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.Stratified(rows, label, testShare, seed);
        (var training, var validation) = HoldOut.Stratified(rest, label, inner, Second(seed));
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="group">Reads a row's group key.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows or groups, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<T[]> ByGroup<T, TKey>(T[] rows, Func<T, TKey> group, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.ByGroup(rows, group, testShare, seed);
        (var training, var validation) = HoldOut.ByGroup(rest, group, inner, Second(seed));
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="group">Reads a row's group key.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows or groups, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<List<T>> ByGroup<T, TKey>(List<T> rows, Func<T, TKey> group, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.ByGroup(rows, group, testShare, seed);
        (var training, var validation) = HoldOut.ByGroup(rest, group, inner, Second(seed));
        return new(training, validation, test);
    }

    /// <summary>Cuts rows in three by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow.</summary>
    /// <param name="rows">Rows, at least 3; not changed, and in the same order inside each part.</param>
    /// <param name="group">Reads a row's group key.</param>
    /// <param name="validationShare">Part of all rows that chooses, strictly between 0 and 1.</param>
    /// <param name="testShare">Part of all rows that judges, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The three parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows or groups, a share outside (0,1), or shares that leave nothing to train on.</exception>
    public static Parts<T[]> ByGroup<T, TKey>(IReadOnlyList<T> rows, Func<T, TKey> group, double validationShare = 0.2, double testShare = 0.2, int seed = 1)
    {
        double inner = InnerShare(validationShare, testShare);
        (var rest, var test) = HoldOut.ByGroup(rows, group, testShare, seed);
        (var training, var validation) = HoldOut.ByGroup(rest, group, inner, Second(seed));
        return new(training, validation, test);
    }

    // Validation rows are cut out of what the test rows leave.
    private static double InnerShare(double validationShare, double testShare)
    {
        Check.Level(validationShare, nameof(validationShare));
        Check.Level(testShare, nameof(testShare));
        if (!(validationShare + testShare < 1))
            throw Check.OutOfRange(nameof(validationShare), validationShare, $"together with testShare = {Check.Text(testShare)} leaves nothing to train on");
        return validationShare / (1 - testShare);
    }

    // The inner cut draws from a stream of its own.
    private static int Second(int seed) => unchecked(seed * 31 + 17);
}
