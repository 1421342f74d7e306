namespace Tare;

/// <summary>Half widths and bounds that hold for every law of bounded scores and any number of rows, for K means at once. Wide, and never wrong on independent rows.</summary>
public static class ConcentrationBounds
{
    /// <summary>Hoeffding's half width for K means, all of them within it with probability 1-level.</summary>
    /// <param name="rows">Rows of each mean, at least 1.</param>
    /// <param name="range">Largest less smallest possible score, above 0.</param>
    /// <param name="level">Probability that any mean lies outside, strictly between 0 and 1.</param>
    /// <param name="comparisons">Number of means K, at least 1.</param>
    /// <param name="twoSided">Whether both directions count.</param>
    /// <returns>A half width.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Hoeffding 1963, Probability inequalities for sums of bounded random variables, JASA 58, with a union bound.</remarks>
    public static double Hoeffding(long rows, double range = 1, double level = 0.05, double comparisons = 1, bool twoSided = true)
    {
        CheckArguments(rows, range, level, comparisons);
        return range * Math.Sqrt(Math.Log((twoSided ? 2 : 1) * comparisons / level) / (2.0 * rows));
    }

    /// <summary>Empirical Bernstein half width, one-sided: shorter than Hoeffding's when the scores vary little.</summary>
    /// <param name="rows">Rows of each mean, at least 2.</param>
    /// <param name="sampleVariance">Sample variance of the scores (divisor n-1), at least 0.</param>
    /// <param name="range">Largest less smallest possible score, above 0.</param>
    /// <param name="level">Probability that any mean lies outside, strictly between 0 and 1.</param>
    /// <param name="comparisons">Number of means K, at least 1.</param>
    /// <returns>A half width.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Maurer and Pontil 2009, Empirical Bernstein bounds and sample variance penalization, COLT.</remarks>
    public static double EmpiricalBernstein(long rows, double sampleVariance, double range = 1, double level = 0.05, double comparisons = 1)
    {
        CheckArguments(rows, range, level, comparisons);
        Check.AtLeast(rows, 2, nameof(rows));
        Check.AtLeast(sampleVariance, 0, nameof(sampleVariance));
        double log = Math.Log(2 * comparisons / level), n = rows;
        return Math.Sqrt(2 * sampleVariance * log / n) + 7 * range * log / (3 * (n - 1));
    }

    /// <summary>Chernoff's bounds of a proportion in relative-entropy form, each one-sided at the level.</summary>
    /// <param name="hits">Successes, 0 to <paramref name="rows"/>.</param>
    /// <param name="rows">Rows, at least 1.</param>
    /// <param name="level">Level of each bound, strictly between 0 and 1.</param>
    /// <returns>Both bounds; together they hold with probability at least 1 - 2 level.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Chernoff 1952, Ann. Math. Statist. 23.</remarks>
    public static Interval Chernoff(long hits, long rows, double level = 0.05)
    {
        Check.HitsOf(hits, rows, nameof(hits), nameof(rows));
        Check.Level(level, nameof(level));
        double n = rows, misses = n - hits, limit = -Math.Log(level), share = hits / n;
        // n times the relative entropy of the share against q, by its two deviance parts; it grows on both sides of the share.
        double lower = hits == 0 ? 0 : hits == rows ? Math.Exp(-limit / n) : Root.Find(q => Entropy(q) - limit, Math.Exp(-limit / hits) * share * 0.3, share);
        double upper = hits == rows ? 1 : hits == 0 ? -Stable.Expm1(-limit / n) : 1 - Root.Find(r => Entropy(1 - r) - limit, Math.Exp(-limit / misses) * (1 - share) * 0.3, 1 - share);
        return new Interval(lower, upper, 1 - level, "Chernoff");

        double Entropy(double q) => Gamma.Deviance(hits, n * q) + Gamma.Deviance(misses, n * (1 - q));
    }

    private static void CheckArguments(long rows, double range, double level, double comparisons)
    {
        Check.AtLeast(rows, 1, nameof(rows));
        Check.Positive(range, nameof(range));
        Check.Level(level, nameof(level));
        Check.AtLeast(comparisons, 1, nameof(comparisons));
    }
}
