namespace Tare;

/// <summary>Tests of two proportions from independent rows (two different sets of test rows). On the same rows use <see cref="McNemarTest"/>.</summary>
public static class TwoProportionsTest
{
    /// <summary>Pearson's chi-square test with pooled variance; approximate.</summary>
    /// <param name="firstHits">Successes in the first sample, 0 to <paramref name="firstRows"/>.</param>
    /// <param name="firstRows">Rows of the first sample, at least 1.</param>
    /// <param name="secondHits">Successes in the second sample, 0 to <paramref name="secondRows"/>.</param>
    /// <param name="secondRows">Rows of the second sample, at least 1.</param>
    /// <param name="continuity">Whether Yates' correction (not beyond the difference itself) is used.</param>
    /// <returns>The statistic and its two-sided p-value; degenerate with p = 1 when both samples are all successes or all failures.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A count lies outside its domain.</exception>
    /// <remarks>Sources: Pearson 1900, Phil. Mag. 50; Yates 1934, J. R. Statist. Soc. Suppl. 1.</remarks>
    public static TestResult ChiSquareForm(long firstHits, long firstRows, long secondHits, long secondRows, bool continuity = false)
    {
        Check.HitsOf(firstHits, firstRows, nameof(firstHits), nameof(firstRows));
        Check.HitsOf(secondHits, secondRows, nameof(secondHits), nameof(secondRows));
        double n1 = firstRows, n2 = secondRows, pooled = ((double)firstHits + secondHits) / (n1 + n2);
        double variance = pooled * (1 - pooled) * (1 / n1 + 1 / n2);
        if (variance == 0)
            return new TestResult("chi-square test of two proportions", 0, 1, Side.TwoSided, Degenerate: true);
        double distance = Math.Abs(firstHits / n1 - secondHits / n2), half = 0.5 * (1 / n1 + 1 / n2);
        if (continuity)
            distance -= Math.Min(half, distance);
        double statistic = distance * distance / variance;
        return new TestResult("chi-square test of two proportions", statistic, ChiSquare.Upper(statistic, 1), Side.TwoSided);
    }

    /// <summary>Fisher's exact test, given all margins. The cost grows with the smallest margin.</summary>
    /// <param name="firstHits">Successes in the first sample, 0 to <paramref name="firstRows"/>.</param>
    /// <param name="firstRows">Rows of the first sample, at least 1.</param>
    /// <param name="secondHits">Successes in the second sample, 0 to <paramref name="secondRows"/>.</param>
    /// <param name="secondRows">Rows of the second sample, at least 1.</param>
    /// <param name="side"><see cref="Side.Greater"/>: the first proportion is larger. Two-sided: all tables no more probable than the one seen.</param>
    /// <returns>A p-value in [0,1].</returns>
    /// <exception cref="ArgumentOutOfRangeException">A count lies outside its domain.</exception>
    /// <remarks>Source: Fisher 1935, The logic of inductive inference, J. R. Statist. Soc. 98.</remarks>
    public static double Fisher(long firstHits, long firstRows, long secondHits, long secondRows, Side side = Side.TwoSided)
    {
        Check.HitsOf(firstHits, firstRows, nameof(firstHits), nameof(firstRows));
        Check.HitsOf(secondHits, secondRows, nameof(secondHits), nameof(secondRows));
        if (side is not (Side.TwoSided or Side.Greater or Side.Less))
            throw Check.OutOfRange(nameof(side), side, "is no side");
        long hits = firstHits + secondHits, low = Math.Max(0, hits - secondRows), high = Math.Min(firstRows, hits);
        double p = (double)hits / (firstRows + secondRows), seen = Log(firstHits), sum = 0;
        // Small terms first would be better still; the terms are positive, so nothing cancels.
        for (long x = low; x <= high; x++)
        {
            bool counts = side switch
            {
                Side.Greater => x >= firstHits,
                Side.Less => x <= firstHits,
                _ => Log(x) <= seen + 1e-7,
            };
            if (counts)
                sum += Math.Exp(Log(x));
        }

        return Math.Min(1, sum);

        // Hypergeometric law as binomial laws over their sum's (Loader 2000).
        double Log(long x) => Binomial.LogPmf(x, firstRows, p) + Binomial.LogPmf(hits - x, secondRows, p) - Binomial.LogPmf(hits, firstRows + secondRows, p);
    }
}
