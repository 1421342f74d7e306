using CsCheck;

namespace Tare.Tests;

public class ThresholdsTests
{
    /// <summary>50-digit values (mpmath 1.2.1) of Šidák 1967 and Dunn 1961; see Reference/schema.csv.</summary>
    [Fact]
    public void Levels_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("fwer.csv"))
        {
            double alpha = row.Number("alpha"), k = row.Number("k");
            row.Agrees("fwer", Thresholds.FamilyWiseErrorRate(alpha, k));
            if (alpha is 0 or 1)
            {
                Assert.Throws<ArgumentOutOfRangeException>("familyLevel", () => Thresholds.Sidak(alpha, k));
                Assert.Throws<ArgumentOutOfRangeException>("familyLevel", () => Thresholds.Bonferroni(alpha, k));
                continue;
            }

            row.Agrees("sidak_threshold", Thresholds.Sidak(alpha, k));
            row.Agrees("bonferroni_threshold", Thresholds.Bonferroni(alpha, k));
        }
    }

    [Fact]
    public void Looks_allowed_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("fwer_inverse_k.csv"))
        {
            row.Agrees("k_real", Thresholds.LooksAtFamilyLevel(row.Number("alpha"), row.Number("fwer")));
            Assert.Equal(row.Count("k_max"), Thresholds.LooksAllowed(row.Number("alpha"), row.Number("fwer")));
        }
    }

    /// <summary>Common-practice values at level 0.05, to the digits usually printed; the formula is Šidák's (1967).</summary>
    [Theory]
    [InlineData(2, 0.0975, 0.0253)]
    [InlineData(3, 0.1426, 0.0170)]
    [InlineData(5, 0.2262, 0.0102)]
    [InlineData(10, 0.4013, 0.00512)]
    [InlineData(20, 0.6415, 0.00256)]
    public void Common_values(int k, double error, double level)
    {
        Assert.Equal(error, Math.Round(Thresholds.FamilyWiseErrorRate(0.05, k), 4));
        Assert.Equal(level, Math.Round(Thresholds.Sidak(0.05, k), k < 10 ? 4 : 5));
    }

    /// <summary>Decimal arithmetic of 28 digits as a second route, where it reaches: (1-a)^K by repeated squaring.</summary>
    [Theory]
    [InlineData(0.05, 24)]
    [InlineData(0.001, 7)]
    [InlineData(0.5, 13)]
    public void Family_error_agrees_with_decimals(double level, int k)
    {
        decimal product = 1;
        for (int i = 0; i < k; i++)
            product *= 1 - (decimal)level;
        Assert.Equal((double)(1 - product), Thresholds.FamilyWiseErrorRate(level, k), 1e-14 * (double)(1 - product));
    }

    /// <summary>For tiny levels the first terms of the binomial series are the answer to double precision.</summary>
    [Theory]
    [InlineData(1e-300, 1e12)]
    [InlineData(1e-20, 1e3)]
    [InlineData(1e-20, 1)]
    public void Tiny_levels_keep_their_digits(double level, double k)
    {
        Assert.Equal(1, Thresholds.FamilyWiseErrorRate(level, k) / (level * k), 1e-14);
        if (level / k > 2.3e-308)
            Assert.Equal(1, Thresholds.Sidak(level, k) / (level / k), 1e-14);
    }

    [Fact]
    public void Sidak_and_family_error_undo_each_other() =>
        Gen.Select(Gen.Double[-300, 0], Gen.Double[0, 12]).Sample((logLevel, logK) =>
        {
            double family = Math.Min(Math.Pow(10, logLevel), 1 - 1e-12), k = Math.Pow(10, logK);
            double level = Thresholds.Sidak(family, k);
            if (level < 1e-307)
                return true;
            double back = Thresholds.FamilyWiseErrorRate(level, k);
            // Near 1 the error rate forgets the level; the gap to 1 is then what counts.
            return Math.Abs(back - family) <= 2e-14 * family && level >= Thresholds.Bonferroni(family, k) * (1 - 1e-15);
        });

    [Theory]
    [InlineData(0.0020833333, 3, 0.00208)]
    [InlineData(0.003, 3, 0.003)]
    [InlineData(0.05, 3, 0.05)]
    [InlineData(0.00999999, 3, 0.00999)]
    [InlineData(0.7081, 2, 0.7)]
    [InlineData(1.9e-300, 1, 1e-300)]
    [InlineData(0, 3, 0)]
    public void Rounds_down(double value, int digits, double want) => Assert.Equal(want, Thresholds.RoundDown(value, digits));

    [Fact]
    public void Rounding_never_goes_up_and_loses_less_than_a_unit() =>
        Gen.Select(Gen.Double[1e-9, 1], Gen.Int[1, 6]).Sample((value, digits) =>
        {
            double down = Thresholds.RoundDown(value, digits);
            return down <= value && down > value * (1 - Math.Pow(10, 1 - digits)) && Thresholds.RoundDown(down, digits) == down;
        });

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(-0.1)]
    [InlineData(1.1)]
    [InlineData(double.PositiveInfinity)]
    public void Bad_levels_are_named(double level)
    {
        Assert.Throws<ArgumentOutOfRangeException>("familyLevel", () => Thresholds.Sidak(level, 2));
        Assert.Throws<ArgumentOutOfRangeException>("familyLevel", () => Thresholds.Bonferroni(level, 2));
        Assert.Throws<ArgumentOutOfRangeException>("familyLevel", () => Thresholds.LooksAllowed(0.05, level));
        ArgumentOutOfRangeException error = Assert.Throws<ArgumentOutOfRangeException>("level", () => Thresholds.LooksAllowed(level, 0.05));
        Assert.Equal(level, error.ActualValue);
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(0)]
    [InlineData(-3)]
    [InlineData(double.PositiveInfinity)]
    public void Bad_counts_are_named(double k)
    {
        Assert.Throws<ArgumentOutOfRangeException>("comparisons", () => Thresholds.Sidak(0.05, k));
        Assert.Throws<ArgumentOutOfRangeException>("comparisons", () => Thresholds.Bonferroni(0.05, k));
        Assert.Throws<ArgumentOutOfRangeException>("comparisons", () => Thresholds.FamilyWiseErrorRate(0.05, k));
    }
}
