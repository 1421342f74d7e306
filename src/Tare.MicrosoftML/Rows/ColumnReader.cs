using Microsoft.ML;
using Microsoft.ML.Data;

namespace Tare;

/// <summary>Reads single-valued columns of any comparable type.</summary>
internal static class ColumnReader
{
    public static DataViewSchema.Column Find(IDataView data, string column, string parameter)
    {
        if (column is null)
            throw new ArgumentNullException(parameter);
        return data.Schema.GetColumnOrNull(column)
            ?? throw new ArgumentException($"'{parameter}' = \"{column}\" is no column; there are: {string.Join(", ", data.Schema.Select(c => c.Name))}.", parameter);
    }

    /// <summary>The column's value at the cursor as something that can be compared; text becomes a string.</summary>
    public static Func<object> Reader(DataViewRowCursor cursor, DataViewSchema.Column column, string parameter)
    {
        Type type = column.Type.RawType;
        if (type == typeof(ReadOnlyMemory<char>))
        {
            Func<ReadOnlyMemory<char>> text = Typed<ReadOnlyMemory<char>>(cursor, column);
            return () => text().ToString();
        }

        if (type == typeof(bool)) return Boxed<bool>(cursor, column);
        if (type == typeof(float)) return Boxed<float>(cursor, column);
        if (type == typeof(double)) return Boxed<double>(cursor, column);
        if (type == typeof(byte)) return Boxed<byte>(cursor, column);
        if (type == typeof(ushort)) return Boxed<ushort>(cursor, column);
        if (type == typeof(uint)) return Boxed<uint>(cursor, column);
        if (type == typeof(ulong)) return Boxed<ulong>(cursor, column);
        if (type == typeof(sbyte)) return Boxed<sbyte>(cursor, column);
        if (type == typeof(short)) return Boxed<short>(cursor, column);
        if (type == typeof(int)) return Boxed<int>(cursor, column);
        if (type == typeof(long)) return Boxed<long>(cursor, column);
        if (type == typeof(DateTime)) return Boxed<DateTime>(cursor, column);
        throw NotUsable(column, parameter, "a single comparable value");
    }

    /// <summary>The column's value at the cursor as a number.</summary>
    public static Func<double> NumberReader(DataViewRowCursor cursor, DataViewSchema.Column column, string parameter)
    {
        if (column.Type.RawType == typeof(float))
        {
            Func<float> single = Typed<float>(cursor, column);
            return () => single();
        }

        return column.Type.RawType == typeof(double) ? Typed<double>(cursor, column) : throw NotUsable(column, parameter, "a number (Single or Double)");
    }

    public static int CountRows(IDataView data)
    {
        long count = 0;
        if (data.GetRowCount() is { } known)
        {
            count = known;
        }
        else
        {
            using DataViewRowCursor cursor = data.GetRowCursor([]);
            while (cursor.MoveNext())
                count++;
        }

        return count <= 0x7FEFFFFF ? (int)count : throw new ArgumentException($"'data' has {count} rows; at most 2147 million can be split.", nameof(data));
    }

    private static Func<object> Boxed<T>(DataViewRowCursor cursor, DataViewSchema.Column column) where T : struct
    {
        Func<T> read = Typed<T>(cursor, column);
        return () => read();
    }

    private static Func<T> Typed<T>(DataViewRowCursor cursor, DataViewSchema.Column column)
    {
        ValueGetter<T> getter = cursor.GetGetter<T>(column);
        return () =>
        {
            T value = default!;
            getter(ref value);
            return value;
        };
    }

    private static ArgumentException NotUsable(DataViewSchema.Column column, string parameter, string wanted) =>
        new($"Column '{column.Name}' ({parameter}) is of type {column.Type}, not {wanted}.", parameter);
}
