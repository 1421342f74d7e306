namespace Tare;

/// <summary>Range of k independent standard normals: the studentized range law with infinite degrees of freedom.</summary>
internal static class NormalRange
{
    /// <summary>P(range > q) for k >= 2, q >= 0.</summary>
    /// <remarks>
    /// k times the integral over the largest value z of density(z) times P(some other lies below z-q), the latter formed without
    /// cancellation.
    /// </remarks>
    public static double Upper(double q, int k)
    {
        if (q <= 0)
            return 1;
        double sum = GaussLegendre.Integrate(
            z =>
            {
                double below = Normal.Cdf(z), outside = Normal.Cdf(z - q);
                if (below == 0)
                    return 0;
                double others = Math.Pow(below, k - 1) * -Stable.Expm1((k - 1) * Stable.Log1p(-Math.Min(1, outside / below)));
                return Math.Exp(Normal.LogDensity(z)) * others;
            },
            -9,
            q / 2 + 12,
            40);
        return Math.Min(1, k * sum);
    }

    /// <summary>q with P(range > q) = level.</summary>
    public static double UpperQuantile(double level, int k)
    {
        double high = 8;
        while (Upper(high, k) > level && high < 80)
            high *= 1.5;
        return Root.Find(q => Math.Log(Upper(q, k) / level), 1e-9, high, 1e-14);
    }
}
