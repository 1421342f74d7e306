using System.Globalization;

namespace Tare.Tests.Validity;

/// <summary>
/// Size of the simulations. They run small by default; TARE_SIMULATION=20 makes them twenty times as long:
/// <c>TARE_SIMULATION=20 dotnet test tests/Tare.Tests --filter Category=Simulation</c>.
/// </summary>
internal static class Simulation
{
    public static readonly int Scale = int.TryParse(Environment.GetEnvironmentVariable("TARE_SIMULATION"), NumberStyles.None, CultureInfo.InvariantCulture, out int scale) ? scale : 1;

    /// <summary>Share of runs in which something happens, run in parallel, each with a source of its own.</summary>
    public static double Share(int runs, Func<Random, bool> happens)
    {
        int count = 0;
        Parallel.For(0, runs, run =>
        {
            if (happens(new Random(run + 1)))
                Interlocked.Increment(ref count);
        });
        return count / (double)runs;
    }

    /// <summary>Mean over runs.</summary>
    public static double Mean(int runs, Func<Random, double> value)
    {
        double[] values = new double[runs];
        Parallel.For(0, runs, run => values[run] = value(new Random(run + 1)));
        return values.Average();
    }

    /// <summary>Three standard errors of a share.</summary>
    public static double Slack(double share, int runs) => 3 * Math.Sqrt(share * (1 - share) / runs);

    public static double Gaussian(Random random) => Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());

    /// <summary>K standard normals: independent, sharing half their variance, or in opposite pairs.</summary>
    public static double[] Scores(Random random, int k, string dependence)
    {
        double[] z = new double[k];
        double common = Gaussian(random);
        for (int j = 0; j < k; j++)
        {
            z[j] = dependence switch
            {
                "independent" => Gaussian(random),
                "positive" => Math.Sqrt(0.5) * (common + Gaussian(random)),
                _ => j % 2 == 1 ? -z[j - 1] : Gaussian(random),
            };
        }

        return z;
    }
}
