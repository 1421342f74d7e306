namespace Tare;

/// <summary>Puts test rows away until the winner is known.</summary>
public static class Seal
{
    /// <summary>Seals test rows.</summary>
    /// <typeparam name="TRows">Container of rows.</typeparam>
    /// <param name="rows">The test rows, not null.</param>
    /// <returns>A container that opens once.</returns>
    /// <exception cref="ArgumentNullException"><paramref name="rows"/> is null.</exception>
    public static SealedTestRows<TRows> TestRows<TRows>([TestRows] TRows rows)
    {
        if (rows is null)
            throw new ArgumentNullException(nameof(rows));
        return new SealedTestRows<TRows>(rows);
    }

    /// <summary>Seals parallel features and labels of test rows.</summary>
    /// <typeparam name="TRows">Container of features.</typeparam>
    /// <typeparam name="TLabels">Container of labels.</typeparam>
    /// <param name="testX">Features of the test rows, not null.</param>
    /// <param name="testY">Their labels, not null.</param>
    /// <returns>A container that opens once: <c>var (testX, testY) = sealedRows.Open();</c>.</returns>
    /// <exception cref="ArgumentNullException">An argument is null.</exception>
    public static SealedTestRows<(TRows TestX, TLabels TestY)> TestRows<TRows, TLabels>([TestRows] TRows testX, [TestRows] TLabels testY)
    {
        if (testX is null)
            throw new ArgumentNullException(nameof(testX));
        if (testY is null)
            throw new ArgumentNullException(nameof(testY));
        return new SealedTestRows<(TRows, TLabels)>((testX, testY));
    }
}
