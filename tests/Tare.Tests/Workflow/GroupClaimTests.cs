namespace Tare.Tests;

public class GroupClaimTests
{
    /// <summary>With one row a group the cluster-robust claim is the t test.</summary>
    [Fact]
    public void Groups_of_one_row_are_the_t_test()
    {
        double[] values = [0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2];
        int[] groups = [.. Enumerable.Range(0, 10)];
        Verdict grouped = Claim.ScoreByGroup(values, groups, baseline: 0), plain = Claim.Score(values, baseline: 0);
        Assert.Equal(plain.PValue!.Value, grouped.PValue!.Value, 1e-12);
        Assert.Equal(plain.Lower!.Value, grouped.Lower!.Value, 1e-12);
        Assert.Equal(("group", 10L), (grouped.Unit, grouped.Units));
    }

    /// <summary>Ten copies of every row are no more evidence: the grouped claim does not change, the ungrouped one does.</summary>
    [Fact]
    public void Copies_of_rows_add_no_evidence()
    {
        bool[] correct = [.. Enumerable.Range(0, 40).Select(i => i % 5 < 3)];
        bool[] copied = [.. correct.SelectMany(c => Enumerable.Repeat(c, 10))];
        int[] groups = [.. Enumerable.Range(0, 400).Select(i => i / 10)];
        Verdict once = Claim.AccuracyByGroup(correct, Enumerable.Range(0, 40), baseline: 0.5);
        Verdict grouped = Claim.AccuracyByGroup(copied, groups, baseline: 0.5);
        Assert.Equal(once.PValue!.Value, grouped.PValue!.Value, 1e-12);
        Assert.False(grouped.Passed);
        Assert.True(Claim.Accuracy(copied, baseline: 0.5).Passed);
        Assert.StartsWith("not passed: accuracy 0.6 on 400 rows in 40 groups is not shown to be greater than baseline 0.5: p = ", grouped.ToString());
    }

    /// <summary>Strongly grouped rows without skill, 40 groups: the grouped claim passes at most 5 % plus three standard errors (it is approximate; 1 % more is allowed), the ungrouped one far more.</summary>
    [Fact]
    public void Grouped_rows_do_not_pass_too_often()
    {
        const int runs = 2000;
        int grouped = 0, ungrouped = 0;
        SplitRandom random = new(11);
        int[] groups = [.. Enumerable.Range(0, 400).Select(i => i / 10)];
        for (int run = 0; run < runs; run++)
        {
            bool[] correct = new bool[400];
            for (int g = 0; g < 40; g++)
            {
                bool load = random.Below(2) == 1;
                for (int i = 0; i < 10; i++)
                    correct[g * 10 + i] = random.Below(10) < 8 == load;
            }

            grouped += Claim.AccuracyByGroup(correct, groups, baseline: 0.5).Passed == true ? 1 : 0;
            ungrouped += Claim.Accuracy(correct, baseline: 0.5).Passed == true ? 1 : 0;
        }

        Assert.InRange(grouped / (double)runs, 0.03, 0.06 + 3 * Math.Sqrt(0.05 * 0.95 / runs));
        Assert.True(ungrouped > 2 * grouped);
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentException>("groups", () => Claim.AccuracyByGroup([true, false], new[] { 1, 1 }));
        Assert.Throws<ArgumentException>("groups", () => Claim.LossByGroup([1.0, 2], new[] { 1 }));
        Assert.Throws<ArgumentOutOfRangeException>("perRow", () => Claim.LossByGroup([1.0, double.NaN], new[] { 1, 2 }));
        Assert.Throws<ArgumentOutOfRangeException>("baseline", () => Claim.AccuracyByGroup([true, false], new[] { 1, 2 }, baseline: 2));
    }
}
