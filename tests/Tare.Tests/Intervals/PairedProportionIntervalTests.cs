namespace Tare.Tests;

public class PairedProportionIntervalTests
{
    /// <summary>Formulas of Newcombe 1998 evaluated in R 4.2.2 (see Reference/schema.csv).</summary>
    [Fact]
    public void Agrees_with_reference()
    {
        int seen = 0;
        foreach (ReferenceRow row in ReferenceTable.Read("paired_diff_ci.csv").Where(r => r.Text("method") == "newcombe-10"))
        {
            Interval got = PairedProportionInterval.Newcombe(
                row.Count("both_right"), row.Count("only_first"), row.Count("only_second"), row.Count("both_wrong"), row.Number("conf"));
            row.AgreesAbsolutely("lower", got.Lower);
            row.AgreesAbsolutely("upper", got.Upper);
            seen++;
        }

        Assert.True(seen > 0);
    }

    [Fact]
    public void Swapping_the_classifiers_mirrors_the_interval()
    {
        Interval one = PairedProportionInterval.Newcombe(30, 12, 5, 20), other = PairedProportionInterval.Newcombe(30, 5, 12, 20);
        Assert.Equal(one.Lower, -other.Upper, 1e-14);
        Assert.Equal(one.Upper, -other.Lower, 1e-14);
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("onlySecond", () => PairedProportionInterval.Newcombe(1, 1, -1, 1));
        Assert.Throws<ArgumentException>(() => PairedProportionInterval.Newcombe(0, 0, 0, 0));
        Assert.Throws<ArgumentOutOfRangeException>("confidence", () => PairedProportionInterval.Newcombe(1, 1, 1, 1, double.NaN));
    }
}
