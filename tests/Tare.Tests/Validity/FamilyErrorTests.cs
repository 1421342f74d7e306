namespace Tare.Tests.Validity;

[Trait("Category", "Simulation")]
public class FamilyErrorTests
{
    private const double Level = 0.05;

    public static TheoryData<int, string> Families()
    {
        TheoryData<int, string> data = [];
        foreach (int k in new[] { 2, 10, 60, 500 })
        {
            foreach (string dependence in new[] { "independent", "positive", "negative" })
                data.Add(k, dependence);
        }

        return data;
    }

    /// <summary>No candidate is any good: a method that promises the family-wise error claims in at most 5 % of runs plus three standard errors.</summary>
    [Theory]
    [MemberData(nameof(Families))]
    public void Family_wise_error_is_held(int k, string dependence)
    {
        int runs = 2000 * Simulation.Scale;
        Dictionary<string, Func<double[], double[]>> methods = new()
        {
            ["Bonferroni"] = p => AdjustedPValues.Bonferroni(p),
            ["Holm"] = p => AdjustedPValues.Holm(p),
        };
        if (dependence != "negative")
        {
            methods["Šidák"] = p => AdjustedPValues.Sidak(p);
            methods["Holm-Šidák"] = p => AdjustedPValues.HolmSidak(p);
            methods["Hochberg"] = p => AdjustedPValues.Hochberg(p);
            if (k <= 60)
                methods["Hommel"] = p => AdjustedPValues.Hommel(p);
        }

        foreach ((string name, Func<double[], double[]> adjust) in methods)
        {
            double error = Simulation.Share(runs, random =>
                adjust([.. Simulation.Scores(random, k, dependence).Select(Normal.Upper)]).Min() <= Level);
            Assert.True(error <= Level + Simulation.Slack(Level, runs), $"{name}, K = {k}, {dependence}: {error}");
        }

        // And the uncorrected comparison does not: what the correction is for.
        double uncorrected = Simulation.Share(runs, random => Simulation.Scores(random, k, dependence).Select(Normal.Upper).Min() <= Level);
        Assert.True(uncorrected > Level + Simulation.Slack(Level, runs));
    }

    /// <summary>A fifth of the candidates is good: the false discovery rate stays at its level where the method's condition holds.</summary>
    [Theory]
    [InlineData(10, "independent")]
    [InlineData(60, "independent")]
    [InlineData(60, "positive")]
    [InlineData(60, "negative")]
    public void False_discovery_rate_is_held(int k, string dependence)
    {
        const double rate = 0.1;
        int runs = 2000 * Simulation.Scale;
        double byRate = Rate(p => AdjustedPValues.BenjaminiYekutieli(p));
        Assert.True(byRate <= rate + Simulation.Slack(rate, runs), $"BY: {byRate}");
        if (dependence == "negative")
            return; // Benjamini-Hochberg promises nothing there
        double bhRate = Rate(p => AdjustedPValues.BenjaminiHochberg(p));
        Assert.True(bhRate <= rate + Simulation.Slack(rate, runs), $"BH: {bhRate}");
        Assert.True(bhRate > byRate);

        double Rate(Func<double[], double[]> adjust) => Simulation.Mean(runs, random =>
        {
            double[] z = Simulation.Scores(random, k, dependence);
            int good = k / 5;
            for (int j = 0; j < good; j++)
                z[j] += 3;
            double[] adjusted = adjust([.. z.Select(Normal.Upper)]);
            int found = adjusted.Count(p => p <= rate), wrong = adjusted.Skip(good).Count(p => p <= rate);
            return found == 0 ? 0 : wrong / (double)found;
        });
    }
}
