namespace Tare;

/// <summary>Student's t law through the incomplete beta function.</summary>
internal static class StudentT
{
    /// <summary>P(T &lt;= t) and P(T > t) for df > 0.</summary>
    public static Tails Tails(double t, double df)
    {
        if (t < 0)
        {
            Tails mirrored = Tails(-t, df);
            return new Tails(mirrored.Upper, mirrored.Lower, mirrored.LogUpper, mirrored.LogLower);
        }

        if (double.IsPositiveInfinity(t))
            return new Tails(1, 0, 0, double.NegativeInfinity);
        // x = df/(df+t²), written through the ratio so that t² may overflow.
        double ratio = t / Math.Sqrt(df);
        double square = ratio * ratio;
        double x = 1 / (1 + square), y = square > 1e300 ? 1 : square / (1 + square);
        if (x == 0)
        {
            // Far tail of few degrees of freedom: only the leading power is left.
            double logTail = df * -Math.Log(ratio) - Math.Log(0.5 * df) - LogBeta(0.5 * df, 0.5) - Math.Log(2);
            double tail = Math.Exp(logTail);
            return new Tails(1 - tail, tail, Stable.Log1p(-tail), logTail);
        }

        Tails beta = Beta.Tails(x, y, 0.5 * df, 0.5);
        double upper = 0.5 * beta.Lower;
        return new Tails(1 - upper, upper, Stable.Log1p(-upper), beta.LogLower - Math.Log(2));
    }

    /// <summary>t with P(T > t) = p, for p strictly between 0 and 1.</summary>
    public static double UpperQuantile(double p, double df)
    {
        if (p > 0.5)
            return -UpperQuantile(1 - p, df);
        if (p == 0.5)
            return 0;
        // x/(1-x) = df/t², so the log-odds give t without forming 1-x.
        double logOdds = Beta.LogOddsOfQuantile(2 * p, 1 - 2 * p, 0.5 * df, 0.5);
        if (logOdds > -700)
            return Math.Exp(0.5 * (Math.Log(df) - logOdds));
        double logT = 0.5 * Math.Log(df) - (Math.Log(p) + Math.Log(df) + LogBeta(0.5 * df, 0.5)) / df;
        return Math.Exp(logT);
    }

    private static double LogBeta(double a, double b) => Gamma.Log(a) + Gamma.Log(b) - Gamma.Log(a + b);
}
