namespace Tare.Tests;

/// <summary>t tests, cross-validation tests, Cochran's Q and AUC. Reference values: R 4.2.2 (see Reference/schema.csv).</summary>
public class MeanTestTests
{
    [Fact]
    public void Paired_t_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("paired_t.csv"))
        {
            double[] d = row.Vector("d");
            TTestResult got = PairedTTest.Of(d, confidence: row.Number("conf"));
            row.AgreesAbsolutely("mean", got.Mean);
            row.Agrees("t", got.T);
            row.Agrees("p_two_sided", got.PValue);
            row.Agrees("p_less", PairedTTest.Of(d, Side.Less).PValue);
            row.Agrees("p_greater", PairedTTest.Of(d, Side.Greater).PValue);
            row.AgreesAbsolutely("lower", got.Interval.Lower);
            row.AgreesAbsolutely("upper", got.Interval.Upper);
            row.Agrees("p_tost", PairedTTest.Equivalence(d, row.Number("margin")));
            row.Agrees("p_noninferior", PairedTTest.NonInferiority(d, row.Number("margin")));
        }
    }

    [Fact]
    public void Corrected_resampled_t_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("corrected_resampled_t.csv"))
        {
            double[] d = row.Vector("d");
            double train = row.Number("n_train"), test = row.Number("n_test");
            TTestResult got = CorrectedResampledTTest.Of(d, train, test);
            row.AgreesAbsolutely("t", got.T);
            row.Agrees("p_two_sided", got.PValue);
            row.Agrees("p_greater", CorrectedResampledTTest.Of(d, train, test, Side.Greater).PValue);
            row.AgreesAbsolutely("lower95", got.Interval.Lower);
            row.AgreesAbsolutely("upper95", got.Interval.Upper);
            (double below, double within, double above) = CorrectedResampledTTest.Posterior(d, train, test, row.Number("rope"));
            row.Agrees("post_left", below);
            row.AgreesAbsolutely("post_rope", within);
            row.Agrees("post_right", above);
        }
    }

    [Fact]
    public void Five_by_two_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("cv5x2.csv"))
        {
            double[] d = [.. row.Matrix("d").SelectMany(r => r)];
            row.Agrees("t", FiveByTwoTest.T(d).Statistic);
            row.Agrees("p_t", FiveByTwoTest.T(d).PValue);
            row.Agrees("f", FiveByTwoTest.F(d).Statistic);
            row.Agrees("p_f", FiveByTwoTest.F(d).PValue);
        }
    }

    [Fact]
    public void Cochran_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("cochran_q.csv"))
        {
            bool[][] x = [.. row.Matrix("x").Select(r => r.Select(v => v == 1).ToArray())];
            TestResult got = CochranQTest.Of(x);
            if (row.Text("q") == "NaN")
            {
                Assert.True(got.Degenerate);
                Assert.Equal(1, got.PValue);
                continue;
            }

            row.AgreesAbsolutely("q", got.Statistic);
            row.Agrees("p", got.PValue);
        }
    }

    /// <summary>With two classifiers Cochran's Q is McNemar's chi-square statistic.</summary>
    [Fact]
    public void Cochran_of_two_is_McNemar()
    {
        bool[][] x = [[true, false], [true, false], [true, false], [false, true], [true, true], [false, false]];
        Assert.Equal(McNemarTest.ChiSquareForm(3, 1), CochranQTest.Of(x) with { Test = "McNemar chi-square test" });
    }

    /// <summary>Counts can be collected in parts and added up.</summary>
    [Fact]
    public void Cochran_sums_can_be_merged()
    {
        bool[][] x = [[true, false, true], [true, false, false], [true, true, true], [false, true, false]];
        double[] hits = [3, 2, 2];
        Assert.Equal(CochranQTest.Of(x), CochranQTest.FromSums(hits, 2 + 1 + 3 + 1, 4 + 1 + 9 + 1));
    }

    [Fact]
    public void McNemar_chi_square_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("mcnemar.csv"))
        {
            TestResult plain = McNemarTest.ChiSquareForm(row.Count("b"), row.Count("c"));
            TestResult corrected = McNemarTest.ChiSquareForm(row.Count("b"), row.Count("c"), continuity: true);
            if (plain.Degenerate)
            {
                Assert.Equal("NaN", row.Text("chi2"));
                continue;
            }

            row.Agrees("chi2", plain.Statistic);
            row.Agrees("p_chi2", plain.PValue);
            row.Agrees("chi2_cc", corrected.Statistic);
            row.Agrees("p_chi2_cc", corrected.PValue);
        }
    }

    [Fact]
    public void DeLong_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("delong_paired.csv"))
        {
            double[] pa = row.Vector("positives_a"), na = row.Vector("negatives_a"), pb = row.Vector("positives_b"), nb = row.Vector("negatives_b");
            AucComparison got = DeLongTest.Compare(pa, na, pb, nb);
            row.Agrees("auc_a", got.First);
            row.Agrees("auc_b", got.Second);
            row.Agrees("var_a", got.FirstVariance);
            row.Agrees("var_b", got.SecondVariance);
            row.AgreesAbsolutely("cov", got.Covariance);
            if (got.Degenerate)
                continue;
            row.AgreesAbsolutely("z", got.Z);
            row.Agrees("p_two_sided", got.PValue);
            row.Agrees("p_greater", DeLongTest.Compare(pa, na, pb, nb, Side.Greater).PValue);
        }
    }

    [Fact]
    public void Auc_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("auc.csv"))
        {
            AucResult got = DeLongTest.Auc(row.Vector("positives"), row.Vector("negatives"), row.Number("conf"));
            row.Agrees("auc", got.Value);
            if (got.Degenerate)
                continue;
            row.Agrees("delong_var", got.StandardError * got.StandardError);
            row.AgreesAbsolutely("lower", got.Interval.Lower);
            row.AgreesAbsolutely("upper", got.Interval.Upper);
        }
    }

    [Fact]
    public void Equal_models_do_not_differ()
    {
        double[] positives = [0.9, 0.8, 0.3], negatives = [0.4, 0.2, 0.1];
        AucComparison same = DeLongTest.Compare(positives, negatives, positives, negatives);
        Assert.Equal((1.0, 0.0, true), (same.PValue, same.Z, same.Degenerate));
    }

    [Fact]
    public void Degenerate_differences_are_flagged_and_never_NaN()
    {
        Assert.Equal((0.0, true), (PairedTTest.Of([1, 1, 1]).PValue, PairedTTest.Of([1, 1, 1]).Degenerate));
        Assert.Equal((1.0, true), (PairedTTest.Of([1, 1, 1], Side.Less).PValue, PairedTTest.Of([0, 0]).Degenerate));
        Assert.Equal(1, PairedTTest.Of([0, 0]).PValue);
        Assert.Equal(1, FiveByTwoTest.F(new double[10]).PValue);
        Assert.Equal(0, FiveByTwoTest.T([1, 1, 1, 1, 1, 1, 1, 1, 1, 1]).PValue);
    }

    [Fact]
    public void Prints_one_plain_line() =>
        Assert.Equal(
            "paired t test: mean difference 0.75, -0.5298 to 2.03 (95 % Student t), t = 1.326 on 9 df, p = 0.2176",
            PairedTTest.Of([0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2]).ToString());

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentException>("differences", () => PairedTTest.Of([1]));
        Assert.Throws<ArgumentOutOfRangeException>("differences", () => PairedTTest.Of([1, double.NaN]));
        Assert.Throws<ArgumentOutOfRangeException>("margin", () => PairedTTest.Equivalence([1, 2], 0));
        Assert.Throws<ArgumentOutOfRangeException>("trainingRows", () => CorrectedResampledTTest.Of([1, 2], 0, 1));
        Assert.Throws<ArgumentOutOfRangeException>("region", () => CorrectedResampledTTest.Posterior([1, 2], 9, 1, -1));
        Assert.Throws<ArgumentException>("differences", () => FiveByTwoTest.F([1, 2, 3]));
        Assert.Throws<ArgumentException>("correct", () => CochranQTest.Of([]));
        Assert.Throws<ArgumentException>("correct", () => CochranQTest.Of([[true, false], [true]]));
        Assert.Throws<ArgumentOutOfRangeException>("sumOfRowTotals", () => CochranQTest.FromSums([1, 2], 4, 5));
        Assert.Throws<ArgumentException>("positives", () => DeLongTest.Auc([], [1]));
        Assert.Throws<ArgumentException>("secondNegatives", () => DeLongTest.Compare([1, 2], [1, 2], [1, 2], [1]));
    }
}
