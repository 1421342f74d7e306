namespace Tare;

/// <summary>p-values adjusted for the size of their family: compare each with the family's level itself.</summary>
/// <remarks>
/// Each method takes one to about two thousand million p-values between 0 and 1 in any order, copies them, and answers in the
/// same order. Equal p-values get equal answers, and no answer exceeds 1. All but Hommel's cost one sort.
/// An empty list or a value outside [0,1] (NaN too) is an <see cref="ArgumentException"/> that names the place.
/// </remarks>
public static class AdjustedPValues
{
    /// <summary>min(1, K p): family-wise error under any dependence.</summary>
    /// <param name="pValues">The p-values of the whole family.</param>
    /// <returns>Adjusted p-values in input order.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Dunn 1961, JASA 56.</remarks>
    public static double[] Bonferroni(ReadOnlySpan<double> pValues)
    {
        Check.PValues(pValues, nameof(pValues));
        double[] adjusted = new double[pValues.Length];
        for (int i = 0; i < adjusted.Length; i++)
            adjusted[i] = Math.Min(1, pValues[i] * adjusted.Length);
        return adjusted;
    }

    /// <summary>1-(1-p)^K: family-wise error for independent or positively orthant dependent tests.</summary>
    /// <param name="pValues">The p-values of the whole family.</param>
    /// <returns>Adjusted p-values in input order.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Šidák 1967, JASA 62.</remarks>
    public static double[] Sidak(ReadOnlySpan<double> pValues)
    {
        Check.PValues(pValues, nameof(pValues));
        double[] adjusted = new double[pValues.Length];
        for (int i = 0; i < adjusted.Length; i++)
            adjusted[i] = SidakOf(pValues[i], adjusted.Length);
        return adjusted;
    }

    /// <summary>Step-down Bonferroni: family-wise error under any dependence, never weaker than Bonferroni.</summary>
    /// <param name="pValues">The p-values of the whole family.</param>
    /// <returns>Adjusted p-values in input order.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Holm 1979, A simple sequentially rejective multiple test procedure, Scand. J. Statist. 6.</remarks>
    public static double[] Holm(ReadOnlySpan<double> pValues) => StepDown(pValues, sidak: false);

    /// <summary>Step-down Šidák: family-wise error for independent or positively orthant dependent tests.</summary>
    /// <param name="pValues">The p-values of the whole family.</param>
    /// <returns>Adjusted p-values in input order.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Holland and Copenhaver 1987, An improved sequentially rejective Bonferroni test procedure, Biometrics 43.</remarks>
    public static double[] HolmSidak(ReadOnlySpan<double> pValues) => StepDown(pValues, sidak: true);

    /// <summary>Step-up Bonferroni: family-wise error where Simes' inequality holds (independent or positively dependent tests).</summary>
    /// <param name="pValues">The p-values of the whole family.</param>
    /// <returns>Adjusted p-values in input order.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Hochberg 1988, A sharper Bonferroni procedure for multiple tests of significance, Biometrika 75.</remarks>
    public static double[] Hochberg(ReadOnlySpan<double> pValues)
    {
        int n = pValues.Length;
        return StepUp(pValues, rank => n - rank + 1);
    }

    /// <summary>False discovery rate for independent or positively regression dependent tests.</summary>
    /// <param name="pValues">The p-values of the whole family.</param>
    /// <returns>Adjusted p-values in input order.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Benjamini and Hochberg 1995, Controlling the false discovery rate, JRSS B 57.</remarks>
    public static double[] BenjaminiHochberg(ReadOnlySpan<double> pValues)
    {
        double n = pValues.Length;
        return StepUp(pValues, rank => n / rank);
    }

    /// <summary>False discovery rate under any dependence.</summary>
    /// <param name="pValues">The p-values of the whole family.</param>
    /// <returns>Adjusted p-values in input order.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Benjamini and Yekutieli 2001, The control of the false discovery rate in multiple testing under dependency, Ann. Statist. 29.</remarks>
    public static double[] BenjaminiYekutieli(ReadOnlySpan<double> pValues)
    {
        double n = pValues.Length, harmonic = 0;
        for (int i = pValues.Length; i >= 1; i--)
            harmonic += 1.0 / i;
        return StepUp(pValues, rank => harmonic * n / rank);
    }

    /// <summary>Hommel's closed Simes procedure: family-wise error where Simes' inequality holds, at least as strong as Hochberg's. Costs K² steps.</summary>
    /// <param name="pValues">The p-values of the whole family.</param>
    /// <returns>Adjusted p-values in input order.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Sources: Hommel 1988, A stagewise rejective multiple test procedure, Biometrika 75; the algorithm is that of Wright 1992, Adjusted p-values for simultaneous inference, Biometrics 48.</remarks>
    public static double[] Hommel(ReadOnlySpan<double> pValues)
    {
        Check.PValues(pValues, nameof(pValues));
        int n = pValues.Length;
        (double[] p, int[] order) = Sorted(pValues);
        double start = 1;
        for (int i = 0; i < n; i++)
            start = Math.Min(start, n * p[i] / (i + 1));
        double[] q = new double[n], answer = new double[n];
        for (int i = 0; i < n; i++)
            q[i] = answer[i] = start;
        for (int m = n - 1; m >= 2; m--)
        {
            int split = n - m + 1;
            double least = double.PositiveInfinity;
            for (int j = split; j < n; j++)
                least = Math.Min(least, m * p[j] / (j - split + 2));
            for (int i = 0; i < split; i++)
                q[i] = Math.Min(m * p[i], least);
            for (int i = split; i < n; i++)
                q[i] = q[split - 1];
            for (int i = 0; i < n; i++)
                answer[i] = Math.Max(answer[i], q[i]);
        }

        for (int i = 0; i < n; i++)
            answer[i] = Math.Min(1, Math.Max(answer[i], p[i]));
        return InInputOrder(answer, order);
    }

    private static double[] StepDown(ReadOnlySpan<double> pValues, bool sidak)
    {
        Check.PValues(pValues, nameof(pValues));
        (double[] p, int[] order) = Sorted(pValues);
        double running = 0;
        for (int i = 0; i < p.Length; i++)
        {
            int left = p.Length - i;
            running = Math.Max(running, sidak ? SidakOf(p[i], left) : Math.Min(1, left * p[i]));
            p[i] = running;
        }

        return InInputOrder(p, order);
    }

    private static double[] StepUp(ReadOnlySpan<double> pValues, Func<int, double> factorOfRank)
    {
        Check.PValues(pValues, nameof(pValues));
        (double[] p, int[] order) = Sorted(pValues);
        double running = 1;
        for (int i = p.Length - 1; i >= 0; i--)
        {
            running = Math.Min(running, factorOfRank(i + 1) * p[i]);
            p[i] = running;
        }

        return InInputOrder(p, order);
    }

    private static double SidakOf(double p, double comparisons) => -Stable.Expm1(comparisons * Stable.Log1p(-p));

    private static (double[] Values, int[] Order) Sorted(ReadOnlySpan<double> pValues)
    {
        double[] values = pValues.ToArray();
        int[] order = new int[values.Length];
        for (int i = 0; i < order.Length; i++)
            order[i] = i;
        Array.Sort(values, order);
        return (values, order);
    }

    private static double[] InInputOrder(double[] sorted, int[] order)
    {
        double[] answer = new double[sorted.Length];
        for (int i = 0; i < order.Length; i++)
            answer[order[i]] = sorted[i];
        return answer;
    }
}
