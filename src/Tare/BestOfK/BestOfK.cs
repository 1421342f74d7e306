namespace Tare;

/// <summary>What the best of K candidates without any skill looks like: how far choosing alone lifts a score.</summary>
/// <remarks>
/// The candidates' scores are taken as independent. Positively dependent candidates (usual when they share training rows) lift the
/// best less, so these figures are then upper bounds.
/// </remarks>
public static class BestOfK
{
    /// <summary>Probability that the best of K skill-less candidates gets at least so many rows right.</summary>
    /// <param name="hits">Rows the best candidate gets right, 0 to <paramref name="rows"/>.</param>
    /// <param name="rows">Test rows, at least 1.</param>
    /// <param name="baseline">Chance of each candidate to get a row right, 0 to 1.</param>
    /// <param name="candidates">Number of candidates K, at least 1; may be an effective (fractional) number.</param>
    /// <returns>1-(1-P(X >= hits))^K, in [0,1].</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: law of the largest order statistic, with the tail of Clopper and Pearson 1934; Šidák 1967.</remarks>
    public static double PValue(long hits, long rows, double baseline, double candidates)
    {
        Check.HitsOf(hits, rows, nameof(hits), nameof(rows));
        Check.Probability(baseline, nameof(baseline));
        Check.AtLeast(candidates, 1, nameof(candidates));
        return -Stable.Expm1(candidates * Stable.Log1p(-Binomial.AtLeast(hits, rows, baseline)));
    }

    /// <summary>The same when the candidates' chances differ.</summary>
    /// <param name="hits">Rows the best candidate gets right, 0 to <paramref name="rows"/>.</param>
    /// <param name="rows">Test rows, at least 1.</param>
    /// <param name="baselines">Chance of each candidate to get a row right, at least one, each 0 to 1.</param>
    /// <returns>A probability.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain, or there are no candidates.</exception>
    public static double PValue(long hits, long rows, ReadOnlySpan<double> baselines)
    {
        Check.HitsOf(hits, rows, nameof(hits), nameof(rows));
        if (baselines.IsEmpty)
            throw new ArgumentException("'baselines' names no candidate.", nameof(baselines));
        double log = 0;
        foreach (double baseline in baselines)
        {
            Check.Probability(baseline, nameof(baselines));
            log += Stable.Log1p(-Binomial.AtLeast(hits, rows, baseline));
        }

        return -Stable.Expm1(log);
    }

    /// <summary>Mean and standard deviation of the best accuracy among K skill-less candidates.</summary>
    /// <param name="rows">Test rows, 1 to 100 million; the cost grows with their square root.</param>
    /// <param name="baseline">Chance of each candidate to get a row right, 0 to 1.</param>
    /// <param name="candidates">Number of candidates K, at least 1.</param>
    /// <returns>Mean and standard deviation, as shares of the rows.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: law of the largest order statistic of binomial counts.</remarks>
    public static BestAccuracy Accuracy(long rows, double baseline, double candidates)
    {
        Check.AtLeast(rows, 1, nameof(rows));
        if (rows > 100_000_000)
            throw Check.OutOfRange(nameof(rows), rows, "must be at most 100 million");
        Check.Probability(baseline, nameof(baseline));
        Check.AtLeast(candidates, 1, nameof(candidates));
        // Around a centre c: E(M-c) and E(M-c)² as sums over tails, which keeps the variance free of cancellation.
        long centre = QuantileCount(rows, baseline, candidates, 0.5);
        double first = 0, second = 0;
        for (long x = centre + 1; x <= rows; x++)
        {
            double tail = Best(x);
            first += tail;
            second += (2.0 * (x - centre) - 1) * tail;
            if (tail < 1e-19)
                break;
        }

        for (long x = centre - 1; x >= 0; x--)
        {
            double tail = AtMostBest(x, rows, baseline, candidates);
            first -= tail;
            second += (2.0 * (centre - x) - 1) * tail;
            if (tail < 1e-19)
                break;
        }

        double mean = (centre + first) / rows;
        return new BestAccuracy(rows, baseline, candidates, mean, Math.Sqrt(Math.Max(0, second - first * first)) / rows);

        double Best(long x) => -Stable.Expm1(candidates * Stable.Log1p(-Binomial.AtLeast(x, rows, baseline)));
    }

    /// <summary>The smallest count that the best of K skill-less candidates does not exceed with the given probability.</summary>
    /// <param name="rows">Test rows, at least 1.</param>
    /// <param name="baseline">Chance of each candidate to get a row right, 0 to 1.</param>
    /// <param name="candidates">Number of candidates K, at least 1.</param>
    /// <param name="probability">Probability, strictly between 0 and 1.</param>
    /// <returns>A count of rows.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    public static long QuantileCount(long rows, double baseline, double candidates, double probability)
    {
        Check.AtLeast(rows, 1, nameof(rows));
        Check.Probability(baseline, nameof(baseline));
        Check.AtLeast(candidates, 1, nameof(candidates));
        Check.Level(probability, nameof(probability));
        long low = 0, high = rows;
        while (low < high)
        {
            long middle = low + (high - low) / 2;
            if (AtMostBest(middle, rows, baseline, candidates) >= probability)
                high = middle;
            else
                low = middle + 1;
        }

        return low;
    }

    /// <summary>Mean of the largest of K independent standard normal scores: how many standard errors choosing alone gives.</summary>
    /// <param name="candidates">Number of candidates K, at least 1.</param>
    /// <returns>A number of at least 0, such as 1.5388 for 10.</returns>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="candidates"/> is below 1 or NaN.</exception>
    /// <remarks>Source: Tippett 1925, On the extreme individuals and the range of samples, Biometrika 17; here by quadrature. With equal correlation r among candidates, multiply by sqrt(1-r).</remarks>
    public static double NormalMean(double candidates)
    {
        Check.AtLeast(candidates, 1, nameof(candidates));
        return candidates == 1 ? 0 : GaussLegendre.Integrate(x => AboveNormal(x, candidates), 0, 40, 160)
            - GaussLegendre.Integrate(x => BelowNormal(x, candidates), -40, 0, 160);
    }

    /// <summary>Standard deviation of the largest of K independent standard normal scores.</summary>
    /// <param name="candidates">Number of candidates K, at least 1.</param>
    /// <returns>A number in (0,1].</returns>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="candidates"/> is below 1 or NaN.</exception>
    public static double NormalStandardDeviation(double candidates)
    {
        Check.AtLeast(candidates, 1, nameof(candidates));
        double centre = candidates == 1 ? 0 : NormalMean(candidates);
        // E(M-c)² with c the mean, as an integral over tails on both sides of c.
        return Math.Sqrt(
            GaussLegendre.Integrate(x => 2 * (x - centre) * AboveNormal(x, candidates), centre, centre + 12, 48)
            + GaussLegendre.Integrate(x => 2 * (centre - x) * BelowNormal(x, candidates), centre - 20, centre, 80));
    }

    /// <summary>Quantile of the largest of K independent standard normal scores.</summary>
    /// <param name="candidates">Number of candidates K, at least 1.</param>
    /// <param name="probability">Probability, strictly between 0 and 1.</param>
    /// <returns>The value not exceeded with this probability.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    public static double NormalQuantile(double candidates, double probability)
    {
        Check.AtLeast(candidates, 1, nameof(candidates));
        Check.Level(probability, nameof(probability));
        return Normal.UpperQuantile(-Stable.Expm1(Math.Log(probability) / candidates));
    }

    private static double AtMostBest(long x, long rows, double baseline, double candidates)
    {
        double below = Binomial.AtMost(x, rows, baseline);
        return below > 0.5
            ? Math.Exp(candidates * Stable.Log1p(-Binomial.AtLeast(x + 1, rows, baseline)))
            : Math.Pow(below, candidates);
    }

    private static double AboveNormal(double x, double candidates) => -Stable.Expm1(candidates * Stable.Log1p(-Normal.Upper(x)));

    private static double BelowNormal(double x, double candidates) => Math.Exp(candidates * Normal.LogUpper(-x));
}
