namespace Tare;

/// <summary>Regularised incomplete beta function, both tails and their logarithms, and its inverse.</summary>
/// <remarks>
/// Continued fraction of DiDonato and Morris 1992 (Significant digit computation of the incomplete beta function ratios, ACM
/// TOMS 18) by Lentz's method, with the prefactor from Loader's deviance form, so that
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
        if (a * y > b * x)
        {
            double log = kernel - Math.Log(Fraction(x, y, a, b));
            double small = Math.Min(1, Math.Exp(log));
            return new Tails(small, 1 - small, log, Stable.Log1p(-small));
        }
        else
        {
            double log = kernel - Math.Log(Fraction(y, x, b, a));
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
            double move = slope > 0 ? (useLower ? -gap : gap) / slope : double.NaN;
            double smallest = 1e-15 * Math.Max(1, Math.Abs(at));
            if (Math.Abs(move) <= smallest || high - low <= smallest)
                return at;
            double next = at + move;
            if (!(next > low && next < high))
                next = 0.5 * (low + high);
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

    // The fraction F in I_x(a,b) = x^a y^b / B(a,b) / F. The combination a*y - b*x is formed once, so that no digits are lost
    // where x lies near the mean and a or b is large.
    private static double Fraction(double x, double y, double a, double b)
    {
        const double tiny = 1e-300;
        double lambda = a * y - b * x;
        double f = a * (lambda + 1) / (a + 1);
        if (Math.Abs(f) < tiny)
            f = tiny;
        double c = f, d = 0;
        for (int m = 1; m <= 1_000_000; m++)
        {
            double odd = a + 2.0 * m - 1;
            double numerator = (a + m - 1) / odd * ((a + b + m - 1) / odd) * m * (b - m) * x * x;
            double denominator = m + m * (b - m) * x / odd + (a + m) * (lambda + 1 + m * (1 + y)) / (odd + 2);
            d = denominator + numerator * d;
            c = denominator + numerator / c;
            d = 1 / (Math.Abs(d) < tiny ? tiny : d);
            c = Math.Abs(c) < tiny ? tiny : c;
            double step = c * d;
            f *= step;
            if (Math.Abs(step - 1) < 2e-16)
                break;
        }

        return f;
    }
}
