namespace Tare;

/// <summary>Wilcoxon's signed-rank test on paired differences. It assumes independent pairs and differences that are symmetric when there is no effect.</summary>
public static class WilcoxonTest
{
    /// <summary>Up to so many non-zero differences the law is exact (under a second); beyond, the normal approximation with continuity correction takes over.</summary>
    public const int ExactUpTo = 1000;

    /// <summary>Exact test, with ties by midranks: the law of the midranks themselves, by dynamic programming.</summary>
    /// <param name="differences">One difference a pair, at least one, all finite.</param>
    /// <param name="side"><see cref="Side.Greater"/>: differences lie above zero. Two-sided: twice the smaller tail, at most 1.</param>
    /// <param name="zeros">What happens to differences of exactly zero.</param>
    /// <returns>W+ (sum of the positive differences' ranks) and the p-value; 1 and degenerate when all differences are zero. Above <see cref="ExactUpTo"/> non-zero differences the result is <see cref="Normal"/>'s.</returns>
    /// <exception cref="ArgumentException">No differences, or one that is not finite.</exception>
    /// <remarks>Sources: Wilcoxon 1945, Individual comparisons by ranking methods, Biometrics Bulletin 1; Pratt 1959, Remarks on zeros and ties in the Wilcoxon signed rank procedures, JASA 54.</remarks>
    public static TestResult Exact(ReadOnlySpan<double> differences, Side side = Side.TwoSided, ZeroDifferences zeros = ZeroDifferences.Drop)
    {
        (double[] ranks, double plus) = SignedRanks(differences, side, zeros);
        if (ranks.Length == 0)
            return new TestResult("Wilcoxon signed-rank test (exact)", 0, 1, side, Degenerate: true);
        if (ranks.Length > ExactUpTo)
            return NormalOf(ranks, plus, side, continuity: true);
        // Twice the midranks are whole numbers; law[w] is the probability that signs by coin give a doubled sum of w.
        int total = 0;
        int[] doubled = new int[ranks.Length];
        for (int i = 0; i < ranks.Length; i++)
            total += doubled[i] = (int)(2 * ranks[i]);
        double[] law = new double[total + 1];
        law[0] = 1;
        int reach = 0;
        foreach (int rank in doubled)
        {
            reach += rank;
            for (int w = reach; w >= rank; w--)
                law[w] = 0.5 * (law[w] + law[w - rank]);
            for (int w = rank - 1; w >= 0; w--)
                law[w] *= 0.5;
        }

        int seen = (int)(2 * plus);
        double less = 0, greater = 0;
        for (int w = 0; w <= seen; w++)
            less += law[w];
        for (int w = total; w >= seen; w--)
            greater += law[w];
        Tails tails = new(Math.Min(1, less), Math.Min(1, greater), 0, 0);
        return new TestResult("Wilcoxon signed-rank test (exact)", plus, TestResult.OfTails(tails, side), side);
    }

    /// <summary>Normal approximation with the variance of the midranks.</summary>
    /// <param name="differences">One difference a pair, at least one, all finite.</param>
    /// <param name="side"><see cref="Side.Greater"/>: differences lie above zero.</param>
    /// <param name="zeros">What happens to differences of exactly zero.</param>
    /// <param name="continuity">Whether half a rank is taken off the distance to the mean.</param>
    /// <returns>z and the p-value; 1 and degenerate when all differences are zero.</returns>
    /// <exception cref="ArgumentException">No differences, or one that is not finite.</exception>
    /// <remarks>Source: Hollander, Wolfe and Chicken 2014, Nonparametric statistical methods, section 3.1; as R's <c>wilcox.test(exact = FALSE)</c>.</remarks>
    public static TestResult Normal(
        ReadOnlySpan<double> differences, Side side = Side.TwoSided, ZeroDifferences zeros = ZeroDifferences.Drop, bool continuity = true)
    {
        (double[] ranks, double plus) = SignedRanks(differences, side, zeros);
        return ranks.Length == 0
            ? new TestResult("Wilcoxon signed-rank test (normal approximation)", 0, 1, side, Degenerate: true)
            : NormalOf(ranks, plus, side, continuity);
    }

    private static TestResult NormalOf(double[] ranks, double plus, Side side, bool continuity)
    {
        double mean = 0, variance = 0;
        foreach (double rank in ranks)
        {
            mean += 0.5 * rank;
            variance += 0.25 * rank * rank;
        }

        double distance = plus - mean;
        if (continuity)
            distance -= side switch { Side.Greater => 0.5, Side.Less => -0.5, _ => 0.5 * Math.Sign(distance) };
        double z = distance / Math.Sqrt(variance);
        Tails tails = new(Tare.Normal.Cdf(z), Tare.Normal.Upper(z), 0, 0);
        return new TestResult("Wilcoxon signed-rank test (normal approximation)", z, TestResult.OfTails(tails, side), side);
    }

    private static (double[] Ranks, double Plus) SignedRanks(ReadOnlySpan<double> differences, Side side, ZeroDifferences zeros)
    {
        if (differences.IsEmpty)
            throw Check.Empty(nameof(differences));
        if (side is not (Side.TwoSided or Side.Greater or Side.Less))
            throw Check.OutOfRange(nameof(side), side, "is no side");
        if (zeros is not (ZeroDifferences.Drop or ZeroDifferences.Pratt))
            throw Check.OutOfRange(nameof(zeros), zeros, "is no way to treat zeros");
        List<double> kept = new(differences.Length);
        for (int i = 0; i < differences.Length; i++)
        {
            Check.FiniteRow(differences[i], i, nameof(differences));
            if (differences[i] != 0 || zeros == ZeroDifferences.Pratt)
                kept.Add(differences[i]);
        }

        double[] sizes = new double[kept.Count];
        for (int i = 0; i < sizes.Length; i++)
            sizes[i] = Math.Abs(kept[i]);
        double[] all = Ranks.Mid(sizes);
        List<double> ranks = new(all.Length);
        double plus = 0;
        for (int i = 0; i < all.Length; i++)
        {
            if (kept[i] == 0)
                continue;
            ranks.Add(all[i]);
            if (kept[i] > 0)
                plus += all[i];
        }

        return (ranks.ToArray(), plus);
    }
}
