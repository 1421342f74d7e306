namespace Tare.Tests;

/// <summary>Reference values: R 4.2.2 (see Reference/schema.csv).</summary>
public class PlanningTests
{
    [Fact]
    public void Accuracy_power_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("power_exact_binomial.csv"))
        {
            double level = Thresholds.Sidak(row.Number("fwer"), row.Number("k"));
            BinomialPower got = Planning.AccuracyPower(row.Count("n"), row.Number("p0"), row.Number("p1"), level);
            row.Agrees("sig_level", got.Level);
            Assert.Equal(row.Count("critical_count"), got.CriticalCount);
            row.Agrees("size", got.Size);
            row.Agrees("power", got.Power);
        }
    }

    [Fact]
    public void Rows_for_accuracy_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("samplesize_exact_binomial.csv"))
        {
            double level = Thresholds.Sidak(row.Number("fwer"), row.Number("k"));
            RowsNeeded got = Planning.RowsForAccuracy(row.Number("p0"), row.Number("p1"), level, row.Number("power"));
            row.Agrees("n_normal_approx", got.NormalApproximation);
            Assert.Equal(row.Count("n_first"), got.First);
            row.Agrees("power_at_first", got.PowerAtFirst);
            Assert.Equal(row.Count("n_from_then_on"), got.FromThenOn);
            row.Agrees("power_from_then_on", got.PowerFromThenOn);
        }
    }

    [Fact]
    public void McNemar_plans_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("power_mcnemar.csv"))
        {
            double level = Thresholds.Sidak(row.Number("fwer"), row.Number("k"));
            double p10 = row.Number("p10"), p01 = row.Number("p01");
            row.Agrees("n_connor", Planning.RowsForMcNemar(p10, p01, level, row.Number("power")));
            if (!row.Has("exact_power"))
                continue;
            row.Agrees("exact_power", Planning.McNemarPower(row.Count("n_used"), p10, p01, level));
            row.Agrees("midp_power", Planning.McNemarPower(row.Count("n_used"), p10, p01, level, midP: true));
        }
    }

    [Fact]
    public void Two_proportion_plans_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("power_two_prop.csv"))
        {
            double level = Thresholds.Sidak(row.Number("fwer"), row.Number("k")), p1 = row.Number("p1"), p2 = row.Number("p2");
            bool twoSided = row.Text("alternative") == "two.sided";
            row.Agrees("n_per_group", Planning.RowsForTwoProportions(p1, p2, level, row.Number("power"), twoSided: twoSided));
            row.Agrees("power_at_ceiling", Planning.TwoProportionsPower(row.Number("n_ceiling"), p1, p2, level, twoSided: twoSided));
        }
    }

    [Fact]
    public void Paired_t_plans_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("power_paired_t.csv"))
        {
            double delta = row.Number("delta"), sd = row.Number("sd"), level = row.Number("sig_level");
            row.Agrees("n", Planning.RowsForPairedT(delta, sd, level, row.Number("power")));
            row.Agrees("power_at_ceiling", Planning.PairedTPower(row.Number("n_ceiling"), delta, sd, level));
            row.Agrees("power_strict_at_ceiling", Planning.PairedTPower(row.Number("n_ceiling"), delta, sd, level, countWrongSide: true));
        }
    }

    [Fact]
    public void Rows_for_margin_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("hoeffding.csv"))
            row.Agrees("n_real_two_sided", Planning.RowsForMargin(row.Number("epsilon"), row.Number("range"), row.Number("delta"), row.Number("k")));
    }

    [Fact]
    public void Comparisons_divide_the_level()
    {
        Assert.Equal(0.05 / 24, Planning.AccuracyPower(500, 0.5, 0.6, comparisons: 24).Level);
        Assert.True(Planning.RowsForAccuracy(0.5, 0.6, comparisons: 24).FromThenOn > Planning.RowsForAccuracy(0.5, 0.6).FromThenOn);
    }

    [Fact]
    public void Smallest_accuracy_has_exactly_the_power()
    {
        foreach (long rows in new long[] { 20, 200, 3000 })
        {
            double smallest = Planning.SmallestAccuracyShown(rows, 0.5, power: 0.9, comparisons: 10);
            Assert.Equal(0.9, Planning.AccuracyPower(rows, 0.5, smallest, comparisons: 10).Power, 1e-12);
        }

        Assert.Equal(1, Planning.SmallestAccuracyShown(3, 0.5));
    }

    [Fact]
    public void Large_plans_are_found_quickly_and_keep_their_promise()
    {
        RowsNeeded plan = Planning.RowsForAccuracy(0.9, 0.905, comparisons: 10);
        Assert.True(plan.NormalApproximation > 20_000);
        Assert.True(plan.PowerAtFirst >= 0.8 && plan.PowerFromThenOn >= 0.8);
        Assert.True(Planning.AccuracyPower(plan.First - 1, 0.9, 0.905, comparisons: 10).Power < 0.8);
        Assert.True(Planning.AccuracyPower(plan.FromThenOn - 1, 0.9, 0.905, comparisons: 10).Power < 0.8);
    }

    [Fact]
    public void Prints_one_plain_line() =>
        Assert.Equal("169 rows at level 0.05 (power 0.8231; 158 just reach it)", Planning.RowsForAccuracy(0.5, 0.6).ToString());

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("accuracy", () => Planning.RowsForAccuracy(0.5, 0.5));
        Assert.Throws<ArgumentOutOfRangeException>("accuracy", () => Planning.RowsForAccuracy(0.5, 0.5001));
        Assert.Throws<ArgumentOutOfRangeException>("power", () => Planning.RowsForAccuracy(0.5, 0.6, level: 0.3, power: 0.2));
        Assert.Throws<ArgumentOutOfRangeException>("onlySecond", () => Planning.RowsForMcNemar(0.1, 0.1));
        Assert.Throws<ArgumentOutOfRangeException>("onlySecond", () => Planning.McNemarPower(10, 0.7, 0.6));
        Assert.Throws<ArgumentOutOfRangeException>("second", () => Planning.RowsForTwoProportions(0.5, 0.5));
        Assert.Throws<ArgumentOutOfRangeException>("difference", () => Planning.RowsForPairedT(0, 1));
        Assert.Throws<ArgumentOutOfRangeException>("margin", () => Planning.RowsForMargin(double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>("rows", () => Planning.AccuracyPower(0, 0.5, 0.6));
    }
}
