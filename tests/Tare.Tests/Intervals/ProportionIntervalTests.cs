using CsCheck;

namespace Tare.Tests;

public class ProportionIntervalTests
{
    /// <summary>R 4.2.2 binom.test, prop.test(correct=FALSE) and qbeta (see Reference/schema.csv).</summary>
    [Fact]
    public void Agree_with_reference()
    {
        int seen = 0;
        foreach (ReferenceRow row in ReferenceTable.Read("binom_ci.csv"))
        {
            long x = row.Count("x"), n = row.Count("n");
            double conf = row.Number("conf");
            Interval? got = row.Text("method") switch
            {
                "clopper-pearson" => ProportionInterval.ClopperPearson(x, n, conf),
                "clopper-pearson-lower" => ProportionInterval.ClopperPearson(x, n, conf, Side.Greater),
                "clopper-pearson-upper" => ProportionInterval.ClopperPearson(x, n, conf, Side.Less),
                "wilson" => ProportionInterval.Wilson(x, n, conf),
                "jeffreys" => ProportionInterval.Jeffreys(x, n, conf),
                "agresti-coull" => ProportionInterval.AgrestiCoull(x, n, conf),
                "midp" => ProportionInterval.MidP(x, n, conf),
                "hoeffding" => ProportionInterval.Hoeffding(x, n, conf),
                _ => null,
            };
            if (got is not { } interval)
                continue;
            if (row.Text("method") is "agresti-coull" or "hoeffding")
            {
                // Differences of near-equal numbers near the ends.
                row.AgreesAbsolutely("lower", interval.Lower);
                row.AgreesAbsolutely("upper", interval.Upper);
            }
            else
            {
                row.Agrees("lower", interval.Lower);
                row.Agrees("upper", interval.Upper);
            }

            seen++;
        }

        Assert.True(seen >= 4);
    }

    /// <summary>The bound and the test are two readings of one law: the one-sided p-value at the lower bound is the level.</summary>
    [Fact]
    public void Lower_bound_is_where_the_test_stops_rejecting() =>
        Gen.Select(Gen.Long[1, 400], Gen.Double[0.5, 0.999]).SelectMany((n, c) => Gen.Long[1, n].Select(k => (n, c, k))).Sample(t =>
        {
            double bound = ProportionInterval.ClopperPearson(t.k, t.n, t.c, Side.Greater).Lower;
            return Math.Abs(BinomialTest.PValue(t.k, t.n, bound, Side.Greater) - (1 - t.c)) < 1e-10;
        });

    [Fact]
    public void Ends_are_mirrored_and_hold_the_proportion() =>
        Gen.Select(Gen.Long[1, 400], Gen.Double[0.01, 0.999]).SelectMany((n, c) => Gen.Long[0, n].Select(k => (n, c, k))).Sample(t =>
        {
            foreach (bool wilson in new[] { false, true })
            {
                Interval one = Of(t.k), other = Of(t.n - t.k);
                double share = (double)t.k / t.n;
                if (!(Math.Abs(one.Lower - (1 - other.Upper)) < 1e-11 && one.Lower <= share + 1e-12 && share <= one.Upper + 1e-12 && one.Lower >= 0 && one.Upper <= 1))
                    return false;
                Interval Of(long k) => wilson ? ProportionInterval.Wilson(k, t.n, t.c) : ProportionInterval.ClopperPearson(k, t.n, t.c);
            }

            return true;
        });

    [Fact]
    public void Simultaneous_intervals_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("simultaneous_binom_ci.csv"))
        {
            long[] x = [.. row.Vector("x").Select(v => (long)v)], n = [.. row.Vector("n").Select(v => (long)v)];
            Interval[] got = ProportionInterval.Simultaneous(x, n, 1 - row.Number("fwer"));
            double[] lower = row.Vector("cp_bonferroni_lower"), upper = row.Vector("cp_bonferroni_upper");
            for (int i = 0; i < x.Length; i++)
            {
                Assert.Equal(lower[i], got[i].Lower, 1e-10);
                Assert.Equal(upper[i], got[i].Upper, 1e-10);
            }
        }
    }

    [Fact]
    public void Prints_one_plain_line() =>
        Assert.Equal("0.2435 to 0.4155 (95 % Clopper-Pearson)", ProportionInterval.ClopperPearson(40, 123).ToString());

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("hits", () => ProportionInterval.Wilson(3, 2));
        Assert.Throws<ArgumentOutOfRangeException>("rows", () => ProportionInterval.ClopperPearson(0, 0));
        Assert.Throws<ArgumentOutOfRangeException>("confidence", () => ProportionInterval.ClopperPearson(1, 2, double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>("confidence", () => ProportionInterval.Wilson(1, 2, 1));
        Assert.Throws<ArgumentOutOfRangeException>("side", () => ProportionInterval.Wilson(1, 2, 0.9, (Side)7));
    }
}
