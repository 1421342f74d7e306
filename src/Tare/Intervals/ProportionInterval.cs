namespace Tare;

/// <summary>Confidence intervals for one proportion. All assume independent rows.</summary>
public static partial class ProportionInterval
{
    /// <summary>Exact interval: never covers less than its confidence. 0 at no hits, 1 at all hits.</summary>
    /// <param name="hits">Successes, 0 to <paramref name="rows"/>.</param>
    /// <param name="rows">Rows, at least 1.</param>
    /// <param name="confidence">Confidence, strictly between 0 and 1.</param>
    /// <param name="side"><see cref="Side.TwoSided"/>: both ends. <see cref="Side.Greater"/>: a lower bound only (the values a test for "greater" does not reject), upper end 1. <see cref="Side.Less"/>: an upper bound only, lower end 0.</param>
    /// <returns>An interval within [0,1].</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Clopper and Pearson 1934, The use of confidence or fiducial limits illustrated in the case of the binomial, Biometrika 26. Coverage at 95 % over proportions 0.01 to 0.99: least 0.958, mean 0.976 with 20 rows; least 0.952, mean 0.961 with 200.</remarks>
    public static Interval ClopperPearson(long hits, long rows, double confidence = 0.95, Side side = Side.TwoSided)
    {
        Check.HitsOf(hits, rows, nameof(hits), nameof(rows));
        Check.Level(confidence, nameof(confidence));
        return ClopperPearsonAtLevel(hits, rows, 1 - confidence, side);
    }

    /// <summary>Score interval: covers its confidence on average, slightly less for some proportions. Exactly 0 at no hits and 1 at all hits.</summary>
    /// <param name="hits">Successes, 0 to <paramref name="rows"/>.</param>
    /// <param name="rows">Rows, at least 1.</param>
    /// <param name="confidence">Confidence, strictly between 0 and 1.</param>
    /// <param name="side">Both ends, or one bound as in <see cref="ClopperPearson"/>.</param>
    /// <returns>An interval within [0,1].</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Wilson 1927, Probable inference, the law of succession, and statistical inference, JASA 22. Coverage at 95 % over proportions 0.01 to 0.99: least 0.912, mean 0.954 with 20 rows; least 0.933, mean 0.950 with 200.</remarks>
    public static Interval Wilson(long hits, long rows, double confidence = 0.95, Side side = Side.TwoSided)
    {
        Check.HitsOf(hits, rows, nameof(hits), nameof(rows));
        Check.Level(confidence, nameof(confidence));
        double level = 1 - confidence;
        double z = Normal.UpperQuantile(side == Side.TwoSided ? 0.5 * level : level);
        (double lower, double upper) = WilsonEnds(hits, rows, z);
        return new Interval(
            side == Side.Less ? 0 : lower,
            side == Side.Greater ? 1 : upper,
            confidence,
            Named("Wilson", side));
    }

    /// <summary>The exact interval from its level, so that a corrected level of 1e-20 is not lost in 1-level.</summary>
    internal static Interval ClopperPearsonAtLevel(long hits, long rows, double level, Side side)
    {
        double tail = side == Side.TwoSided ? 0.5 * level : level;
        double lower = side == Side.Less || hits == 0 ? 0 : Beta.Quantile(tail, 1 - tail, hits, rows - hits + 1);
        double upper = side == Side.Greater || hits == rows ? 1 : Beta.Quantile(1 - tail, tail, hits + 1, rows - hits);
        return new Interval(lower, upper, 1 - level, Named("Clopper-Pearson", side));
    }

    internal static (double Lower, double Upper) WilsonEnds(double hits, double rows, double z)
    {
        double square = z * z, misses = rows - hits;
        double root = z * Math.Sqrt(hits * misses / rows + 0.25 * square);
        double upper = hits == rows ? 1 : Math.Min(1, (hits + 0.5 * square + root) / (rows + square));
        // The lower end through the product of the two roots, where their difference would cancel.
        double lower = hits == 0 ? 0 : hits / rows * hits / (hits + 0.5 * square + root);
        return (lower, upper);
    }

    private static string Named(string method, Side side) => side switch
    {
        Side.TwoSided => method,
        Side.Greater => method + " lower bound",
        Side.Less => method + " upper bound",
        _ => throw Check.OutOfRange(nameof(side), side, "is no side"),
    };
}
