namespace Tare;

/// <summary>Centred Laplace law.</summary>
internal static class Laplace
{
    /// <summary>Inverse of the distribution function, for u strictly between 0 and 1.</summary>
    public static double Quantile(double u, double scale) =>
        u < 0.5 ? scale * Math.Log(2 * u) : -scale * Math.Log(2 * (1 - u));
}
