namespace Tare;

/// <summary>Binomial law: probabilities and tails, each computed from its own side.</summary>
internal static class Binomial
{
    private const double HalfLogTwoPi = 0.91893853320467274178;

    /// <summary>log P(X = k).</summary>
    /// <remarks>Source: Loader 2000, Fast and accurate computation of binomial probabilities.</remarks>
    public static double LogPmf(long k, long n, double p)
    {
        if (k < 0 || k > n)
            return double.NegativeInfinity;
        if (p == 0)
            return k == 0 ? 0 : double.NegativeInfinity;
        if (p == 1)
            return k == n ? 0 : double.NegativeInfinity;
        double q = 1 - p;
        if (k == 0)
            return n * Stable.Log1p(-p);
        if (k == n)
            return n * Math.Log(p);
        double left = n - k;
        return Gamma.StirlingError(n) - Gamma.StirlingError(k) - Gamma.StirlingError(left)
            - Gamma.Deviance(k, n * p) - Gamma.Deviance(left, n * q)
            + 0.5 * (Math.Log((double)n / k) - Math.Log(left)) - HalfLogTwoPi;
    }

    public static double Pmf(long k, long n, double p) => Math.Exp(LogPmf(k, n, p));

    /// <summary>P(X &lt;= k).</summary>
    public static double AtMost(long k, long n, double p)
    {
        if (k < 0)
            return 0;
        if (k >= n || p == 0)
            return 1;
        if (p == 1)
            return 0;
        if (k == 0)
            return Math.Exp(n * Stable.Log1p(-p));
        return Beta.Tails(p, 1 - p, k + 1, n - k).Upper;
    }

    /// <summary>P(X >= k).</summary>
    public static double AtLeast(long k, long n, double p)
    {
        if (k <= 0)
            return 1;
        if (k > n || p == 0)
            return 0;
        if (p == 1)
            return 1;
        if (k == n)
            return Math.Pow(p, n);
        return Beta.Tails(p, 1 - p, k, n - k + 1).Lower;
    }
}
