namespace Tare;

/// <summary>Exact test of a proportion against a fixed value.</summary>
/// <remarks>It assumes independent rows; rows in groups or in time order break it.</remarks>
public static class BinomialTest
{
    /// <summary>Exact p-value of <paramref name="hits"/> successes in <paramref name="rows"/> rows when each succeeds with probability <paramref name="baseline"/>.</summary>
    /// <param name="hits">Successes, 0 to <paramref name="rows"/>.</param>
    /// <param name="rows">Rows, at least 1.</param>
    /// <param name="baseline">Success probability under the null hypothesis, 0 to 1, both allowed.</param>
    /// <param name="side"><see cref="Side.Greater"/>: P(X >= hits). <see cref="Side.Less"/>: P(X &lt;= hits). <see cref="Side.TwoSided"/>: the total probability of all outcomes no more probable than the one seen (with a slack of 1e-7 for rounding of symmetric ties).</param>
    /// <returns>A p-value in [0,1], computed from the small tail, so that it keeps its digits down to 1e-300.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Clopper and Pearson 1934 for the tails; the two-sided rule is that of R's <c>binom.test</c>.</remarks>
    public static double PValue(long hits, long rows, double baseline, Side side = Side.TwoSided)
    {
        Check.HitsOf(hits, rows, nameof(hits), nameof(rows));
        Check.Probability(baseline, nameof(baseline));
        return side switch
        {
            Side.Greater => Binomial.AtLeast(hits, rows, baseline),
            Side.Less => Binomial.AtMost(hits, rows, baseline),
            Side.TwoSided => TwoSided(hits, rows, baseline),
            _ => throw Check.OutOfRange(nameof(side), side, "is no side"),
        };
    }

    /// <summary>Mid-p value: the exact tail less half the probability of the outcome seen. Less conservative; it may exceed its level slightly.</summary>
    /// <param name="hits">Successes, 0 to <paramref name="rows"/>.</param>
    /// <param name="rows">Rows, at least 1.</param>
    /// <param name="baseline">Success probability under the null hypothesis, 0 to 1.</param>
    /// <param name="side">One tail, or twice the smaller mid-p tail, at most 1.</param>
    /// <returns>A mid-p value in [0,1].</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Lancaster 1961, Significance tests in discrete distributions, JASA 56.</remarks>
    public static double MidP(long hits, long rows, double baseline, Side side = Side.TwoSided)
    {
        Check.HitsOf(hits, rows, nameof(hits), nameof(rows));
        Check.Probability(baseline, nameof(baseline));
        double half = 0.5 * Binomial.Pmf(hits, rows, baseline);
        double less = Binomial.AtMost(hits - 1, rows, baseline) + half;
        double greater = Binomial.AtLeast(hits + 1, rows, baseline) + half;
        return side switch
        {
            Side.Greater => greater,
            Side.Less => less,
            Side.TwoSided => Math.Min(1, 2 * Math.Min(less, greater)),
            _ => throw Check.OutOfRange(nameof(side), side, "is no side"),
        };
    }

    private static double TwoSided(long hits, long rows, double p)
    {
        if (p == 0 || p == 1)
            return hits == (p == 0 ? 0 : rows) ? 1 : 0;
        double mean = rows * p;
        if (hits == mean)
            return 1;
        // The law has one peak: on the far side, find the outermost run of outcomes that are no more probable.
        double bound = Binomial.LogPmf(hits, rows, p) + Stable.Log1p(1e-7);
        if (hits < mean)
        {
            long low = (long)Math.Ceiling(mean), high = rows + 1;
            while (low < high)
            {
                long middle = low + (high - low) / 2;
                if (Binomial.LogPmf(middle, rows, p) <= bound)
                    high = middle;
                else
                    low = middle + 1;
            }

            return Math.Min(1, Binomial.AtMost(hits, rows, p) + Binomial.AtLeast(low, rows, p));
        }
        else
        {
            long low = -1, high = (long)Math.Floor(mean);
            while (low < high)
            {
                long middle = high - (high - low) / 2;
                if (Binomial.LogPmf(middle, rows, p) <= bound)
                    low = middle;
                else
                    high = middle - 1;
            }

            return Math.Min(1, Binomial.AtLeast(hits, rows, p) + Binomial.AtMost(low, rows, p));
        }
    }
}
