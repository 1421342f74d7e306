using Xunit.Abstractions;

namespace Tare.Tests.Validity;

/// <summary>Coverage of intervals and error of approximate tests. Coverage of a proportion needs no simulation: it is summed over the binomial law.</summary>
[Trait("Category", "Simulation")]
public class CoverageTests(ITestOutputHelper output)
{
    /// <summary>Least and mean coverage at 95 % over proportions 0.01 to 0.99; the figures are published in the methods' remarks.</summary>
    [Theory]
    [InlineData("Clopper-Pearson", 20, 0.958, 0.976)]
    [InlineData("Clopper-Pearson", 200, 0.952, 0.961)]
    [InlineData("Wilson", 20, 0.912, 0.954)]
    [InlineData("Wilson", 200, 0.933, 0.950)]
    [InlineData("Jeffreys", 20, 0.896, 0.951)]
    [InlineData("Jeffreys", 200, 0.919, 0.949)]
    [InlineData("mid-p", 20, 0.929, 0.961)]
    [InlineData("mid-p", 200, 0.919, 0.950)]
    [InlineData("Agresti-Coull", 20, 0.929, 0.962)]
    [InlineData("Agresti-Coull", 200, 0.942, 0.952)]
    public void Coverage_of_a_proportion(string method, int rows, double least, double mean)
    {
        Interval[] intervals = [.. Enumerable.Range(0, rows + 1).Select(x => method switch
        {
            "Clopper-Pearson" => ProportionInterval.ClopperPearson(x, rows),
            "Wilson" => ProportionInterval.Wilson(x, rows),
            "Jeffreys" => ProportionInterval.Jeffreys(x, rows),
            "mid-p" => ProportionInterval.MidP(x, rows),
            _ => ProportionInterval.AgrestiCoull(x, rows),
        })];
        double[] coverage = [.. Enumerable.Range(2, 197).Select(i => i / 200.0).Select(p =>
            Enumerable.Range(0, rows + 1).Where(x => intervals[x].Lower <= p && p <= intervals[x].Upper).Sum(x => Binomial.Pmf(x, rows, p)))];
        output.WriteLine($"{method}, {rows} rows: least {coverage.Min():F3}, mean {coverage.Average():F3}");
        Assert.Equal(least, coverage.Min(), 0.0006);
        Assert.Equal(mean, coverage.Average(), 0.0006);
    }

    /// <summary>Bootstrap intervals of the mean of 30 skewed (exponential) values: approximate, and a little short.</summary>
    [Fact]
    public void Coverage_of_the_bootstrap()
    {
        int runs = 1000 * Simulation.Scale;
        double corrected = 0, percentile = 0;
        object adding = new();
        Parallel.For(0, runs, run =>
        {
            Random random = new(run + 1);
            double[] values = [.. Enumerable.Range(0, 30).Select(_ => -Math.Log(1 - random.NextDouble()))];
            BootstrapResult got = Bootstrap.Of(30, rows =>
            {
                double sum = 0;
                foreach (int row in rows)
                    sum += values[row];
                return sum / rows.Length;
            }, 999, seed: run);
            lock (adding)
            {
                corrected += got.BiasCorrected.Lower <= 1 && 1 <= got.BiasCorrected.Upper ? 1.0 / runs : 0;
                percentile += got.Percentile.Lower <= 1 && 1 <= got.Percentile.Upper ? 1.0 / runs : 0;
            }
        });
        output.WriteLine($"BCa {corrected:F3}, percentile {percentile:F3}");
        Assert.InRange(corrected, 0.91, 0.96);
        Assert.InRange(percentile, 0.89, 0.95);
    }

    /// <summary>
    /// Tests on the folds of one data set: 200 rows without any difference, ten random splits of a tenth each. The plain t test passes too often
    /// when splits overlap much; the corrected one does not.
    /// </summary>
    [Fact]
    public void Error_of_tests_on_resampled_splits()
    {
        int runs = 3000 * Simulation.Scale;
        (double plain, double corrected) = (Rate(d => PairedTTest.Of(d).PValue), Rate(d => CorrectedResampledTTest.Of(d, 100, 100).PValue));
        output.WriteLine($"half of the rows a split: plain t {plain:F3}, corrected {corrected:F3}");
        Assert.True(plain > 0.3);
        Assert.True(corrected <= 0.06 + Simulation.Slack(0.05, runs));

        double Rate(Func<double[], double> test) => Simulation.Share(runs, random =>
        {
            double[] rows = [.. Enumerable.Range(0, 200).Select(_ => Simulation.Gaussian(random))];
            double[] d = new double[10];
            for (int split = 0; split < 10; split++)
            {
                random.Shuffle(rows);
                d[split] = rows.Take(100).Average();
            }

            return test(d) <= 0.05;
        });
    }

    /// <summary>5×2cv on 200 rows without any difference.</summary>
    [Fact]
    public void Error_of_five_by_two()
    {
        int runs = 3000 * Simulation.Scale;
        double t = Rate(d => FiveByTwoTest.T(d).PValue), f = Rate(d => FiveByTwoTest.F(d).PValue);
        output.WriteLine($"5x2cv t {t:F3}, F {f:F3}");
        Assert.InRange(t, 0.01, 0.06 + Simulation.Slack(0.05, runs));
        Assert.InRange(f, 0.005, 0.06 + Simulation.Slack(0.05, runs));

        double Rate(Func<double[], double> test) => Simulation.Share(runs, random =>
        {
            double[] rows = [.. Enumerable.Range(0, 200).Select(_ => Simulation.Gaussian(random))];
            double[] d = new double[10];
            for (int replication = 0; replication < 5; replication++)
            {
                random.Shuffle(rows);
                d[2 * replication] = rows.Take(100).Average();
                d[2 * replication + 1] = rows.Skip(100).Average();
            }

            return test(d) <= 0.05;
        });
    }

    /// <summary>The planned number of rows reaches the planned power.</summary>
    [Fact]
    public void Power_at_the_planned_rows()
    {
        int runs = 2000 * Simulation.Scale;
        int rows = (int)Math.Ceiling(Planning.RowsForPairedT(0.3, 1, power: 0.8));
        double power = Simulation.Share(runs, random => PairedTTest.Of([.. Enumerable.Range(0, rows).Select(_ => 0.3 + Simulation.Gaussian(random))]).PValue <= 0.05);
        Assert.InRange(power, 0.8 - Simulation.Slack(0.8, runs), 0.82 + Simulation.Slack(0.8, runs));
        RowsNeeded plan = Planning.RowsForAccuracy(0.5, 0.6, comparisons: 10);
        double found = Simulation.Share(runs, random =>
        {
            long hits = 0;
            for (long i = 0; i < plan.FromThenOn; i++)
                hits += random.NextDouble() < 0.6 ? 1 : 0;
            return Claim.Accuracy(hits, plan.FromThenOn, baseline: 0.5, candidates: 10).Passed == true;
        });
        Assert.InRange(found, 0.8 - Simulation.Slack(0.8, runs), 0.84 + Simulation.Slack(0.8, runs));
    }
}
