namespace Tare;

/// <summary>F law through the incomplete beta function.</summary>
internal static class FisherF
{
    /// <summary>P(F > f) and P(F &lt;= f) for f >= 0.</summary>
    public static Tails Tails(double f, double df1, double df2)
    {
        if (f <= 0)
            return new Tails(0, 1, double.NegativeInfinity, 0);
        if (double.IsPositiveInfinity(f))
            return new Tails(1, 0, 0, double.NegativeInfinity);
        double ratio = df1 * f / df2;
        return Beta.Tails(ratio / (1 + ratio), 1 / (1 + ratio), 0.5 * df1, 0.5 * df2);
    }

    public static double Upper(double f, double df1, double df2) => Tails(f, df1, df2).Upper;
}
