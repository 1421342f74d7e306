using CsCheck;

namespace Tare.Tests;

public class AdjustedPValuesTests
{
    private delegate double[] Method(ReadOnlySpan<double> pValues);

    private static readonly Dictionary<string, Method> Methods = new()
    {
        ["bonferroni"] = AdjustedPValues.Bonferroni,
        ["sidak"] = AdjustedPValues.Sidak,
        ["holm"] = AdjustedPValues.Holm,
        ["holm-sidak"] = AdjustedPValues.HolmSidak,
        ["hochberg"] = AdjustedPValues.Hochberg,
        ["hommel"] = AdjustedPValues.Hommel,
        ["BH"] = AdjustedPValues.BenjaminiHochberg,
        ["BY"] = AdjustedPValues.BenjaminiYekutieli,
    };

    private static readonly Gen<double[]> Families = Gen.OneOf(Gen.Double[0, 1], Gen.Double[0, 1].Select(p => Math.Round(p, 1))).Array[1, 40];

    /// <summary>R 4.2.2 stats::p.adjust; Šidák forms by formula (see Reference/schema.csv).</summary>
    [Fact]
    public void Agree_with_reference()
    {
        HashSet<string> seen = [];
        foreach (ReferenceRow row in ReferenceTable.Read("padjust.csv"))
        {
            seen.Add(row.Text("method"));
            double[] got = Methods[row.Text("method")](row.Vector("p"));
            double[] want = row.Vector("adjusted");
            Assert.Equal(want.Length, got.Length);
            for (int i = 0; i < want.Length; i++)
                Assert.True(Math.Abs(want[i] - got[i]) <= 1e-12 * want[i] + 1e-300, $"{row}\nindex {i}: want {want[i]:R}, got {got[i]:R}");
        }

        Assert.Equal(Methods.Count, seen.Count);
    }

    [Fact]
    public void Order_of_input_does_not_matter() => Families.Sample(p =>
    {
        foreach (Method method in Methods.Values)
        {
            double[] forward = method(p), backward = method(p.Reverse().ToArray());
            Assert.Equal(forward, backward.Reverse());
        }
    });

    [Fact]
    public void Never_below_the_raw_value_never_above_one_and_in_the_same_order() => Families.Sample(p =>
    {
        foreach (Method method in Methods.Values)
        {
            double[] adjusted = method(p);
            for (int i = 0; i < p.Length; i++)
            {
                Assert.InRange(adjusted[i], p[i] * (1 - 1e-14), 1);
                for (int j = 0; j < p.Length; j++)
                    Assert.True(p[i] > p[j] || adjusted[i] <= adjusted[j] || p[i] == p[j] && adjusted[i] == adjusted[j]);
            }
        }
    });

    [Fact]
    public void Stronger_methods_are_nowhere_weaker() => Families.Sample(p =>
    {
        double[][] chain =
        [
            AdjustedPValues.Bonferroni(p), AdjustedPValues.Holm(p), AdjustedPValues.Hochberg(p), AdjustedPValues.Hommel(p),
            AdjustedPValues.BenjaminiHochberg(p),
        ];
        for (int m = 1; m < chain.Length; m++)
        {
            for (int i = 0; i < p.Length; i++)
                Assert.True(chain[m][i] <= chain[m - 1][i] * (1 + 1e-14));
        }
    });

    [Fact]
    public void Family_of_one_is_left_alone()
    {
        foreach (Method method in Methods.Values)
            Assert.Equal([0.037], method([0.037]).Select(p => Math.Round(p, 15)));
    }

    [Fact]
    public void Bad_families_are_named()
    {
        foreach (Method method in Methods.Values)
        {
            Assert.Throws<ArgumentException>("pValues", () => method([]));
            foreach (double bad in new[] { double.NaN, -1e-9, 1.0000001, double.PositiveInfinity })
            {
                ArgumentOutOfRangeException error = Assert.Throws<ArgumentOutOfRangeException>("pValues", () => method([0.1, bad]));
                Assert.Contains("index 1", error.Message);
            }
        }
    }
}
