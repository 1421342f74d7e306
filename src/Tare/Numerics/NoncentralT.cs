namespace Tare;

/// <summary>Noncentral t law, for planning: by integrating the normal tail over the law of the sample standard deviation.</summary>
internal static class NoncentralT
{
    /// <summary>P(T > t) for df >= 1 and noncentrality delta.</summary>
    public static double Upper(double t, double df, double delta)
    {
        // s = sample sd / sd: density 2 (df/2)^(df/2) / Gamma(df/2) s^(df-1) exp(-df s²/2).
        double logScale = Math.Log(2) + 0.5 * df * Math.Log(0.5 * df) - Gamma.Log(0.5 * df);
        double width = 12 / Math.Sqrt(2 * df);
        double from = Math.Max(0, 1 - width), to = 1 + width + 12 / df;
        return GaussLegendre.Integrate(
            s => s <= 0 ? 0 : Math.Exp(logScale + (df - 1) * Math.Log(s) - 0.5 * df * s * s) * Normal.Upper(t * s - delta),
            from,
            to,
            24);
    }
}
