using System.Globalization;
using CsCheck;

namespace Tare.Tests;

public class ClaimTests
{
    [Fact]
    public void Prints_a_passed_claim_in_one_plain_line() =>
        Assert.Equal(
            "passed: accuracy 0.57 on 400 rows is greater than baseline 0.5 (coin): p = 0.002946 <= 0.05, exact binomial test; at least 0.5277 at 95 % (Clopper-Pearson); compared on these test rows: 1; assumes independent rows",
            Claim.Accuracy(228, 400, baseline: 0.5, baselineFrom: "coin").ToString());

    [Fact]
    public void Prints_a_failed_claim_with_its_earlier_looks() =>
        Assert.Equal(
            "not passed: accuracy 0.57 on 400 rows is not shown to be greater than baseline 0.5: p = 0.002946 > 0.002, exact binomial test; at least 0.4969 at 99.8 % (Clopper-Pearson); compared on these test rows: 25 (1 now, 24 earlier), level 0.05 for all of them; assumes independent rows",
            Claim.Accuracy(228, 400, baseline: 0.5, earlierLooks: 24).ToString());

    [Fact]
    public void Prints_an_interval_without_pass_or_fail_when_there_is_no_baseline()
    {
        Verdict verdict = Claim.Accuracy(228, 400, earlierLooks: 24);
        Assert.Null(verdict.Passed);
        Assert.Equal(
            "accuracy 0.57 on 400 rows; 0.4916 to 0.646 at 99.8 % (Clopper-Pearson); compared on these test rows: 25 (1 now, 24 earlier), level 0.05 for all of them; no baseline, so no pass or fail; assumes independent rows",
            verdict.ToString());
    }

    [Fact]
    public void Line_is_the_same_in_every_culture()
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            string invariant = Claim.Accuracy(228, 400, baseline: 0.5, earlierLooks: 24).ToString();
            foreach (string culture in new[] { "de-DE", "fr-FR", "ar-SA", "fa-IR" })
            {
                CultureInfo.CurrentCulture = new CultureInfo(culture);
                Assert.Equal(invariant, Claim.Accuracy(228, 400, baseline: 0.5, earlierLooks: 24).ToString());
            }
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    [Fact]
    public void Candidates_and_earlier_looks_add_up()
    {
        Verdict verdict = Claim.Accuracy(228, 400, baseline: 0.5, candidates: 3, earlierLooks: 21);
        Assert.Equal(24, verdict.Compared);
        Assert.Equal(0.05 / 24, verdict.Level, 1e-17);
        Assert.False(verdict.Passed);
    }

    /// <summary>One decision two ways: passing is the same as the bound lying above the baseline.</summary>
    [Fact]
    public void Passing_agrees_with_the_bound() =>
        Gen.Select(Gen.Long[1, 500], Gen.Double[0.05, 0.95], Gen.Long[1, 100]).SelectMany((n, b, k) => Gen.Long[0, n].Select(h => (n, b, k, h))).Sample(t =>
        {
            Verdict above = Claim.Accuracy(t.h, t.n, baseline: t.b, candidates: t.k);
            Verdict below = Claim.Accuracy(t.h, t.n, baseline: t.b, candidates: t.k, side: Side.Less);
            return above.Passed == (above.Lower >= t.b) && below.Passed == (below.Upper <= t.b);
        });

    [Fact]
    public void More_looks_never_turn_a_failure_into_a_pass() =>
        Gen.Select(Gen.Long[1, 300], Gen.Long[0, 50], Gen.Long[0, 50]).SelectMany((n, a, b) => Gen.Long[0, n].Select(h => (n, a, b, h))).Sample(t =>
        {
            Verdict few = Claim.Accuracy(t.h, t.n, baseline: 0.5, earlierLooks: Math.Min(t.a, t.b));
            Verdict many = Claim.Accuracy(t.h, t.n, baseline: 0.5, earlierLooks: Math.Max(t.a, t.b));
            return few.Passed!.Value || !many.Passed!.Value;
        });

    [Fact]
    public void All_ways_in_give_the_same_claim() =>
        Gen.Bool.Array[1, 300].Sample(correct =>
        {
            long hits = correct.LongCount(c => c);
            Verdict counts = Claim.Accuracy(hits, correct.Length, baseline: 0.4);
            Assert.Equal(counts, Claim.Accuracy((double)hits / correct.Length, correct.Length, baseline: 0.4));
            Assert.Equal(counts, Claim.Accuracy((float)hits / correct.Length, correct.Length, baseline: 0.4));
            Assert.Equal(counts, Claim.Accuracy(correct, baseline: 0.4));
            Assert.Equal(counts, Claim.Accuracy(correct.Select(c => c ? 1.0 : 0.0).Average(), correct.Length, baseline: 0.4));
            Assert.Equal(counts, Claim.Matches(correct, correct.Select(_ => true), baseline: 0.4));
        });

    [Fact]
    public void Integers_are_counts_and_fractions_are_proportions()
    {
        Assert.Equal(0.0025, Claim.Accuracy(1, 400).Value);
        Assert.Equal(1, Claim.Accuracy(1.0, 400).Value);
    }

    [Fact]
    public void Against_another_model_only_discordant_rows_count()
    {
        bool[] winner = [.. Enumerable.Repeat(true, 60), .. Enumerable.Repeat(false, 40)];
        bool[] baseline = [.. Enumerable.Repeat(true, 45), .. Enumerable.Repeat(false, 50), .. Enumerable.Repeat(true, 5)];
        Verdict verdict = Claim.Accuracy(winner, baseline, baselineFrom: "last year's model");
        Assert.Equal(McNemarTest.Exact(15, 5, Side.Greater), verdict.PValue);
        Assert.Equal(0.6, verdict.Value);
        Assert.Equal(0.5, verdict.Baseline);
        Assert.True(verdict.IntervalOfDifference);
        Assert.StartsWith("passed: accuracy 0.6 on 100 rows is greater than baseline 0.5 (last year's model): p = 0.02069 <= 0.05, exact McNemar test; difference at least ", verdict.ToString());
    }

    /// <summary>R 4.2.2 pt/qt on paired differences (see Reference/schema.csv).</summary>
    [Fact]
    public void Means_agree_with_reference()
    {
        int seen = 0;
        foreach (ReferenceRow row in ReferenceTable.Read("paired_t.csv"))
        {
            double[] d = row.Vector("d");
            Verdict up = Claim.Score(d, baseline: 0), down = Claim.Loss(d, baseline: 0), both = Claim.Mean(d, level: 1 - row.Number("conf"));
            row.AgreesAbsolutely("mean", up.Value, 1e-10);
            row.AgreesAbsolutely("lower", both.Lower!.Value, 1e-10);
            row.AgreesAbsolutely("upper", both.Upper!.Value, 1e-10);
            if (up.Test != "t test")
                continue; // equal differences: the sign test takes over, see below
            row.Agrees("p_greater", up.PValue!.Value);
            row.Agrees("p_less", down.PValue!.Value);
            Assert.Equal(up.PValue!.Value, Claim.Score(d, d.Select(_ => 0.0)).PValue!.Value);
            seen++;
        }

        Assert.True(seen > 5);
    }

    [Fact]
    public void Equal_differences_are_judged_by_their_signs()
    {
        Verdict verdict = Claim.Score([2.0, 2, 2, 2], baseline: 1);
        Assert.Equal("exact sign test", verdict.Test);
        Assert.Equal(1.0 / 16, verdict.PValue);
        Assert.False(verdict.Passed);
        Assert.Equal(1, Claim.Score([1.0, 1, 1], baseline: 1).PValue);
    }

    [Fact]
    public void Loss_is_good_when_low_and_score_when_high()
    {
        double[] low = [1, 1.1, 0.9, 1.05, 0.95, 1.02], high = [2, 2.1, 1.9, 2.05, 1.95, 2.02];
        Assert.True(Claim.Loss(low, high).Passed);
        Assert.False(Claim.Loss(high, low).Passed);
        Assert.True(Claim.Score(high, baseline: 1.5).Passed);
        Assert.False(Claim.Score(low, baseline: 1.5).Passed);
        Assert.Equal(double.NegativeInfinity, Claim.Loss(low, baseline: 3).Lower);
        Assert.Null(Claim.Mean(low).Passed);
    }

    [Fact]
    public void Own_p_value_is_corrected()
    {
        Assert.True(Claim.PValue(0.002, 50, "Wilcoxon", candidates: 24).Passed);
        Assert.False(Claim.PValue(0.0021, 50, "Wilcoxon", candidates: 24).Passed);
        Assert.Equal(
            "not passed: p-value 0.0021 on 50 rows: p = 0.0021 > 0.00208, Wilcoxon; compared on these test rows: 24, level 0.05 for all of them; assumes what the test assumes",
            Claim.PValue(0.0021, 50, "Wilcoxon", candidates: 24).ToString());
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("hits", () => Claim.Accuracy(5, 4));
        Assert.Throws<ArgumentOutOfRangeException>("rows", () => Claim.Accuracy(0, 0));
        Assert.Throws<ArgumentOutOfRangeException>("accuracy", () => Claim.Accuracy(93.3, 400));
        Assert.Throws<ArgumentOutOfRangeException>("accuracy", () => Claim.Accuracy(double.NaN, 400));
        ArgumentException noCount = Assert.Throws<ArgumentException>("accuracy", () => Claim.Accuracy(0.5001, 400));
        Assert.Contains("0.5001", noCount.Message);
        Assert.Throws<ArgumentException>("accuracy", () => Claim.Accuracy(0.5001f, 400));
        Assert.Throws<ArgumentOutOfRangeException>("baseline", () => Claim.Accuracy(3, 4, baseline: double.NaN));
        Assert.Throws<ArgumentException>("baselineFrom", () => Claim.Accuracy(3, 4, baselineFrom: "coin"));
        Assert.Throws<ArgumentOutOfRangeException>("candidates", () => Claim.Accuracy(3, 4, candidates: 0));
        Assert.Throws<ArgumentOutOfRangeException>("earlierLooks", () => Claim.Accuracy(3, 4, earlierLooks: -1));
        Assert.Throws<ArgumentOutOfRangeException>("earlierLooks", () => Claim.Accuracy(3, 4, earlierLooks: long.MaxValue));
        Assert.Throws<ArgumentOutOfRangeException>("level", () => Claim.Accuracy(3, 4, level: 0));
        Assert.Throws<ArgumentOutOfRangeException>("side", () => Claim.Accuracy(3, 4, baseline: 0.5, side: (Side)5));
        Assert.Throws<ArgumentException>("correct", () => Claim.Accuracy(Array.Empty<bool>()));
        Assert.Throws<ArgumentNullException>("correct", () => Claim.Accuracy((bool[])null!));
        Assert.Throws<ArgumentException>("baselineCorrect", () => Claim.Accuracy([true, false], [true]));
        Assert.Throws<ArgumentException>("actual", () => Claim.Matches([1, 2], [1, 2, 3]));
        Assert.Throws<ArgumentException>("perRow", () => Claim.Mean([1.0]));
        Assert.Throws<ArgumentOutOfRangeException>("perRow", () => Claim.Loss([1, double.NaN]));
        Assert.Throws<ArgumentOutOfRangeException>("baselinePerRow", () => Claim.Score([1.0, 2], [1, double.PositiveInfinity]));
        Assert.Throws<ArgumentOutOfRangeException>("pValue", () => Claim.PValue(-0.1, 4, "t"));
    }
}
