namespace Tare;

/// <summary>Chi-square law through the incomplete gamma function: series below the mean, continued fraction above.</summary>
internal static class ChiSquare
{
    /// <summary>P(X > x) and P(X &lt;= x) for x >= 0 and df > 0.</summary>
    public static Tails Tails(double x, double df)
    {
        if (x <= 0)
            return new Tails(0, 1, double.NegativeInfinity, 0);
        if (double.IsPositiveInfinity(x))
            return new Tails(1, 0, 0, double.NegativeInfinity);
        double a = 0.5 * df, y = 0.5 * x;
        // y^a e^-y / Gamma(a+1) in Loader's deviance form.
        double kernel = -Gamma.StirlingError(a) - Gamma.Deviance(a, y) - 0.5 * Math.Log(2 * Math.PI * a);
        if (y < a + 1)
        {
            double log = kernel + Math.Log(Series(a, y));
            double small = Math.Min(1, Math.Exp(log));
            return new Tails(small, 1 - small, log, Stable.Log1p(-small));
        }
        else
        {
            double log = kernel + Math.Log(a) + Math.Log(Fraction(a, y));
            double small = Math.Min(1, Math.Exp(log));
            return new Tails(1 - small, small, Stable.Log1p(-small), log);
        }
    }

    public static double Upper(double x, double df) => Tails(x, df).Upper;

    private static double Series(double a, double y)
    {
        double term = 1, sum = 1;
        for (int n = 1; n < 1_000_000; n++)
        {
            term *= y / (a + n);
            double next = sum + term;
            if (next == sum)
                break;
            sum = next;
        }

        return sum;
    }

    // Lentz's method for Gamma(a,y) / (y^a e^-y).
    private static double Fraction(double a, double y)
    {
        double b = y + 1 - a, c = 1e300, d = 1 / b, f = d;
        for (int i = 1; i < 1_000_000; i++)
        {
            double an = -i * (i - a);
            b += 2;
            d = an * d + b;
            d = 1 / (Math.Abs(d) < 1e-300 ? 1e-300 : d);
            c = b + an / c;
            c = Math.Abs(c) < 1e-300 ? 1e-300 : c;
            double step = c * d;
            f *= step;
            if (Math.Abs(step - 1) < 2e-16)
                break;
        }

        return f;
    }
}
