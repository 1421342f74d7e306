namespace Tare.Tests;

/// <summary>Reference values: R 4.2.2 and mpmath 1.2.1 (see Reference/schema.csv).</summary>
public class FurtherIntervalTests
{
    [Fact]
    public void Two_proportions_agree_with_reference()
    {
        int seen = 0;
        foreach (ReferenceRow row in ReferenceTable.Read("two_prop_ci.csv"))
        {
            long x1 = row.Count("x1"), n1 = row.Count("n1"), x2 = row.Count("x2"), n2 = row.Count("n2");
            Interval? got = row.Text("method") switch
            {
                "newcombe" => TwoProportionsInterval.Newcombe(x1, n1, x2, n2, row.Number("conf")),
                "agresti-caffo" => TwoProportionsInterval.AgrestiCaffo(x1, n1, x2, n2, row.Number("conf")),
                _ => null,
            };
            if (got is not { } interval)
                continue;
            row.AgreesAbsolutely("lower", interval.Lower);
            row.AgreesAbsolutely("upper", interval.Upper);
            seen++;
        }

        Assert.True(seen > 20);
    }

    [Fact]
    public void Paired_differences_agree_with_reference()
    {
        int seen = 0;
        foreach (ReferenceRow row in ReferenceTable.Read("paired_diff_ci.csv"))
        {
            long b = row.Count("only_first"), c = row.Count("only_second"), n = row.Count("both_right") + row.Count("both_wrong") + b + c;
            Interval? got = row.Text("method") switch
            {
                "tango" => PairedProportionInterval.Tango(n, b, c, row.Number("conf")),
                "agresti-min" => PairedProportionInterval.AgrestiMin(n, b, c, row.Number("conf")),
                "bonett-price" => PairedProportionInterval.BonettPrice(n, b, c, row.Number("conf")),
                _ => null,
            };
            if (got is not { } interval)
                continue;
            row.AgreesAbsolutely("lower", interval.Lower);
            row.AgreesAbsolutely("upper", interval.Upper);
            seen++;
        }

        Assert.True(seen > 30);
    }

    [Fact]
    public void Concentration_bounds_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("hoeffding.csv"))
        {
            long n = row.Count("n");
            double delta = row.Number("delta"), k = row.Number("k"), range = row.Number("range");
            row.Agrees("half_width_two_sided", ConcentrationBounds.Hoeffding(n, range, delta, k));
            row.Agrees("half_width_one_sided", ConcentrationBounds.Hoeffding(n, range, delta, k, twoSided: false));
            if (n >= 2)
                row.Agrees("empirical_bernstein", ConcentrationBounds.EmpiricalBernstein(n, row.Number("sample_variance"), range, delta, k));
        }

        foreach (ReferenceRow row in ReferenceTable.Read("kl_bound.csv"))
        {
            Interval got = ConcentrationBounds.Chernoff(row.Count("x"), row.Count("n"), row.Number("delta"));
            row.AgreesAbsolutely("lower", got.Lower);
            row.AgreesAbsolutely("upper", got.Upper);
        }
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("secondHits", () => TwoProportionsInterval.Newcombe(1, 2, 3, 2));
        Assert.Throws<ArgumentOutOfRangeException>("onlySecond", () => PairedProportionInterval.Tango(5, 3, 3));
        Assert.Throws<ArgumentOutOfRangeException>("rows", () => ConcentrationBounds.EmpiricalBernstein(1, 0.1));
        Assert.Throws<ArgumentOutOfRangeException>("level", () => ConcentrationBounds.Chernoff(1, 2, 1));
    }
}
