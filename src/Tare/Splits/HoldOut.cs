namespace Tare;

/// <summary>Holds validation rows out of training rows, so that candidates are chosen without the test rows.</summary>
/// <remarks>
/// Cut the held-out rows the way the test rows were cut: from the end where rows are in order, by group where rows belong together,
/// stratified, and at random only where the test rows were drawn at random. The parts hold the caller's own row objects.
/// </remarks>
public static partial class HoldOut
{
    /// <summary>Holds validation rows out of training rows at random.</summary>
    /// <param name="rows">Rows, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, or a share outside (0,1).</exception>
    public static HeldOut<T[]> Random<T>(T[] rows, double share = 0.25, int seed = 1)
    {
        bool[] held = Cut.Random(Check.NotNull(rows, nameof(rows)).Length, share, seed, nameof(rows));
        return new(Cut.Pick(rows, held, false), Cut.Pick(rows, held, true));
    }

    /// <summary>Holds validation rows out of training rows at random.</summary>
    /// <param name="rows">Rows, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, or a share outside (0,1).</exception>
    public static HeldOut<List<T>> Random<T>(List<T> rows, double share = 0.25, int seed = 1)
    {
        bool[] held = Cut.Random(Check.NotNull(rows, nameof(rows)).Count, share, seed, nameof(rows));
        return new([.. Cut.Pick(rows, held, false)], [.. Cut.Pick(rows, held, true)]);
    }

    /// <summary>Holds validation rows out of training rows at random.</summary>
    /// <param name="rows">Rows, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, or a share outside (0,1).</exception>
    public static HeldOut<T[]> Random<T>(IReadOnlyList<T> rows, double share = 0.25, int seed = 1)
    {
        bool[] held = Cut.Random(Check.NotNull(rows, nameof(rows)).Count, share, seed, nameof(rows));
        return new(Cut.Pick(rows, held, false), Cut.Pick(rows, held, true));
    }

    /// <summary>Holds validation rows out of training rows from the end, for rows in time order or any order that must not be mixed.</summary>
    /// <param name="rows">Rows in order, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, or a share outside (0,1).</exception>
    public static HeldOut<T[]> Tail<T>(T[] rows, double share = 0.25)
    {
        bool[] held = Cut.Tail(Check.NotNull(rows, nameof(rows)).Length, share, nameof(rows));
        return new(Cut.Pick(rows, held, false), Cut.Pick(rows, held, true));
    }

    /// <summary>Holds validation rows out of training rows from the end, for rows in time order or any order that must not be mixed.</summary>
    /// <param name="rows">Rows in order, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, or a share outside (0,1).</exception>
    public static HeldOut<List<T>> Tail<T>(List<T> rows, double share = 0.25)
    {
        bool[] held = Cut.Tail(Check.NotNull(rows, nameof(rows)).Count, share, nameof(rows));
        return new([.. Cut.Pick(rows, held, false)], [.. Cut.Pick(rows, held, true)]);
    }

    /// <summary>Holds validation rows out of training rows from the end, for rows in time order or any order that must not be mixed.</summary>
    /// <param name="rows">Rows in order, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows, or a share outside (0,1).</exception>
    public static HeldOut<T[]> Tail<T>(IReadOnlyList<T> rows, double share = 0.25)
    {
        bool[] held = Cut.Tail(Check.NotNull(rows, nameof(rows)).Count, share, nameof(rows));
        return new(Cut.Pick(rows, held, false), Cut.Pick(rows, held, true));
    }

    /// <summary>Holds validation rows out of training rows at random within each label, so that both parts hold the labels in the same proportions.</summary>
    /// <param name="rows">Rows, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="label">Reads a row's label.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows a label, or a share outside (0,1).</exception>
    public static HeldOut<T[]> Stratified<T, TLabel>(T[] rows, Func<T, TLabel> label, double share = 0.25, int seed = 1)
    {
        bool[] held = Cut.Stratified(Cut.Keys(Check.NotNull(rows, nameof(rows)), label, nameof(label)), share, seed, nameof(rows));
        return new(Cut.Pick(rows, held, false), Cut.Pick(rows, held, true));
    }

    /// <summary>Holds validation rows out of training rows at random within each label, so that both parts hold the labels in the same proportions.</summary>
    /// <param name="rows">Rows, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="label">Reads a row's label.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows a label, or a share outside (0,1).</exception>
    public static HeldOut<List<T>> Stratified<T, TLabel>(List<T> rows, Func<T, TLabel> label, double share = 0.25, int seed = 1)
    {
        bool[] held = Cut.Stratified(Cut.Keys(Check.NotNull(rows, nameof(rows)), label, nameof(label)), share, seed, nameof(rows));
        return new([.. Cut.Pick(rows, held, false)], [.. Cut.Pick(rows, held, true)]);
    }

    /// <summary>Holds validation rows out of training rows at random within each label, so that both parts hold the labels in the same proportions.</summary>
    /// <param name="rows">Rows, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="label">Reads a row's label.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows a label, or a share outside (0,1).</exception>
    public static HeldOut<T[]> Stratified<T, TLabel>(IReadOnlyList<T> rows, Func<T, TLabel> label, double share = 0.25, int seed = 1)
    {
        bool[] held = Cut.Stratified(Cut.Keys(Check.NotNull(rows, nameof(rows)), label, nameof(label)), share, seed, nameof(rows));
        return new(Cut.Pick(rows, held, false), Cut.Pick(rows, held, true));
    }

    /// <summary>Holds validation rows out of training rows by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow.</summary>
    /// <param name="rows">Rows, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="group">Reads a row's group key.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows or groups, or a share outside (0,1).</exception>
    public static HeldOut<T[]> ByGroup<T, TKey>(T[] rows, Func<T, TKey> group, double share = 0.25, int seed = 1)
    {
        bool[] held = Cut.ByGroup(Cut.Keys(Check.NotNull(rows, nameof(rows)), group, nameof(group)), share, seed, nameof(rows));
        return new(Cut.Pick(rows, held, false), Cut.Pick(rows, held, true));
    }

    /// <summary>Holds validation rows out of training rows by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow.</summary>
    /// <param name="rows">Rows, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="group">Reads a row's group key.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows or groups, or a share outside (0,1).</exception>
    public static HeldOut<List<T>> ByGroup<T, TKey>(List<T> rows, Func<T, TKey> group, double share = 0.25, int seed = 1)
    {
        bool[] held = Cut.ByGroup(Cut.Keys(Check.NotNull(rows, nameof(rows)), group, nameof(group)), share, seed, nameof(rows));
        return new([.. Cut.Pick(rows, held, false)], [.. Cut.Pick(rows, held, true)]);
    }

    /// <summary>Holds validation rows out of training rows by whole groups drawn at random, so that no group is on both sides; the shares are met as nearly as the groups allow.</summary>
    /// <param name="rows">Rows, at least 2; not changed, and in the same order inside each part.</param>
    /// <param name="group">Reads a row's group key.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split on every target framework.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    /// <exception cref="ArgumentException">Too few rows or groups, or a share outside (0,1).</exception>
    public static HeldOut<T[]> ByGroup<T, TKey>(IReadOnlyList<T> rows, Func<T, TKey> group, double share = 0.25, int seed = 1)
    {
        bool[] held = Cut.ByGroup(Cut.Keys(Check.NotNull(rows, nameof(rows)), group, nameof(group)), share, seed, nameof(rows));
        return new(Cut.Pick(rows, held, false), Cut.Pick(rows, held, true));
    }
}
