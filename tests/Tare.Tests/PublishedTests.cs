using System.Globalization;
using System.Text.RegularExpressions;

namespace Tare.Tests;

/// <summary>
/// Values printed in publications (Reference/published.csv; its columns name the source and say which are from memory). The comparison is
/// with the table's own recomputed value, since some printed tables are wrong in the last digit; where the table says that the
/// print agrees, the library's value must round to it too.
/// </summary>
public partial class PublishedTests
{
    [Fact]
    public void Printed_values_are_met()
    {
        int seen = 0;
        foreach (ReferenceRow row in ReferenceTable.Read("published.csv"))
        {
            if (Compute(row.Text("method"), row.Text("inputs"), row.Text("quantity")) is not { } got)
                continue;
            row.AgreesAbsolutely("recomputed", got, 4e-9);
            if (row.Text("agrees") == "yes")
            {
                string printed = row.Text("printed");
                int decimals = printed.Contains('.') ? printed.Length - printed.IndexOf('.') - 1 : 0;
                Assert.True(Math.Abs(double.Parse(printed, CultureInfo.InvariantCulture) - got) <= 1.001 * Math.Pow(10, -decimals), $"{row}: got {got:R}");
            }

            seen++;
        }

        Assert.True(seen >= 40, $"only {seen} printed values were recognised");
    }

    private static double? Compute(string method, string inputs, string quantity)
    {
        Dictionary<string, double> v = Inputs().Matches(inputs).ToDictionary(m => m.Groups[1].Value, m => double.Parse(m.Groups[2].Value, CultureInfo.InvariantCulture));
        return (method, quantity) switch
        {
            ("family-wise error", _) => Thresholds.FamilyWiseErrorRate(v["alpha"], v["k"]),
            ("Sidak threshold", _) => Thresholds.Sidak(v["alpha"], v["k"]),
            ("Nemenyi", "q") => FriedmanTest.NemenyiQ((int)v["k"], v["alpha"]),
            ("Bonferroni-Dunn", "q") => FriedmanTest.BonferroniDunnCriticalDifference((int)v["k"], 6, v["alpha"]) / Math.Sqrt(v["k"] * (v["k"] + 1) / 36),
            ("clopper-pearson", "lower" or "upper") => End(ProportionInterval.ClopperPearson((long)v["x"], (long)v["n"], v["conf"]), quantity),
            ("wilson", "lower" or "upper") => End(ProportionInterval.Wilson((long)v["x"], (long)v["n"], v["conf"]), quantity),
            ("midp", "lower" or "upper") => End(ProportionInterval.MidP((long)v["x"], (long)v["n"], v["conf"]), quantity),
            ("newcombe-10", "lower" or "upper") => End(PairedProportionInterval.Newcombe((long)v["both_right"], (long)v["only_first"], (long)v["only_second"], (long)v["both_wrong"], v["conf"]), quantity),
            ("McNemar", "midp_two_sided") => McNemarTest.MidP((long)v["b"], (long)v["c"]),
            ("McNemar", "exact_two_sided") => McNemarTest.Exact((long)v["b"], (long)v["c"]),
            ("McNemar", "chi2") => McNemarTest.ChiSquareForm((long)v["b"], (long)v["c"]).Statistic,
            ("McNemar", "p_chi2") => McNemarTest.ChiSquareForm((long)v["b"], (long)v["c"]).PValue,
            ("McNemar", "p_chi2_cc") => McNemarTest.ChiSquareForm((long)v["b"], (long)v["c"], continuity: true).PValue,
            ("exact binomial", "p_two_sided") => BinomialTest.PValue((long)v["x"], (long)v["n"], v["p0"]),
            ("Wilcoxon signed rank", "exact_two_sided") => WilcoxonTest.Exact([.. inputs.Split(' ').Select(d => double.Parse(d, CultureInfo.InvariantCulture))]).PValue,
            ("power two proportions", "n per group") => Planning.RowsForTwoProportions(v["p1"], v["p2"], v["level"], v["power"]),
            ("expected maximum of normals", "mean") => BestOfK.NormalMean(v["k"]),
            ("repeated testing", _) => GroupSequential.PeekingErrorRate((int)v["looks"], v["nominal"]),
            ("Pocock", "constant") => GroupSequential.PocockBound((int)v["looks"], v["alpha"]),
            ("O'Brien-Fleming", "constant") => GroupSequential.OBrienFlemingBound((int)v["looks"], v["alpha"]),
            ("Lan-DeMets O'Brien-Fleming type", "bound") => GroupSequential.Bounds([0.2, 0.4, 0.6, 0.8, 1], AlphaSpending.OBrienFleming, v["alpha"])[(int)v["look"] - 1],
            ("normal tail", _) => Normal.Upper(v["z"]),
            ("t quantile", _) => StudentT.UpperQuantile(v["upper"], v["df"]),
            _ => null,
        };
    }

    private static double End(Interval interval, string quantity) => quantity == "lower" ? interval.Lower : interval.Upper;

    [GeneratedRegex(@"([A-Za-z_0-9]+)=(-?[0-9.eE+-]+)")]
    private static partial Regex Inputs();
}
