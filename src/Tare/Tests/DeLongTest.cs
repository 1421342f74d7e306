namespace Tare;

/// <summary>Area under the ROC curve: standard error, interval, and the comparison of two models on the same rows. It assumes independent rows and is approximate (normal).</summary>
/// <remarks>Midrank form: N log N for N rows.</remarks>
public static class DeLongTest
{
    /// <summary>AUC of one model with its interval.</summary>
    /// <param name="positives">Scores of the positive rows, at least one, all finite.</param>
    /// <param name="negatives">Scores of the negative rows, at least one, all finite.</param>
    /// <param name="confidence">Confidence, strictly between 0 and 1.</param>
    /// <returns>AUC, standard error, interval.</returns>
    /// <exception cref="ArgumentException">A class without rows, or a score that is not finite.</exception>
    /// <remarks>Sources: DeLong, DeLong and Clarke-Pearson 1988, Biometrics 44; midrank form of Sun and Xu 2014, IEEE Signal Processing Letters 21.</remarks>
    public static AucResult Auc(ReadOnlySpan<double> positives, ReadOnlySpan<double> negatives, double confidence = 0.95)
    {
        Check.Level(confidence, nameof(confidence));
        Parts model = Of(positives, negatives, nameof(positives), nameof(negatives));
        double variance = Covariance(model, model);
        double error = Math.Sqrt(variance);
        double reach = error * Normal.UpperQuantile(0.5 * (1 - confidence));
        bool degenerate = variance == 0 || positives.Length < 2 || negatives.Length < 2;
        return new AucResult(
            model.Auc, error, new Interval(Math.Max(0, model.Auc - reach), Math.Min(1, model.Auc + reach), confidence, "DeLong"), degenerate);
    }

    /// <summary>Tests whether two models' AUCs on the same rows differ.</summary>
    /// <param name="firstPositives">First model's scores of the positive rows, at least 2, all finite.</param>
    /// <param name="firstNegatives">First model's scores of the negative rows, at least 2, all finite.</param>
    /// <param name="secondPositives">Second model's scores of the same positive rows, in the same order.</param>
    /// <param name="secondNegatives">Second model's scores of the same negative rows, in the same order.</param>
    /// <param name="side"><see cref="Side.Greater"/>: the first model's AUC is higher.</param>
    /// <returns>Both AUCs, their variances and covariance, z and the p-value.</returns>
    /// <exception cref="ArgumentException">Fewer than 2 rows a class, unequal lengths, or a score that is not finite.</exception>
    /// <remarks>Source: DeLong, DeLong and Clarke-Pearson 1988, Comparing the areas under two or more correlated receiver operating characteristic curves, Biometrics 44.</remarks>
    public static AucComparison Compare(
        ReadOnlySpan<double> firstPositives, ReadOnlySpan<double> firstNegatives,
        ReadOnlySpan<double> secondPositives, ReadOnlySpan<double> secondNegatives, Side side = Side.TwoSided)
    {
        if (firstPositives.Length != secondPositives.Length)
            throw Check.UnequalLengths(nameof(firstPositives), firstPositives.Length, nameof(secondPositives), secondPositives.Length);
        if (firstNegatives.Length != secondNegatives.Length)
            throw Check.UnequalLengths(nameof(firstNegatives), firstNegatives.Length, nameof(secondNegatives), secondNegatives.Length);
        Check.AtLeast((long)firstPositives.Length, 2, nameof(firstPositives));
        Check.AtLeast((long)firstNegatives.Length, 2, nameof(firstNegatives));
        Parts first = Of(firstPositives, firstNegatives, nameof(firstPositives), nameof(firstNegatives));
        Parts second = Of(secondPositives, secondNegatives, nameof(secondPositives), nameof(secondNegatives));
        double one = Covariance(first, first), two = Covariance(second, second), both = Covariance(first, second);
        double difference = first.Auc - second.Auc;
        double variance = VarianceOfDifference(first, second);
        bool degenerate = variance == 0;
        double z = degenerate ? (difference == 0 ? 0 : difference > 0 ? double.PositiveInfinity : double.NegativeInfinity) : difference / Math.Sqrt(variance);
        double p = degenerate && difference == 0
            ? 1
            : TestResult.OfTails(new Tails(Normal.Cdf(z), Normal.Upper(z), 0, 0), side);
        return new AucComparison(first.Auc, second.Auc, one, two, both, z, p, side, degenerate);
    }

    private static Parts Of(ReadOnlySpan<double> positives, ReadOnlySpan<double> negatives, string positivesName, string negativesName)
    {
        if (positives.IsEmpty)
            throw Check.Empty(positivesName);
        if (negatives.IsEmpty)
            throw Check.Empty(negativesName);
        for (int i = 0; i < positives.Length; i++)
            Check.FiniteRow(positives[i], i, positivesName);
        for (int i = 0; i < negatives.Length; i++)
            Check.FiniteRow(negatives[i], i, negativesName);
        int m = positives.Length, n = negatives.Length;
        double[] all = new double[m + n];
        positives.CopyTo(all);
        negatives.CopyTo(all.AsSpan(m));
        double[] joint = Ranks.Mid(all), own = Ranks.Mid(positives.ToArray()), others = Ranks.Mid(negatives.ToArray());
        // Placement of each row: the share of the other class it stands on the right side of.
        double[] overNegatives = new double[m], underPositives = new double[n];
        double sum = 0;
        for (int i = 0; i < m; i++)
            sum += overNegatives[i] = (joint[i] - own[i]) / n;
        for (int j = 0; j < n; j++)
            underPositives[j] = 1 - (joint[m + j] - others[j]) / m;
        return new Parts(sum / m, overNegatives, underPositives);
    }

    private static double Covariance(Parts a, Parts b) =>
        Covariance(a.OverNegatives, b.OverNegatives) + Covariance(a.UnderPositives, b.UnderPositives);

    // The variance of the difference from the placements' own differences, so that two equal models give exactly zero.
    private static double VarianceOfDifference(Parts a, Parts b)
    {
        double[] over = Minus(a.OverNegatives, b.OverNegatives), under = Minus(a.UnderPositives, b.UnderPositives);
        return Covariance(over, over) + Covariance(under, under);
    }

    private static double[] Minus(double[] a, double[] b)
    {
        double[] difference = new double[a.Length];
        for (int i = 0; i < a.Length; i++)
            difference[i] = a[i] - b[i];
        return difference;
    }

    // Sample covariance over the number of values.
    private static double Covariance(double[] a, double[] b)
    {
        if (a.Length < 2)
            return 0;
        double meanA = 0, meanB = 0, sum = 0;
        for (int i = 0; i < a.Length; i++)
        {
            meanA += a[i] / a.Length;
            meanB += b[i] / b.Length;
        }

        for (int i = 0; i < a.Length; i++)
            sum += (a[i] - meanA) * (b[i] - meanB);
        return sum / (a.Length - 1.0) / a.Length;
    }

    private readonly record struct Parts(double Auc, double[] OverNegatives, double[] UnderPositives);
}
