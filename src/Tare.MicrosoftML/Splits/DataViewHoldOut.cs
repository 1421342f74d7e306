using Microsoft.ML;

namespace Tare;

/// <summary>Holds validation rows out of training rows in a data view, exactly and deterministically.</summary>
/// <remarks>
/// <para>The parts are lazy views on <c>data</c> in its own order, decided by row position. <c>data</c> must give the same rows in the same order
/// each time it is read: split before a shuffle, or cache it. Reading more rows later than there were at the split is an
/// <see cref="InvalidOperationException"/>.</para>
/// <para>Cut the held-out rows the way the test rows were cut: from the end where rows are in order, by group where rows belong together,
/// and at random only where the test rows were drawn at random.</para>
/// </remarks>
public static class DataViewHoldOut
{
    /// <summary>Holds validation rows out at random.</summary>
    /// <param name="data">Rows, at least 2.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <param name="seed">Seed; the same seed gives the same split.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentException">Too few rows, or a share outside (0,1).</exception>
    public static HeldOut<IDataView> Random(IDataView data, double share = 0.25, int seed = 1) =>
        Split(data, rows => HoldOut.Random(rows, share, seed));

    /// <summary>Holds validation rows out from the end, for rows in time order or any order that must not be mixed.</summary>
    /// <param name="data">Rows in order, at least 2.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; rounded to whole rows, at least one on each side.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentException">Too few rows, or a share outside (0,1).</exception>
    public static HeldOut<IDataView> Tail(IDataView data, double share = 0.25) =>
        Split(data, rows => HoldOut.Tail(rows, share));

    /// <summary>Holds validation rows out at random within each label.</summary>
    /// <param name="data">Rows, at least 2.</param>
    /// <param name="labelColumn">Column with the label: text, number, Boolean or key.</param>
    /// <param name="share">Part held out, strictly between 0 and 1.</param>
    /// <param name="seed">Seed; the same seed gives the same split.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentException">No such column, too few rows a label, or a share outside (0,1).</exception>
    public static HeldOut<IDataView> Stratified(IDataView data, string labelColumn = "Label", double share = 0.25, int seed = 1)
    {
        object[] labels = Values(data, labelColumn, nameof(labelColumn));
        return Split(data, rows => HoldOut.Stratified(rows, row => labels[row], share, seed));
    }

    /// <summary>Holds validation rows out by whole groups drawn at random, so that no group is on both sides.</summary>
    /// <param name="data">Rows of at least 2 groups.</param>
    /// <param name="groupColumn">Column with the group key, such as the kiln load: text, number, Boolean, date or key.</param>
    /// <param name="share">Part held out, strictly between 0 and 1; met as nearly as the groups allow.</param>
    /// <param name="seed">Seed; the same seed gives the same split.</param>
    /// <returns>The two parts.</returns>
    /// <exception cref="ArgumentException">No such column, one group only, or a share outside (0,1).</exception>
    public static HeldOut<IDataView> ByGroup(IDataView data, string groupColumn, double share = 0.25, int seed = 1)
    {
        object[] groups = Values(data, groupColumn, nameof(groupColumn));
        return Split(data, rows => HoldOut.ByGroup(rows, row => groups[row], share, seed));
    }

    private static HeldOut<IDataView> Split(IDataView data, Func<int[], HeldOut<int[]>> split)
    {
        if (data is null)
            throw new ArgumentNullException(nameof(data));
        int count = ColumnReader.CountRows(data);
        if (count < 2)
            throw new ArgumentException($"'data' has {count} rows; a split needs at least 2.", nameof(data));
        int[] rows = new int[count];
        for (int i = 0; i < count; i++)
            rows[i] = i;
        HeldOut<int[]> parts = split(rows);
        return new HeldOut<IDataView>(Kept(data, count, parts.Training), Kept(data, count, parts.Validation));
    }

    private static IDataView Kept(IDataView data, int count, int[] rows)
    {
        bool[] kept = new bool[count];
        foreach (int row in rows)
            kept[row] = true;
        return new KeptRowsView(data, kept);
    }

    private static object[] Values(IDataView data, string name, string parameter)
    {
        if (data is null)
            throw new ArgumentNullException(nameof(data));
        DataViewSchema.Column column = ColumnReader.Find(data, name, parameter);
        List<object> values = [];
        using DataViewRowCursor cursor = data.GetRowCursor([column]);
        Func<object> read = ColumnReader.Reader(cursor, column, parameter);
        while (cursor.MoveNext())
            values.Add(read());
        return [.. values];
    }
}
