using Microsoft.ML;

namespace Tare;

/// <summary>A data view that shows the rows of another one whose position is kept, lazily and in the same order.</summary>
internal sealed class KeptRowsView : IDataView
{
    private readonly IDataView _source;
    private readonly bool[] _kept;
    private readonly long _count;

    public KeptRowsView(IDataView source, bool[] kept)
    {
        _source = source;
        _kept = kept;
        foreach (bool k in kept)
            _count += k ? 1 : 0;
    }

    /// <summary>Positions decide which rows are shown, so the source must never be read in another order.</summary>
    public bool CanShuffle => false;

    public DataViewSchema Schema => _source.Schema;

    public long? GetRowCount() => _count;

    public DataViewRowCursor GetRowCursor(IEnumerable<DataViewSchema.Column> columnsNeeded, Random? rand = null) =>
        new KeptRowsCursor(_source.GetRowCursor(columnsNeeded), _kept);

    public DataViewRowCursor[] GetRowCursorSet(IEnumerable<DataViewSchema.Column> columnsNeeded, int n, Random? rand = null) =>
        [GetRowCursor(columnsNeeded, rand)];
}
