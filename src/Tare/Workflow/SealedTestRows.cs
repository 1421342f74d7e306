using System.Threading;

namespace Tare;

/// <summary>Test rows that open once: whoever wants them a second time in this program gets an error instead of another look.</summary>
/// <typeparam name="TRows">Container of rows: an array, a list, a data view, or a tuple of features and labels.</typeparam>
/// <remarks>Safe for use from several threads: only one of them opens. It guards this object only; the rows' own variable should not stay in reach.</remarks>
public sealed class SealedTestRows<TRows>
{
    private readonly TRows _rows;
    private int _opened;

    internal SealedTestRows(TRows rows) => _rows = rows;

    /// <summary>Whether the rows have been opened.</summary>
    public bool Opened => Volatile.Read(ref _opened) != 0;

    /// <summary>Opens the rows, for one scoring of one winner.</summary>
    /// <returns>The test rows.</returns>
    /// <exception cref="InvalidOperationException">They have been opened before.</exception>
    [return: TestRows]
    public TRows Open() => Interlocked.Exchange(ref _opened, 1) == 0
        ? _rows
        : throw new InvalidOperationException(
            "These test rows have been opened before. Use the first opening's result; a second look at the same rows is a second comparison.");

    /// <summary>Says whether the rows are sealed, and shows none of them.</summary>
    /// <returns>One word or two.</returns>
    public override string ToString() => Opened ? "test rows, opened" : "test rows, sealed";
}
