using CsCheck;

namespace Tare.Tests;

/// <summary>Reference values: R 4.2.2 and mpmath 1.2.1 (see Reference/schema.csv).</summary>
public class BestOfKTests
{
    [Fact]
    public void P_values_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("best_of_k_pvalue.csv"))
        {
            row.Agrees("p_single", BestOfK.PValue(row.Count("x"), row.Count("n"), row.Number("p0"), 1));
            row.Agrees("p_best", BestOfK.PValue(row.Count("x"), row.Count("n"), row.Number("p0"), row.Number("k")));
        }
    }

    [Fact]
    public void Unequal_candidates_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("best_of_k_hetero.csv"))
            row.Agrees("p_best", BestOfK.PValue(row.Count("x"), row.Count("n"), row.Vector("p0")));
    }

    [Fact]
    public void Best_accuracy_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("best_of_k_max_accuracy.csv"))
        {
            long n = row.Count("n");
            double p0 = row.Number("p0"), k = row.Number("k");
            BestAccuracy best = BestOfK.Accuracy(n, p0, k);
            row.Agrees("mean_max", best.Mean);
            row.AgreesAbsolutely("sd_max", best.StandardDeviation);
            Assert.Equal(row.Count("quantile_count"), BestOfK.QuantileCount(n, p0, k, row.Number("prob")));
        }
    }

    [Fact]
    public void Largest_normal_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("max_normal.csv"))
        {
            double k = row.Number("k");
            row.AgreesAbsolutely("mean", BestOfK.NormalMean(k));
            row.AgreesAbsolutely("sd", BestOfK.NormalStandardDeviation(k));
            row.AgreesAbsolutely("q05", BestOfK.NormalQuantile(k, 0.05));
            row.AgreesAbsolutely("median", BestOfK.NormalQuantile(k, 0.5));
            row.AgreesAbsolutely("q99", BestOfK.NormalQuantile(k, 0.99));
        }
    }

    /// <summary>Closed forms: 1/sqrt(pi) for two, 3/(2 sqrt(pi)) for three (Tippett 1925; from memory).</summary>
    [Fact]
    public void Closed_forms()
    {
        Assert.Equal(1 / Math.Sqrt(Math.PI), BestOfK.NormalMean(2), 1e-14);
        Assert.Equal(1.5 / Math.Sqrt(Math.PI), BestOfK.NormalMean(3), 1e-14);
    }

    [Fact]
    public void Expected_best_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("expected_max_empirical.csv"))
        {
            double[] values = row.Vector("values");
            row.Agrees("with_replacement", ExpectedBest.WithReplacement(values, row.Count("k")));
            if (row.Count("k") <= values.Length)
                row.Agrees("without_replacement", ExpectedBest.WithoutReplacement(values, row.Count("k")));
            else
                Assert.Throws<ArgumentOutOfRangeException>("k", () => ExpectedBest.WithoutReplacement(values, row.Count("k")));
        }
    }

    [Fact]
    public void More_candidates_lift_the_best() =>
        Gen.Select(Gen.Long[1, 300], Gen.Double[0.05, 0.95], Gen.Double[1, 1000]).Sample((n, p, k) =>
        {
            BestAccuracy few = BestOfK.Accuracy(n, p, k), many = BestOfK.Accuracy(n, p, 2 * k);
            return many.Mean >= few.Mean - 1e-12 && few.Mean >= p - 1e-12 && many.Mean <= 1 + 1e-12;
        });

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("candidates", () => BestOfK.PValue(1, 2, 0.5, 0));
        Assert.Throws<ArgumentException>("baselines", () => BestOfK.PValue(1, 2, []));
        Assert.Throws<ArgumentOutOfRangeException>("baselines", () => BestOfK.PValue(1, 2, [double.NaN]));
        Assert.Throws<ArgumentOutOfRangeException>("probability", () => BestOfK.NormalQuantile(3, 1));
        Assert.Throws<ArgumentOutOfRangeException>("candidates", () => BestOfK.NormalMean(double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>("k", () => ExpectedBest.WithoutReplacement([1, 2], 3));
        Assert.Throws<ArgumentException>("scores", () => ExpectedBest.WithReplacement([], 3));
    }
}
