namespace Tare;

/// <summary>Log-gamma and the parts of Loader's saddle-point form of the binomial law.</summary>
internal static class Gamma
{
    private const double HalfLogTwoPi = 0.91893853320467274178;

    private static readonly double[] Lanczos =
    {
        0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
        12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
    };

    /// <summary>log Gamma(x) for x > 0: Stirling's series from 15 up, Lanczos' approximation (g = 7, nine terms) below.</summary>
    public static double Log(double x)
    {
        if (x >= 15)
            return (x - 0.5) * Math.Log(x) - x + HalfLogTwoPi + StirlingTail(x);
        if (x < 0.5)
            return Log(x + 1) - Math.Log(x);
        double sum = Lanczos[0], shifted = x - 1;
        for (int i = 1; i < Lanczos.Length; i++)
            sum += Lanczos[i] / (shifted + i);
        double t = shifted + 7.5;
        return HalfLogTwoPi + (shifted + 0.5) * Math.Log(t) - t + Math.Log(sum);
    }

    /// <summary>log Gamma(x+1) minus Stirling's main part (x+1/2) log x - x + log(2 pi)/2, for x > 0.</summary>
    /// <remarks>Source: Loader 2000, Fast and accurate computation of binomial probabilities.</remarks>
    public static double StirlingError(double x) =>
        x >= 15 ? StirlingTail(x) : Log(x + 1) - (x + 0.5) * Math.Log(x) + x - HalfLogTwoPi;

    /// <summary>Deviance part x log(x/m) + m - x without cancellation near x = m; m > 0, x >= 0.</summary>
    /// <remarks>Source: Loader 2000.</remarks>
    public static double Deviance(double x, double m)
    {
        if (x == 0)
            return m;
        double difference = x - m;
        if (Math.Abs(difference) < 0.1 * (x + m))
        {
            double v = difference / (x + m);
            double sum = difference * v;
            double term = 2 * x * v;
            double square = v * v;
            for (int j = 1; j < 1000; j++)
            {
                term *= square;
                double next = sum + term / (2 * j + 1);
                if (next == sum)
                    break;
                sum = next;
            }

            return sum;
        }

        return x * Math.Log(x / m) - difference;
    }

    // Stirling's series; at 15 the first omitted term is below 1e-17.
    private static double StirlingTail(double x)
    {
        double s = 1 / (x * x);
        return (1.0 / 12 - s * (1.0 / 360 - s * (1.0 / 1260 - s * (1.0 / 1680 - s * (1.0 / 1188 - s * (691.0 / 360360 - s / 156)))))) / x;
    }
}
