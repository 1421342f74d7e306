namespace Tare;

/// <content>The same over parallel features and labels.</content>
public static partial class ChooseAndJudge
{
    /// <summary>Cuts judging rows into a part that chooses and a part that judges at random; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, or a share outside (0,1).</exception>
    public static ChooseJudge<TRow[], TLabel[]> Random<TRow, TLabel>(TRow[] x, TLabel[] y, double share = 0.5, int seed = 1)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Length, nameof(x), Check.NotNull(y, nameof(y)).Length, nameof(y));
        bool[] held = Cut.Random(x.Length, share, seed, nameof(x));
        return new(Cut.Pick(x, held, false), Cut.Pick(y, held, false), Cut.Pick(x, held, true), Cut.Pick(y, held, true));
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges at random; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, or a share outside (0,1).</exception>
    public static ChooseJudge<List<TRow>, List<TLabel>> Random<TRow, TLabel>(List<TRow> x, List<TLabel> y, double share = 0.5, int seed = 1)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Count, nameof(x), Check.NotNull(y, nameof(y)).Count, nameof(y));
        bool[] held = Cut.Random(x.Count, share, seed, nameof(x));
        return new([.. Cut.Pick(x, held, false)], [.. Cut.Pick(y, held, false)], [.. Cut.Pick(x, held, true)], [.. Cut.Pick(y, held, true)]);
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges at random; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, or a share outside (0,1).</exception>
    public static ChooseJudge<TRow[], TLabel[]> Random<TRow, TLabel>(IReadOnlyList<TRow> x, IReadOnlyList<TLabel> y, double share = 0.5, int seed = 1)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Count, nameof(x), Check.NotNull(y, nameof(y)).Count, nameof(y));
        bool[] held = Cut.Random(x.Count, share, seed, nameof(x));
        return new(Cut.Pick(x, held, false), Cut.Pick(y, held, false), Cut.Pick(x, held, true), Cut.Pick(y, held, true));
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges from the end, for rows in time order or any order that must not be mixed; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, or a share outside (0,1).</exception>
    public static ChooseJudge<TRow[], TLabel[]> Tail<TRow, TLabel>(TRow[] x, TLabel[] y, double share = 0.5)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Length, nameof(x), Check.NotNull(y, nameof(y)).Length, nameof(y));
        bool[] held = Cut.Tail(x.Length, share, nameof(x));
        return new(Cut.Pick(x, held, false), Cut.Pick(y, held, false), Cut.Pick(x, held, true), Cut.Pick(y, held, true));
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges from the end, for rows in time order or any order that must not be mixed; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, or a share outside (0,1).</exception>
    public static ChooseJudge<List<TRow>, List<TLabel>> Tail<TRow, TLabel>(List<TRow> x, List<TLabel> y, double share = 0.5)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Count, nameof(x), Check.NotNull(y, nameof(y)).Count, nameof(y));
        bool[] held = Cut.Tail(x.Count, share, nameof(x));
        return new([.. Cut.Pick(x, held, false)], [.. Cut.Pick(y, held, false)], [.. Cut.Pick(x, held, true)], [.. Cut.Pick(y, held, true)]);
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges from the end, for rows in time order or any order that must not be mixed; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows, or a share outside (0,1).</exception>
    public static ChooseJudge<TRow[], TLabel[]> Tail<TRow, TLabel>(IReadOnlyList<TRow> x, IReadOnlyList<TLabel> y, double share = 0.5)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Count, nameof(x), Check.NotNull(y, nameof(y)).Count, nameof(y));
        bool[] held = Cut.Tail(x.Count, share, nameof(x));
        return new(Cut.Pick(x, held, false), Cut.Pick(y, held, false), Cut.Pick(x, held, true), Cut.Pick(y, held, true));
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges at random within each label, so that both parts hold the labels in the same proportions; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows a label, or a share outside (0,1).</exception>
    public static ChooseJudge<TRow[], TLabel[]> Stratified<TRow, TLabel>(TRow[] x, TLabel[] y, double share = 0.5, int seed = 1)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Length, nameof(x), Check.NotNull(y, nameof(y)).Length, nameof(y));
        bool[] held = Cut.Stratified(y, share, seed, nameof(y));
        return new(Cut.Pick(x, held, false), Cut.Pick(y, held, false), Cut.Pick(x, held, true), Cut.Pick(y, held, true));
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges at random within each label, so that both parts hold the labels in the same proportions; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows a label, or a share outside (0,1).</exception>
    public static ChooseJudge<List<TRow>, List<TLabel>> Stratified<TRow, TLabel>(List<TRow> x, List<TLabel> y, double share = 0.5, int seed = 1)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Count, nameof(x), Check.NotNull(y, nameof(y)).Count, nameof(y));
        bool[] held = Cut.Stratified(y, share, seed, nameof(y));
        return new([.. Cut.Pick(x, held, false)], [.. Cut.Pick(y, held, false)], [.. Cut.Pick(x, held, true)], [.. Cut.Pick(y, held, true)]);
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges at random within each label, so that both parts hold the labels in the same proportions; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows a label, or a share outside (0,1).</exception>
    public static ChooseJudge<TRow[], TLabel[]> Stratified<TRow, TLabel>(IReadOnlyList<TRow> x, IReadOnlyList<TLabel> y, double share = 0.5, int seed = 1)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Count, nameof(x), Check.NotNull(y, nameof(y)).Count, nameof(y));
        bool[] held = Cut.Stratified(y, share, seed, nameof(y));
        return new(Cut.Pick(x, held, false), Cut.Pick(y, held, false), Cut.Pick(x, held, true), Cut.Pick(y, held, true));
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="groups">Group key of each row, parallel.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows or groups, or a share outside (0,1).</exception>
    public static ChooseJudge<TRow[], TLabel[]> ByGroup<TRow, TLabel, TKey>(TRow[] x, TLabel[] y, IReadOnlyList<TKey> groups, double share = 0.5, int seed = 1)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Length, nameof(x), Check.NotNull(y, nameof(y)).Length, nameof(y));
        Cut.Parallel(x.Length, nameof(x), Check.NotNull(groups, nameof(groups)).Count, nameof(groups));
        bool[] held = Cut.ByGroup(groups, share, seed, nameof(groups));
        return new(Cut.Pick(x, held, false), Cut.Pick(y, held, false), Cut.Pick(x, held, true), Cut.Pick(y, held, true));
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="groups">Group key of each row, parallel.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows or groups, or a share outside (0,1).</exception>
    public static ChooseJudge<List<TRow>, List<TLabel>> ByGroup<TRow, TLabel, TKey>(List<TRow> x, List<TLabel> y, IReadOnlyList<TKey> groups, double share = 0.5, int seed = 1)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Count, nameof(x), Check.NotNull(y, nameof(y)).Count, nameof(y));
        Cut.Parallel(x.Count, nameof(x), Check.NotNull(groups, nameof(groups)).Count, nameof(groups));
        bool[] held = Cut.ByGroup(groups, share, seed, nameof(groups));
        return new([.. Cut.Pick(x, held, false)], [.. Cut.Pick(y, held, false)], [.. Cut.Pick(x, held, true)], [.. Cut.Pick(y, held, true)]);
    }

    /// <summary>Cuts judging rows into a part that chooses and a part that judges by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow; features and labels stay together.</summary>
    /// <param name="x">Features, one entry a row, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="y">Labels, parallel to <paramref name="x"/>.</param>
    /// <param name="groups">Group key of each row, parallel.</param>
    /// <param name="share">Part that judges, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The parts; they deconstruct as <c>var (valX, valY, testX, testY)</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Unequal lengths, too few rows or groups, or a share outside (0,1).</exception>
    public static ChooseJudge<TRow[], TLabel[]> ByGroup<TRow, TLabel, TKey>(IReadOnlyList<TRow> x, IReadOnlyList<TLabel> y, IReadOnlyList<TKey> groups, double share = 0.5, int seed = 1)
    {
        Cut.Parallel(Check.NotNull(x, nameof(x)).Count, nameof(x), Check.NotNull(y, nameof(y)).Count, nameof(y));
        Cut.Parallel(x.Count, nameof(x), Check.NotNull(groups, nameof(groups)).Count, nameof(groups));
        bool[] held = Cut.ByGroup(groups, share, seed, nameof(groups));
        return new(Cut.Pick(x, held, false), Cut.Pick(y, held, false), Cut.Pick(x, held, true), Cut.Pick(y, held, true));
    }
}
