namespace Tare.Tests;

/// <summary>Reference values: R 4.2.2 (see Reference/schema.csv).</summary>
public class BootstrapTests
{
    [Fact]
    public void Quantiles_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("quantile.csv"))
            row.AgreesAbsolutely("type7", Quantiles.Of(row.Vector("x"), row.Number("prob")));
    }

    [Fact]
    public void Intervals_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("bca.csv"))
        {
            BootstrapResult got = Bootstrap.FromReplicates(row.Number("theta"), row.Vector("replicates"), row.Vector("jackknife"), row.Number("conf"));
            row.AgreesAbsolutely("acceleration", got.Acceleration);
            row.AgreesAbsolutely("z0", got.BiasCorrection);
            row.AgreesAbsolutely("bca_lower", got.BiasCorrected.Lower);
            row.AgreesAbsolutely("bca_upper", got.BiasCorrected.Upper);
            row.AgreesAbsolutely("percentile_lower", got.Percentile.Lower);
            row.AgreesAbsolutely("percentile_upper", got.Percentile.Upper);
            row.AgreesAbsolutely("basic_lower", got.Basic.Lower);
            row.AgreesAbsolutely("basic_upper", got.Basic.Upper);
            row.AgreesAbsolutely("boot_se", got.StandardError);
        }
    }

    /// <summary>For a mean the bootstrap's standard error is the plug-in one: sqrt(sum of squares / n) / sqrt(n).</summary>
    [Fact]
    public void Mean_has_its_plug_in_error()
    {
        double[] values = [.. Enumerable.Range(0, 50).Select(i => Math.Sin(i))];
        double mean = values.Average(), plugIn = Math.Sqrt(values.Sum(v => (v - mean) * (v - mean))) / 50;
        BootstrapResult one = Bootstrap.Of(50, rows => rows.Average(i => values[i]), 20_000), many = Bootstrap.Of(50, rows => rows.Average(i => values[i]), 20_000, threads: 4);
        Assert.Equal(one, many);
        Assert.Equal(plugIn, one.StandardError, 0.03 * plugIn);
        Assert.True(one.BiasCorrected.Lower < mean && mean < one.BiasCorrected.Upper);
    }

    [Fact]
    public void Constant_statistic_is_flagged_not_NaN()
    {
        BootstrapResult got = Bootstrap.Of(10, _ => 3, 200);
        Assert.Equal((3.0, 3.0, 0.0), (got.BiasCorrected.Lower, got.BiasCorrected.Upper, got.Acceleration));
        Assert.True(Bootstrap.FromReplicates(0, Enumerable.Repeat(1.0, 100).ToArray(), [1, 2], 0.9).Degenerate);
    }

    /// <summary>Sixty coins on 200 rows: the raw winner shows well above a half, the corrected one about a half on average over 60 runs.</summary>
    [Fact]
    public void Winner_among_coins_is_worth_a_coin()
    {
        const int runs = 60;
        double raw = 0, corrected = 0;
        Parallel.For(0, runs, run =>
        {
            Random random = new(run);
            ScoreMatrix matrix = new(200, 60);
            for (int i = 0; i < 200; i++)
            {
                for (int j = 0; j < 60; j++)
                    matrix[i, j] = random.Next(2);
            }

            WinnerEstimate got = WinnerEstimate.Bootstrap(matrix, resamples: 200, seed: run);
            lock (matrix.GetType())
            {
                raw += got.Raw / runs;
                corrected += got.Corrected / runs;
            }
        });
        Assert.True(raw > 0.57);
        // Standard error of a run's estimate is below sqrt(0.25/200) = 0.035, and of the mean of 60 runs below 0.0046.
        Assert.Equal(0.5, corrected, 3 * 0.0046);
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentException>("replicates", () => Bootstrap.FromReplicates(1, [1, 2, 3], [1, 2]));
        Assert.Throws<ArgumentOutOfRangeException>("replicates", () => Bootstrap.FromReplicates(1, [1, 2, double.NaN, 4], [1, 2], 0.5));
        Assert.Throws<ArgumentException>("jackknife", () => Bootstrap.FromReplicates(1, [1, 2, 3, 4], [1], 0.5));
        Assert.Throws<ArgumentOutOfRangeException>("rows", () => Bootstrap.Of(1, _ => 1));
        Assert.Throws<ArgumentOutOfRangeException>("probability", () => Quantiles.Of([1, 2], -0.1));
        Assert.Throws<ArgumentOutOfRangeException>("resamples", () => WinnerEstimate.Bootstrap(new ScoreMatrix(2, 2), resamples: 5));
    }
}
