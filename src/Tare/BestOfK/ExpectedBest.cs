namespace Tare;

/// <summary>Expected best score after trying k candidates, from the scores of N that were tried: puts results of unequal search budgets side by side.</summary>
public static class ExpectedBest
{
    /// <summary>k draws with replacement.</summary>
    /// <param name="scores">Validation scores of the N candidates tried, at least one, all finite; higher is better.</param>
    /// <param name="k">Number of draws, at least 1.</param>
    /// <returns>The expected maximum.</returns>
    /// <exception cref="ArgumentException">No scores, one that is not finite, or k below 1.</exception>
    /// <remarks>Source: Dodge, Gururangan, Card, Schwartz and Smith 2019, Show your work: improved reporting of experimental results, EMNLP.</remarks>
    public static double WithReplacement(ReadOnlySpan<double> scores, long k)
    {
        double[] sorted = Sorted(scores, k);
        double n = sorted.Length, below = 0, sum = 0;
        for (int i = 0; i < sorted.Length; i++)
        {
            double upTo = Math.Pow((i + 1) / n, k);
            sum += sorted[i] * (upTo - below);
            below = upTo;
        }

        return sum;
    }

    /// <summary>k draws without replacement: the unbiased form.</summary>
    /// <param name="scores">Validation scores of the N candidates tried, at least one, all finite; higher is better.</param>
    /// <param name="k">Number of draws, 1 to N.</param>
    /// <returns>The expected maximum.</returns>
    /// <exception cref="ArgumentException">No scores, one that is not finite, or k outside 1 to N.</exception>
    /// <remarks>Source: Tang, Lee, Xin, Liu, Yu and Lin 2020, Showing your work doesn't always work, ACL.</remarks>
    public static double WithoutReplacement(ReadOnlySpan<double> scores, long k)
    {
        double[] sorted = Sorted(scores, k);
        int n = sorted.Length;
        if (k > n)
            throw Check.OutOfRange(nameof(k), k, $"must be at most the number of scores, {n}");
        // Weight of the i-th largest: k/n times the chance that the other k-1 draws lie below it, built by ratios.
        double weight = (double)k / n, sum = 0;
        for (int i = n - 1; i >= k - 1; i--)
        {
            sum += sorted[i] * weight;
            if (i > 0)
                weight *= (i - k + 1.0) / i;
        }

        return sum;
    }

    private static double[] Sorted(ReadOnlySpan<double> scores, long k)
    {
        if (scores.IsEmpty)
            throw new ArgumentException("'scores' is empty.", nameof(scores));
        Check.AtLeast(k, 1, nameof(k));
        for (int i = 0; i < scores.Length; i++)
            Check.FiniteRow(scores[i], i, nameof(scores));
        double[] sorted = scores.ToArray();
        Array.Sort(sorted);
        return sorted;
    }
}
