namespace Tare;

/// <summary>Intervals for the difference of two proportions from independent rows. On the same rows use <see cref="PairedProportionInterval"/>.</summary>
public static class TwoProportionsInterval
{
    /// <summary>Newcombe's interval from two Wilson intervals (his method 10).</summary>
    /// <param name="firstHits">Successes in the first sample, 0 to <paramref name="firstRows"/>.</param>
    /// <param name="firstRows">Rows of the first sample, at least 1.</param>
    /// <param name="secondHits">Successes in the second sample, 0 to <paramref name="secondRows"/>.</param>
    /// <param name="secondRows">Rows of the second sample, at least 1.</param>
    /// <param name="confidence">Confidence, strictly between 0 and 1.</param>
    /// <returns>An interval within [-1,1] for the first proportion less the second.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Newcombe 1998, Interval estimation for the difference between independent proportions, Statist. Med. 17.</remarks>
    public static Interval Newcombe(long firstHits, long firstRows, long secondHits, long secondRows, double confidence = 0.95)
    {
        double z = CheckedZ(firstHits, firstRows, secondHits, secondRows, confidence);
        double p1 = (double)firstHits / firstRows, p2 = (double)secondHits / secondRows, difference = p1 - p2;
        (double low1, double high1) = ProportionInterval.WilsonEnds(firstHits, firstRows, z);
        (double low2, double high2) = ProportionInterval.WilsonEnds(secondHits, secondRows, z);
        return new Interval(difference - Length(p1 - low1, high2 - p2), difference + Length(high1 - p1, p2 - low2), confidence, "Newcombe");

        static double Length(double a, double b) => Math.Sqrt(a * a + b * b);
    }

    /// <summary>Wald's formula with one success and one failure added to each sample.</summary>
    /// <param name="firstHits">Successes in the first sample, 0 to <paramref name="firstRows"/>.</param>
    /// <param name="firstRows">Rows of the first sample, at least 1.</param>
    /// <param name="secondHits">Successes in the second sample, 0 to <paramref name="secondRows"/>.</param>
    /// <param name="secondRows">Rows of the second sample, at least 1.</param>
    /// <param name="confidence">Confidence, strictly between 0 and 1.</param>
    /// <returns>An interval cut to [-1,1] for the first proportion less the second.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Agresti and Caffo 2000, Simple and effective confidence intervals for proportions and differences of proportions, Am. Statist. 54.</remarks>
    public static Interval AgrestiCaffo(long firstHits, long firstRows, long secondHits, long secondRows, double confidence = 0.95)
    {
        double z = CheckedZ(firstHits, firstRows, secondHits, secondRows, confidence);
        double n1 = firstRows + 2.0, n2 = secondRows + 2.0, q1 = (firstHits + 1) / n1, q2 = (secondHits + 1) / n2;
        double reach = z * Math.Sqrt(q1 * (1 - q1) / n1 + q2 * (1 - q2) / n2);
        return new Interval(Math.Max(-1, q1 - q2 - reach), Math.Min(1, q1 - q2 + reach), confidence, "Agresti-Caffo");
    }

    private static double CheckedZ(long firstHits, long firstRows, long secondHits, long secondRows, double confidence)
    {
        Check.HitsOf(firstHits, firstRows, nameof(firstHits), nameof(firstRows));
        Check.HitsOf(secondHits, secondRows, nameof(secondHits), nameof(secondRows));
        Check.Level(confidence, nameof(confidence));
        return Normal.UpperQuantile(0.5 * (1 - confidence));
    }
}
