namespace Tare;

/// <summary>Friedman's test of k methods over N independent data sets (one score each), and Nemenyi's pairwise comparisons after it. Folds of one data set are no data sets.</summary>
public static class FriedmanTest
{
    /// <summary>Tests whether all methods rank alike.</summary>
    /// <param name="scores">One entry a data set with k finite scores in it; at least 2 data sets, at least 2 methods, all rows of the same length.</param>
    /// <param name="higherIsBetter">Direction of the scores.</param>
    /// <returns>The test, its F form and all pairwise p-values.</returns>
    /// <exception cref="ArgumentException">Too few data sets or methods, unequal lengths, or a score that is not finite.</exception>
    /// <remarks>Sources: Friedman 1937, JASA 32; Iman and Davenport 1980, Commun. Statist. 9; Nemenyi 1963; Demšar 2006, Statistical comparisons of classifiers over multiple data sets, JMLR 7.</remarks>
    public static FriedmanResult Of(IReadOnlyList<IReadOnlyList<double>> scores, bool higherIsBetter)
    {
        Check.NotNull(scores, nameof(scores));
        int n = scores.Count;
        if (n < 2)
            throw new ArgumentException($"'scores' has {Check.Text(n)} data sets; at least 2 are needed.", nameof(scores));
        int k = Check.NotNull(scores[0], nameof(scores)).Count;
        if (k < 2)
            throw new ArgumentException($"'scores' has {Check.Text(k)} methods; at least 2 are needed.", nameof(scores));
        double[] sums = new double[k];
        double squares = 0;
        for (int row = 0; row < n; row++)
        {
            IReadOnlyList<double> block = Check.NotNull(scores[row], nameof(scores));
            if (block.Count != k)
                throw new ArgumentException($"Row {Check.Text(row)} of 'scores' has {Check.Text(block.Count)} scores and row 0 has {Check.Text(k)}.", nameof(scores));
            double[] values = new double[k];
            for (int j = 0; j < k; j++)
            {
                Check.FiniteRow(block[j], row, nameof(scores));
                values[j] = higherIsBetter ? -block[j] : block[j];
            }

            double[] ranks = Ranks.Mid(values);
            for (int j = 0; j < k; j++)
            {
                sums[j] += ranks[j];
                squares += ranks[j] * ranks[j];
            }
        }

        return Finish(n, k, sums, squares);
    }

    /// <summary>Mean ranks that differ by at least this much differ at the family level, over all pairs.</summary>
    /// <param name="methods">Methods k, at least 2.</param>
    /// <param name="blocks">Data sets N, at least 2.</param>
    /// <param name="level">Level of the family, strictly between 0 and 1.</param>
    /// <returns>The critical difference.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain.</exception>
    /// <remarks>Source: Nemenyi 1963 after Demšar 2006. The range law is integrated, since printed tables are off by one in the last digit here and there.</remarks>
    public static double NemenyiCriticalDifference(int methods, int blocks, double level = 0.05)
    {
        CheckSize(methods, blocks);
        Check.Level(level, nameof(level));
        return NemenyiQ(methods, level) * Math.Sqrt(methods * (methods + 1.0) / (6.0 * blocks));
    }

    /// <summary>The same for comparing k-1 methods with one control.</summary>
    /// <param name="methods">Methods k with the control, at least 2.</param>
    /// <param name="blocks">Data sets N, at least 2.</param>
    /// <param name="level">Level of the family, strictly between 0 and 1.</param>
    /// <returns>The critical difference.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain.</exception>
    /// <remarks>Source: Dunn 1961 after Demšar 2006.</remarks>
    public static double BonferroniDunnCriticalDifference(int methods, int blocks, double level = 0.05)
    {
        CheckSize(methods, blocks);
        Check.Level(level, nameof(level));
        return Normal.UpperQuantile(0.5 * level / (methods - 1)) * Math.Sqrt(methods * (methods + 1.0) / (6.0 * blocks));
    }

    internal static double NemenyiQ(int methods, double level) => NormalRange.UpperQuantile(level, methods) / Math.Sqrt(2);

    private static FriedmanResult Finish(int n, int k, double[] sums, double squares)
    {
        double centre = n * k * (k + 1.0) * (k + 1.0) / 4, between = 0;
        double[] means = new double[k];
        for (int j = 0; j < k; j++)
        {
            double off = sums[j] - n * (k + 1.0) / 2;
            between += off * off;
            means[j] = sums[j] / n;
        }

        double spread = squares - centre;
        bool degenerate = spread <= 1e-12 * centre;
        double chi = degenerate ? 0 : (k - 1) * between / spread;
        double most = n * (k - 1.0);
        bool unanimous = !degenerate && most - chi <= 1e-12 * most;
        double f = unanimous ? double.PositiveInfinity : (n - 1) * chi / (most - chi);
        double[,] pairs = new double[k, k];
        double scale = Math.Sqrt(2) / Math.Sqrt(k * (k + 1.0) / (6.0 * n));
        for (int i = 0; i < k; i++)
        {
            pairs[i, i] = 1;
            for (int j = 0; j < i; j++)
                pairs[i, j] = pairs[j, i] = NormalRange.Upper(Math.Abs(means[i] - means[j]) * scale, k);
        }

        return new FriedmanResult(
            n, means, chi, degenerate ? 1 : ChiSquare.Upper(chi, k - 1), f, degenerate ? 1 : FisherF.Upper(f, k - 1, (k - 1.0) * (n - 1)),
            chi / most, pairs, degenerate);
    }

    private static void CheckSize(int methods, int blocks)
    {
        Check.AtLeast((long)methods, 2, nameof(methods));
        Check.AtLeast((long)blocks, 2, nameof(blocks));
    }
}
