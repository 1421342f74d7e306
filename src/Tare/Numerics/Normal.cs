namespace Tare;

/// <summary>Standard normal law: tails to the end of the double range, and quantiles.</summary>
internal static class Normal
{
    private const double HalfLogTwoPi = 0.91893853320467274178;

    public static double LogDensity(double z) => -0.5 * z * z - HalfLogTwoPi;

    /// <summary>P(Z &lt;= z).</summary>
    public static double Cdf(double z) => Upper(-z);

    /// <summary>P(Z > z).</summary>
    public static double Upper(double z)
    {
        if (z < 0)
            return 1 - Upper(-z);
        return z < 2 ? 0.5 - LowerPart(z) : Density(z) * MillsRatio(z);
    }

    /// <summary>log P(Z > z).</summary>
    public static double LogUpper(double z)
    {
        if (z < 0)
            return Stable.Log1p(-Upper(-z));
        return z < 2 ? Math.Log(Upper(z)) : LogDensity(z) + Math.Log(MillsRatio(z));
    }

    /// <summary>z with P(Z > z) = p, for p strictly between 0 and 1; Newton's method on the logarithm of the tail.</summary>
    public static double UpperQuantile(double p)
    {
        if (p > 0.5)
            return -UpperQuantile(1 - p);
        double target = Math.Log(p);
        // Below this start the log tail is concave and Newton's steps come from one side.
        double z = Math.Sqrt(Math.Max(0, -2 * (target + Math.Log(2)))) * 0.9;
        for (int step = 0; step < 60; step++)
        {
            double log = LogUpper(z);
            double hazard = Math.Exp(LogDensity(z) - log);
            double move = (log - target) / hazard;
            z += move;
            if (Math.Abs(move) <= 1e-15 * Math.Max(1, Math.Abs(z)))
                break;
        }

        return z;
    }

    // exp(-z²/2) with the square split, since its rounding error would cost digits in the far tail.
    private static double Density(double z)
    {
        double high = Math.Round(z * 1024) / 1024;
        double low = z - high;
        return Math.Exp(-0.5 * high * high) * Math.Exp(-low * (z + high) * 0.5) * 0.39894228040143267794;
    }

    // P(0 < Z < z) = density * (z + z³/3 + z⁵/(3·5) + ...), all terms positive (Abramowitz and Stegun 26.2.11).
    private static double LowerPart(double z)
    {
        double term = z, sum = z, square = z * z;
        for (int k = 3; k < 400; k += 2)
        {
            term *= square / k;
            double next = sum + term;
            if (next == sum)
                break;
            sum = next;
        }

        return Density(z) * sum;
    }

    // Upper tail over density: 1/(z+1/(z+2/(z+3/(z+...)))) (Abramowitz and Stegun 26.2.14), evaluated from the far end.
    private static double MillsRatio(double z)
    {
        int terms = (int)(9 + 460 / (z * z));
        double tail = z;
        for (int k = terms; k >= 1; k--)
            tail = z + k / tail;
        return 1 / tail;
    }
}
