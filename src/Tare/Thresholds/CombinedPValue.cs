namespace Tare;

/// <summary>One p-value for the claim that at least one of K null hypotheses is false, from the K p-values.</summary>
/// <remarks>Each takes at least one p-value between 0 and 1 in any order; none, or one outside [0,1], is an <see cref="ArgumentException"/>.</remarks>
public static class CombinedPValue
{
    /// <summary>Fisher's method, for independent tests: -2 times the sum of logarithms on 2K degrees of freedom.</summary>
    /// <param name="pValues">The p-values.</param>
    /// <returns>A p-value; 0 when one is 0.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Fisher 1932, Statistical methods for research workers, 4th edition.</remarks>
    public static double Fisher(ReadOnlySpan<double> pValues)
    {
        Check.PValues(pValues, nameof(pValues));
        double sum = 0;
        foreach (double p in pValues)
            sum -= 2 * Math.Log(p);
        return ChiSquare.Upper(sum, 2.0 * pValues.Length);
    }

    /// <summary>Stouffer's method, for independent tests: the sum of normal quantiles over the root of K.</summary>
    /// <param name="pValues">The p-values; 0 and 1 must not both be among them.</param>
    /// <returns>A p-value.</returns>
    /// <exception cref="ArgumentException">No p-values, one outside [0,1], or both 0 and 1 among them.</exception>
    /// <remarks>Source: Stouffer and others 1949, The American soldier.</remarks>
    public static double Stouffer(ReadOnlySpan<double> pValues)
    {
        Check.PValues(pValues, nameof(pValues));
        double sum = 0;
        bool zero = false, one = false;
        foreach (double p in pValues)
        {
            zero |= p == 0;
            one |= p == 1;
            if (p > 0 && p < 1)
                sum += Normal.UpperQuantile(p);
        }

        if (zero && one)
            throw new ArgumentException("'pValues' holds both 0 and 1; their normal quantiles do not add up.", nameof(pValues));
        return zero ? 0 : one ? 1 : Normal.Upper(sum / Math.Sqrt(pValues.Length));
    }

    /// <summary>Simes' method, for independent or positively dependent tests: the least of K p(i)/i.</summary>
    /// <param name="pValues">The p-values.</param>
    /// <returns>A p-value.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Simes 1986, An improved Bonferroni procedure for multiple tests of significance, Biometrika 73.</remarks>
    public static double Simes(ReadOnlySpan<double> pValues)
    {
        Check.PValues(pValues, nameof(pValues));
        double[] sorted = pValues.ToArray();
        Array.Sort(sorted);
        double least = 1;
        for (int i = 0; i < sorted.Length; i++)
            least = Math.Min(least, sorted[i] * sorted.Length / (i + 1));
        return least;
    }

    /// <summary>Tippett's method, for independent tests: the smallest p-value after Šidák.</summary>
    /// <param name="pValues">The p-values.</param>
    /// <returns>A p-value.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Tippett 1931, The methods of statistics.</remarks>
    public static double Tippett(ReadOnlySpan<double> pValues)
    {
        Check.PValues(pValues, nameof(pValues));
        double least = 1;
        foreach (double p in pValues)
            least = Math.Min(least, p);
        return Thresholds.FamilyWiseErrorRate(least, pValues.Length);
    }

    /// <summary>Cauchy combination: holds its level nearly, in the tail, whatever the dependence.</summary>
    /// <param name="pValues">The p-values; 0 and 1 must not both be among them.</param>
    /// <returns>A p-value.</returns>
    /// <exception cref="ArgumentException">No p-values, one outside [0,1], or both 0 and 1 among them.</exception>
    /// <remarks>Source: Liu and Xie 2020, Cauchy combination test, JASA 115.</remarks>
    public static double Cauchy(ReadOnlySpan<double> pValues)
    {
        Check.PValues(pValues, nameof(pValues));
        double sum = 0;
        bool zero = false, one = false;
        foreach (double p in pValues)
        {
            zero |= p == 0;
            one |= p == 1;
            // cot(pi p); for tiny p its leading term, since the tangent would lose it.
            if (p > 0 && p < 1)
                sum += p < 1e-15 ? 1 / (p * Math.PI) : 1 / Math.Tan(Math.PI * p);
        }

        if (zero && one)
            throw new ArgumentException("'pValues' holds both 0 and 1; their Cauchy quantiles do not add up.", nameof(pValues));
        double mean = sum / pValues.Length;
        return zero ? 0 : one ? 1 : mean > 0 ? Math.Atan(1 / mean) / Math.PI : 0.5 - Math.Atan(mean) / Math.PI;
    }

    /// <summary>Twice the mean: a p-value whatever the dependence.</summary>
    /// <param name="pValues">The p-values.</param>
    /// <returns>A p-value.</returns>
    /// <exception cref="ArgumentException">No p-values, or one outside [0,1].</exception>
    /// <remarks>Source: Rüschendorf 1982, Random variables with maximum sums, Adv. Appl. Probab. 14.</remarks>
    public static double TwiceMean(ReadOnlySpan<double> pValues)
    {
        Check.PValues(pValues, nameof(pValues));
        double sum = 0;
        foreach (double p in pValues)
            sum += p;
        return Math.Min(1, 2 * sum / pValues.Length);
    }
}
