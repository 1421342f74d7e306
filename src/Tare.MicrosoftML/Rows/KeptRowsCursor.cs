using Microsoft.ML;
using Microsoft.ML.Data;

namespace Tare;

/// <summary>Walks the source and stops only at kept rows.</summary>
internal sealed class KeptRowsCursor(DataViewRowCursor source, bool[] kept) : DataViewRowCursor
{
    private long _position = -1;
    private long _sourcePosition = -1;

    public override long Position => _position;

    public override long Batch => source.Batch;

    public override DataViewSchema Schema => source.Schema;

    public override bool MoveNext()
    {
        while (source.MoveNext())
        {
            if (++_sourcePosition >= kept.Length)
                throw new InvalidOperationException($"The data view has more than the {kept.Length} rows it had when it was split.");
            if (kept[_sourcePosition])
            {
                _position++;
                return true;
            }
        }

        _position = -1;
        return false;
    }

    public override ValueGetter<TValue> GetGetter<TValue>(DataViewSchema.Column column) => source.GetGetter<TValue>(column);

    public override ValueGetter<DataViewRowId> GetIdGetter() => source.GetIdGetter();

    public override bool IsColumnActive(DataViewSchema.Column column) => source.IsColumnActive(column);

    protected override void Dispose(bool disposing)
    {
        if (disposing)
            source.Dispose();
        base.Dispose(disposing);
    }
}
