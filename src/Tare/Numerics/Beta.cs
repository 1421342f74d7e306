namespace Tare;

/// <summary>Regularised incomplete beta function, both tails and their logarithms, and its inverse.</summary>
/// <remarks>
/// Continued fraction (Abramowitz and Stegun 26.5.8) by Lentz's method, with the prefactor from Loader's deviance form, so that
/// digits survive for a and b of a million. The small tail is always computed directly.
/// </remarks>
internal static class Beta
{
    private const double HalfLogTwoPi = 0.91893853320467274178;

    /// <summary>log of x^a y^b / B(a,b), with y = 1-x given by the caller so that it keeps its digits.</summary>
    public static double LogKernel(double x, double y, double a, double b)
    {
        double n = a + b;
        return Gamma.StirlingError(n) - Gamma.StirlingError(a) - Gamma.StirlingError(b)
            - Gamma.Deviance(a, n * x) - Gamma.Deviance(b, n * y)
            + 0.5 * (Math.Log(a) + Math.Log(b / n)) - HalfLogTwoPi;
    }

    /// <summary>I_x(a,b) and 1-I_x(a,b) with their logarithms.</summary>
    public static Tails Tails(double x, double y, double a, double b)
    {
        if (x <= 0)
            return new Tails(0, 1, double.NegativeInfinity, 0);
        if (y <= 0)
            return new Tails(1, 0, 0, double.NegativeInfinity);
        double kernel = LogKernel(x, y, a, b);
        if (x < (a + 1) / (a + b + 2))
        {
            double log = kernel - Math.Log(a) + Math.Log(Fraction(x, a, b));
            double small = Math.Min(1, Math.Exp(log));
            return new Tails(small, 1 - small, log, Stable.Log1p(-small));
        }
        else
        {
            double log = kernel - Math.Log(b) + Math.Log(Fraction(y, b, a));
            double small = Math.Min(1, Math.Exp(log));
            return new Tails(1 - small, small, Stable.Log1p(-small), log);
        }
    }

    /// <summary>
    /// The point where the lower tail is <paramref name="lower"/> (and the upper one <paramref name="upper"/> = 1-lower), as its
    /// log-odds log(x/(1-x)), which keeps digits at both ends. Both tails lie strictly between 0 and 1.
    /// </summary>
    public static double LogOddsOfQuantile(double lower, double upper, double a, double b)
    {
        bool useLower = lower <= upper;
        double target = Math.Log(useLower ? lower : upper);
        double low = -746, high = 746;
        double at = Math.Log(a / b);
        at = Math.Min(700, Math.Max(-700, at));
        for (int step = 0; step < 300; step++)
        {
            (double x, double y) = FromLogOdds(at);
            Tails tails = Tails(x, y, a, b);
            double log = useLower ? tails.LogLower : tails.LogUpper;
            double gap = log - target;
            // The lower tail grows with the log-odds, the upper one shrinks.
            if (useLower == gap < 0)
                low = at;
            else
                high = at;
            // d log tail / d log-odds = +-(x^a y^b / B) / tail.
            double slope = Math.Exp(LogKernel(x, y, a, b) - log);
            double next = slope > 0 ? at - (useLower ? gap : -gap) / slope : double.NaN;
            if (!(next > low && next < high))
                next = 0.5 * (low + high);
            if (Math.Abs(next - at) <= 1e-15 * Math.Max(1, Math.Abs(at)) || gap == 0)
                return next;
            at = next;
        }

        return at;
    }

    /// <summary>The quantile itself: x with I_x(a,b) = lower.</summary>
    public static double Quantile(double lower, double upper, double a, double b) =>
        FromLogOdds(LogOddsOfQuantile(lower, upper, a, b)).X;

    public static (double X, double Y) FromLogOdds(double t)
    {
        double e = Math.Exp(-Math.Abs(t));
        double small = e / (1 + e), large = 1 / (1 + e);
        return t < 0 ? (small, large) : (large, small);
    }

    // The fraction F in I_x(a,b) = x^a y^b / (a B(a,b)) * F.
    private static double Fraction(double x, double a, double b)
    {
        const double tiny = 1e-300;
        double c = 1, d = 1 - (a + b) * x / (a + 1);
        if (Math.Abs(d) < tiny)
            d = tiny;
        d = 1 / d;
        double f = d;
        for (int m = 1; m <= 1_000_000; m++)
        {
            double even = m * (b - m) * x / ((a + 2 * m - 1) * (a + 2 * m));
            d = 1 + even * d;
            c = 1 + even / c;
            d = 1 / (Math.Abs(d) < tiny ? tiny : d);
            c = Math.Abs(c) < tiny ? tiny : c;
            f *= d * c;
            double odd = -(a + m) * (a + b + m) * x / ((a + 2 * m) * (a + 2 * m + 1));
            d = 1 + odd * d;
            c = 1 + odd / c;
            d = 1 / (Math.Abs(d) < tiny ? tiny : d);
            c = Math.Abs(c) < tiny ? tiny : c;
            double step = d * c;
            f *= step;
            if (Math.Abs(step - 1) < 2e-16)
                break;
        }

        return f;
    }
}
