namespace Tare;

/// <summary>Exact sign test on paired differences: do positive ones outnumber negative ones?</summary>
/// <remarks>It assumes independent pairs.</remarks>
public static class SignTest
{
    /// <summary>Exact p-value from counts; differences of zero are left out beforehand.</summary>
    /// <param name="positive">Pairs with a positive difference, at least 0.</param>
    /// <param name="negative">Pairs with a negative difference, at least 0.</param>
    /// <param name="side"><see cref="Side.Greater"/>: positive differences prevail.</param>
    /// <returns>A p-value in [0,1]; 1 when every difference is zero.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A count is negative.</exception>
    /// <remarks>Source: Dixon and Mood 1946, The statistical sign test, JASA 41.</remarks>
    public static double PValue(long positive, long negative, Side side = Side.TwoSided)
    {
        Check.AtLeast(positive, 0, nameof(positive));
        Check.AtLeast(negative, 0, nameof(negative));
        return positive + negative == 0 ? 1 : BinomialTest.PValue(positive, positive + negative, 0.5, side);
    }

    /// <summary>Exact p-value from the differences themselves.</summary>
    /// <param name="differences">One difference a pair, at least one, all finite.</param>
    /// <param name="side"><see cref="Side.Greater"/>: positive differences prevail.</param>
    /// <returns>A p-value in [0,1].</returns>
    /// <exception cref="ArgumentException">No differences, or one that is not finite.</exception>
    public static double PValue(ReadOnlySpan<double> differences, Side side = Side.TwoSided)
    {
        if (differences.IsEmpty)
            throw Check.Empty(nameof(differences));
        long positive = 0, negative = 0;
        for (int i = 0; i < differences.Length; i++)
        {
            Check.FiniteRow(differences[i], i, nameof(differences));
            if (differences[i] > 0)
                positive++;
            else if (differences[i] < 0)
                negative++;
        }

        return PValue(positive, negative, side);
    }
}
