using CsCheck;

namespace Tare.Tests;

/// <summary>Reference values: R 4.2.2 (see Reference/schema.csv).</summary>
public class RankTestTests
{
    [Fact]
    public void Wilcoxon_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("wilcoxon.csv"))
        {
            double[] d = row.Vector("d");
            ZeroDifferences zeros = row.Text("zero_method") == "drop" ? ZeroDifferences.Drop : ZeroDifferences.Pratt;
            TestResult exact = WilcoxonTest.Exact(d, Side.TwoSided, zeros);
            row.Agrees("w_plus", exact.Statistic);
            row.Agrees("exact_two_sided", exact.PValue);
            row.Agrees("exact_less", WilcoxonTest.Exact(d, Side.Less, zeros).PValue);
            row.Agrees("exact_greater", WilcoxonTest.Exact(d, Side.Greater, zeros).PValue);
            if (exact.Degenerate)
            {
                Assert.Equal("NaN", row.Text("z"));
                continue;
            }

            row.AgreesAbsolutely("z", WilcoxonTest.Normal(d, Side.TwoSided, zeros, continuity: false).Statistic);
            row.Agrees("p_normal", WilcoxonTest.Normal(d, Side.TwoSided, zeros, continuity: false).PValue);
            row.AgreesAbsolutely("z_cc", WilcoxonTest.Normal(d, Side.TwoSided, zeros).Statistic);
            row.Agrees("p_normal_cc", WilcoxonTest.Normal(d, Side.TwoSided, zeros).PValue);
        }
    }

    /// <summary>All 2^n sign patterns, counted.</summary>
    [Fact]
    public void Exact_law_is_that_of_all_sign_patterns() =>
        Gen.Int[-6, 6].Array[1, 11].Sample(d =>
        {
            double[] differences = [.. d.Select(v => (double)v)];
            int[] kept = [.. d.Where(v => v != 0)];
            TestResult got = WilcoxonTest.Exact(differences, Side.Greater);
            if (kept.Length == 0)
                return got.PValue == 1 && got.Degenerate;
            double[] ranks = [.. kept.Select(v => kept.Count(o => Math.Abs(o) < Math.Abs(v)) + (kept.Count(o => Math.Abs(o) == Math.Abs(v)) + 1) / 2.0)];
            double seen = kept.Zip(ranks, (v, r) => v > 0 ? r : 0).Sum();
            int asLarge = 0;
            for (int pattern = 0; pattern < 1 << kept.Length; pattern++)
                asLarge += ranks.Where((_, i) => (pattern >> i & 1) == 1).Sum() >= seen ? 1 : 0;
            return Math.Abs(got.PValue - asLarge / Math.Pow(2, kept.Length)) < 1e-12 && got.Statistic == seen;
        });

    [Fact]
    public void Exact_and_normal_meet_where_one_takes_over_from_the_other()
    {
        double[] d = [.. Enumerable.Range(1, WilcoxonTest.ExactUpTo).Select(i => i % 15 < 8 ? (double)i : -i)];
        double exact = WilcoxonTest.Exact(d).PValue, normal = WilcoxonTest.Normal(d).PValue;
        Assert.InRange(exact, 1e-6, 0.2);
        Assert.Equal(1, normal / exact, 0.01);
        Assert.Equal("Wilcoxon signed-rank test (normal approximation)", WilcoxonTest.Exact([.. d, 2000.0]).Test);
    }

    [Fact]
    public void Friedman_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("friedman.csv"))
        {
            FriedmanResult got = FriedmanTest.Of(row.Matrix("x"), row.Count("higher_is_better") == 1);
            double[] ranks = row.Vector("mean_ranks");
            for (int j = 0; j < ranks.Length; j++)
                Assert.Equal(ranks[j], got.MeanRanks[j], 1e-12);
            row.AgreesAbsolutely("chi2", got.ChiSquare);
            row.AgreesAbsolutely("p_chi2", got.PValue);
            if (row.Text("iman_davenport_f") == "Infinity")
                Assert.Equal(double.PositiveInfinity, got.F);
            else
                row.AgreesAbsolutely("iman_davenport_f", got.F);
            row.AgreesAbsolutely("p_f", got.FPValue);
            row.AgreesAbsolutely("kendall_w", got.KendallW);
            double[] pairs = row.Vector("nemenyi_p");
            for (int j = 1, at = 0; j < ranks.Length; j++)
            {
                for (int i = 0; i < j; i++, at++)
                    Assert.True(Math.Abs(pairs[at] - got.NemenyiPValues[i, j]) < 1e-8, $"{row}\npair {i},{j}: want {pairs[at]:R}, got {got.NemenyiPValues[i, j]:R}");
            }
        }
    }

    [Fact]
    public void Critical_differences_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("nemenyi.csv"))
        {
            int k = (int)row.Count("k"), n = (int)row.Count("n");
            // The table's own root finding stops too early: k = 10 at 0.1 is off by 1e-10 and k = 50 at 0.05 by 1.2e-9, seen with
            // Simpson's rule on 200,000 points, which agrees with this library to 1e-14.
            row.Agrees("nemenyi_q", FriedmanTest.NemenyiQ(k, row.Number("alpha")), 4e-9);
            row.Agrees("nemenyi_cd", FriedmanTest.NemenyiCriticalDifference(k, n, row.Number("alpha")), 4e-9);
            row.Agrees("bonferroni_dunn_cd", FriedmanTest.BonferroniDunnCriticalDifference(k, n, row.Number("alpha")));
        }
    }

    [Fact]
    public void Range_law_agrees_with_reference()
    {
        int seen = 0;
        foreach (ReferenceRow row in ReferenceTable.Read("studentized_range.csv").Where(r => r.Text("df") == "Infinity"))
        {
            row.AgreesAbsolutely("sf", NormalRange.Upper(row.Number("q"), (int)row.Count("k")), 1e-10);
            seen++;
        }

        Assert.True(seen > 0);
    }

    /// <summary>Simpson's rule on 200,000 points over the range law (computed apart from this library).</summary>
    [Fact]
    public void Critical_values_solve_the_range_law()
    {
        Assert.Equal(2.919888840061541, FriedmanTest.NemenyiQ(10, 0.1), 1e-12);
        Assert.Equal(3.9923432900094165, FriedmanTest.NemenyiQ(50, 0.05), 1e-12);
    }

    [Fact]
    public void All_ties_are_flagged()
    {
        FriedmanResult flat = FriedmanTest.Of([[1.0, 1, 1], [2.0, 2, 2]], true);
        Assert.True(flat.Degenerate);
        Assert.Equal((1.0, 1.0, 0.0), (flat.PValue, flat.FPValue, flat.ChiSquare));
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentException>("differences", () => WilcoxonTest.Exact([]));
        Assert.Throws<ArgumentOutOfRangeException>("differences", () => WilcoxonTest.Exact([1, double.NegativeInfinity]));
        Assert.Throws<ArgumentOutOfRangeException>("zeros", () => WilcoxonTest.Exact([1], zeros: (ZeroDifferences)7));
        Assert.Throws<ArgumentOutOfRangeException>("side", () => WilcoxonTest.Normal([1], (Side)7));
        Assert.Throws<ArgumentException>("scores", () => FriedmanTest.Of([[1.0, 2]], true));
        Assert.Throws<ArgumentException>("scores", () => FriedmanTest.Of([[1.0, 2], [1.0]], true));
        Assert.Throws<ArgumentOutOfRangeException>("scores", () => FriedmanTest.Of([[1.0, 2], [1.0, double.NaN]], true));
        Assert.Throws<ArgumentOutOfRangeException>("methods", () => FriedmanTest.NemenyiCriticalDifference(1, 5));
    }
}
