namespace Tare;

/// <summary>Student's t test on paired differences. It assumes independent pairs and a nearly normal mean; scores of cross-validation folds are not independent, see <see cref="CorrectedResampledTTest"/>.</summary>
public static class PairedTTest
{
    /// <summary>Tests whether the mean difference is zero.</summary>
    /// <param name="differences">One difference a pair, at least 2, all finite.</param>
    /// <param name="side"><see cref="Side.Greater"/>: the mean lies above zero.</param>
    /// <param name="confidence">Confidence of the interval, strictly between 0 and 1.</param>
    /// <returns>The test with its interval; equal differences give p = 0 (p = 1 when all are zero) and are marked degenerate.</returns>
    /// <exception cref="ArgumentException">Fewer than 2 differences, one that is not finite, or a confidence outside (0,1).</exception>
    /// <remarks>Source: Student 1908, The probable error of a mean, Biometrika 6.</remarks>
    public static TTestResult Of(ReadOnlySpan<double> differences, Side side = Side.TwoSided, double confidence = 0.95)
    {
        Check.Level(confidence, nameof(confidence));
        (double mean, double error, double df) = Summary(differences);
        return TTestResult.Of("paired t test", mean, error, df, side, confidence);
    }

    /// <summary>Two one-sided tests: p-value for the mean difference lying within ±margin.</summary>
    /// <param name="differences">One difference a pair, at least 2, all finite.</param>
    /// <param name="margin">Differences smaller than this do not matter, above 0; fixed before looking.</param>
    /// <returns>The larger of the two one-sided p-values.</returns>
    /// <exception cref="ArgumentException">Fewer than 2 differences, one that is not finite, or a margin not above 0.</exception>
    /// <remarks>Source: Schuirmann 1987, J. Pharmacokinet. Biopharm. 15.</remarks>
    public static double Equivalence(ReadOnlySpan<double> differences, double margin)
    {
        Check.Positive(margin, nameof(margin));
        (double mean, double error, double df) = Summary(differences);
        return Math.Max(UpperTail(mean + margin, error, df), UpperTail(margin - mean, error, df));
    }

    /// <summary>p-value for the mean difference not lying below -margin.</summary>
    /// <param name="differences">One difference a pair (positive is better), at least 2, all finite.</param>
    /// <param name="margin">What may be lost, above 0; fixed before looking.</param>
    /// <returns>A one-sided p-value.</returns>
    /// <exception cref="ArgumentException">Fewer than 2 differences, one that is not finite, or a margin not above 0.</exception>
    public static double NonInferiority(ReadOnlySpan<double> differences, double margin)
    {
        Check.Positive(margin, nameof(margin));
        (double mean, double error, double df) = Summary(differences);
        return UpperTail(mean + margin, error, df);
    }

    internal static Moments Collect(ReadOnlySpan<double> differences)
    {
        if (differences.Length < 2)
            throw new ArgumentException($"'differences' has {Check.Text(differences.Length)} values; at least 2 are needed.", nameof(differences));
        Moments moments = default;
        for (int i = 0; i < differences.Length; i++)
        {
            Check.FiniteRow(differences[i], i, nameof(differences));
            moments.Add(differences[i]);
        }

        if (!Check.IsFinite(moments.Variance))
            throw new ArgumentException("The values in 'differences' are too large to average.", nameof(differences));
        return moments;
    }

    private static (double Mean, double Error, double Df) Summary(ReadOnlySpan<double> differences)
    {
        Moments moments = Collect(differences);
        return (moments.Mean, Math.Sqrt(moments.Variance / moments.Count), moments.Count - 1);
    }

    private static double UpperTail(double distance, double error, double df) =>
        error == 0 ? (distance > 0 ? 0 : 1) : StudentT.Tails(distance / error, df).Upper;
}
