namespace Tare.Tests;

/// <summary>Reference values: R 4.2.2 (see Reference/schema.csv).</summary>
public class FurtherTestTests
{
    [Fact]
    public void Two_proportions_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("two_prop_test.csv"))
        {
            long x1 = row.Count("x1"), n1 = row.Count("n1"), x2 = row.Count("x2"), n2 = row.Count("n2");
            TestResult plain = TwoProportionsTest.ChiSquareForm(x1, n1, x2, n2), corrected = TwoProportionsTest.ChiSquareForm(x1, n1, x2, n2, continuity: true);
            row.Agrees("fisher_two_sided", TwoProportionsTest.Fisher(x1, n1, x2, n2));
            row.Agrees("fisher_less", TwoProportionsTest.Fisher(x1, n1, x2, n2, Side.Less));
            row.Agrees("fisher_greater", TwoProportionsTest.Fisher(x1, n1, x2, n2, Side.Greater));
            if (plain.Degenerate)
            {
                Assert.Equal("NaN", row.Text("chi2"));
                continue;
            }

            row.AgreesAbsolutely("chi2", plain.Statistic);
            row.Agrees("p_chi2", plain.PValue);
            row.AgreesAbsolutely("chi2_cc", corrected.Statistic);
            row.AgreesAbsolutely("p_chi2_cc", corrected.PValue, 1e-7);
        }
    }

    [Fact]
    public void Combined_p_values_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("combine_p.csv"))
        {
            double[] p = row.Vector("p");
            row.Agrees("fisher", CombinedPValue.Fisher(p));
            row.Agrees("stouffer", CombinedPValue.Stouffer(p));
            row.Agrees("simes", CombinedPValue.Simes(p));
            row.Agrees("tippett", CombinedPValue.Tippett(p));
            row.Agrees("cauchy", CombinedPValue.Cauchy(p));
            row.Agrees("twice_mean", CombinedPValue.TwiceMean(p));
        }
    }

    [Fact]
    public void Permutation_p_values_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("permutation_pvalue.csv"))
            row.Agrees("p_phipson_smyth", PermutationPValue.Of(row.Count("exceedances"), row.Count("permutations")));
    }

    [Fact]
    public void Selection_rules_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("selection.csv"))
        {
            double[][] errors = row.Matrix("errors");
            Assert.Equal(row.Count("one_se_choice"), SelectionRules.OneStandardError(errors));
            row.AgreesAbsolutely("tt_bias", SelectionRules.BiasOfMinimum(errors));
        }
    }

    [Fact]
    public void Pass_at_k_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("pass_at_k.csv"))
            row.Agrees("pass_at_k", PassAtK.Of(row.Count("n"), row.Count("c"), row.Count("k")));
    }

    [Fact]
    public void Sequential_ratio_test_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("sprt_bernoulli.csv"))
        {
            SequentialRatioTest test = new(row.Number("p0"), row.Number("p1"), row.Number("alpha"), row.Number("beta"));
            row.Agrees("log_upper", test.UpperBound);
            row.Agrees("log_lower", test.LowerBound);
            double[] y = row.Vector("y"), ratios = row.Vector("llr");
            for (int i = 0; i < y.Length; i++)
            {
                test.Add(y[i] == 1);
                Assert.Equal(ratios[i], test.LogRatio, 1e-11);
            }

            Assert.Equal(row.Count("stop_at"), test.DecidedAt);
            Assert.Equal(row.Text("decision"), test.Decision switch { null => "continue", true => "accept-h1", false => "accept-h0" });
        }
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("firstHits", () => TwoProportionsTest.Fisher(3, 2, 1, 2));
        Assert.Throws<ArgumentException>("pValues", () => CombinedPValue.Fisher([]));
        Assert.Throws<ArgumentException>("pValues", () => CombinedPValue.Stouffer([0, 1]));
        Assert.Throws<ArgumentOutOfRangeException>("pValues", () => CombinedPValue.Cauchy([double.NaN]));
        Assert.Throws<ArgumentOutOfRangeException>("exceedances", () => PermutationPValue.Of(5, 4));
        Assert.Throws<ArgumentException>("foldErrors", () => SelectionRules.OneStandardError([[1.0]]));
        Assert.Throws<ArgumentOutOfRangeException>("k", () => PassAtK.Of(5, 2, 6));
        Assert.Throws<ArgumentOutOfRangeException>("alternative", () => new SequentialRatioTest(0.5, 0.5));
    }
}
