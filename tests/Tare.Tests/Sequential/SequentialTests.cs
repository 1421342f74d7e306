using System.Globalization;

namespace Tare.Tests;

/// <summary>Reference values: SciPy 1.10.1 and R 4.2.2 (see Reference/schema.csv).</summary>
public class SequentialTests
{
    [Fact]
    public void Spending_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("alpha_spending.csv"))
            row.Agrees("spent", Spending(row.Text("spending"))(row.Number("alpha"), row.Number("t")));
    }

    [Fact]
    public void Bounds_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("group_sequential_spending.csv"))
        {
            double[] times = row.Vector("times"), want = row.Vector("bounds");
            double[] got = GroupSequential.Bounds(times, Spending(row.Text("spending")), row.Number("alpha"), row.Count("two_sided") == 1);
            for (int k = 0; k < want.Length; k++)
                Assert.True(Math.Abs(want[k] - got[k]) <= 1e-8 * want[k], $"{row}\nlook {k}: want {want[k]:R}, got {got[k]:R}");
        }
    }

    [Fact]
    public void Classic_bounds_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("group_sequential_classic.csv"))
        {
            int looks = (int)row.Count("looks");
            double alpha = row.Number("alpha");
            row.Agrees("constant", row.Text("design") == "pocock" ? GroupSequential.PocockBound(looks, alpha) : GroupSequential.OBrienFlemingBound(looks, alpha));
        }
    }

    [Fact]
    public void Peeking_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("peeking.csv"))
            row.Agrees("actual_type_one", GroupSequential.PeekingErrorRate((int)row.Count("looks"), row.Number("nominal_alpha")));
    }

    [Fact]
    public void Bernoulli_mixture_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("msprt_bernoulli.csv"))
        {
            BernoulliMixtureTest test = new(row.Number("p0"), row.Number("a"), row.Number("b"));
            double[] y = row.Vector("y"), evidence = row.Vector("log_e"), p = row.Vector("always_valid_p");
            for (int i = 0; i < y.Length; i++)
            {
                Assert.Equal(p[i], test.Add(y[i] == 1), 1e-10);
                Assert.Equal(evidence[i], test.LogEvidence, 1e-10);
            }
        }
    }

    [Fact]
    public void Normal_mixture_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("msprt_normal.csv"))
        {
            NormalMixtureTest test = new(row.Number("theta0"), row.Number("sigma2"), row.Number("tau2"));
            double[] y = row.Vector("y"), evidence = row.Vector("log_e"), p = row.Vector("always_valid_p"), radius = row.Vector("confseq_radius95");
            for (int i = 0; i < y.Length; i++)
            {
                Assert.Equal(p[i], test.Add(y[i]), 1e-10);
                Assert.Equal(evidence[i], test.LogEvidence, 1e-10);
                Assert.Equal(radius[i], test.Radius(), 1e-10 * radius[i]);
            }
        }
    }

    /// <summary>Ville's inequality by simulation: looking after each of 500 rows of coin tosses, p falls to 0.05 in at most 5 % of runs plus three standard errors.</summary>
    [Fact]
    public void Looking_after_every_row_does_not_pass_too_often()
    {
        const int runs = 2000;
        SplitRandom random = new(20);
        int passed = 0;
        for (int run = 0; run < runs; run++)
        {
            BernoulliMixtureTest test = new(0.5);
            for (int row = 0; row < 500; row++)
                test.Add(random.Below(2) == 1);
            passed += test.PValue <= 0.05 ? 1 : 0;
        }

        Assert.InRange(passed / (double)runs, 0.001, 0.05 + 3 * Math.Sqrt(0.05 * 0.95 / runs));
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("t", () => AlphaSpending.Pocock(0.05, 0));
        Assert.Throws<ArgumentOutOfRangeException>("t", () => AlphaSpending.OBrienFleming(0.05, double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>("rho", () => AlphaSpending.Power(0.05, 0.5, 0));
        Assert.Throws<ArgumentException>("times", () => GroupSequential.Bounds([], AlphaSpending.Pocock));
        Assert.Throws<ArgumentOutOfRangeException>("times", () => GroupSequential.Bounds([0.5, 0.5], AlphaSpending.Pocock));
        Assert.Throws<ArgumentOutOfRangeException>("spending", () => GroupSequential.Bounds([0.5, 1], (_, _) => 0));
        Assert.Throws<ArgumentOutOfRangeException>("looks", () => GroupSequential.PocockBound(0));
        Assert.Throws<ArgumentOutOfRangeException>("baseline", () => new BernoulliMixtureTest(1));
        Assert.Throws<ArgumentOutOfRangeException>("value", () => new NormalMixtureTest(0, 1, 1).Add(double.NaN));
    }

    private static Func<double, double, double> Spending(string name) => name switch
    {
        "obrien-fleming" => AlphaSpending.OBrienFleming,
        "pocock" => AlphaSpending.Pocock,
        _ when name.StartsWith("power-", StringComparison.Ordinal) => (level, t) => AlphaSpending.Power(level, t, Parameter(name, 6)),
        _ when name.StartsWith("hsd-", StringComparison.Ordinal) => (level, t) => AlphaSpending.HwangShihDeCani(level, t, Parameter(name, 4)),
        _ => throw new ArgumentException(name),
    };

    private static double Parameter(string name, int from) => double.Parse(name[from..], CultureInfo.InvariantCulture);
}
