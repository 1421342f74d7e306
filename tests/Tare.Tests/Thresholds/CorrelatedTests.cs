namespace Tare.Tests;

/// <summary>Reference values: R 4.2.2 and SciPy 1.10.1 (see Reference/schema.csv).</summary>
public class CorrelatedTests
{
    [Fact]
    public void Effective_numbers_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("effective_tests.csv"))
        {
            EffectiveTests got = EffectiveTests.Of(Square(row.Matrix("correlation")));
            row.AgreesAbsolutely("nyholt", got.Nyholt);
            row.AgreesAbsolutely("li_ji", got.LiJi);
            row.AgreesAbsolutely("galwey", got.Galwey);
            Assert.Equal(row.Count("gao_995"), got.Gao);
        }
    }

    [Fact]
    public void Critical_values_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("equicorrelated_critical.csv"))
        {
            bool twoSided = row.Count("two_sided") == 1;
            double critical = EquicorrelatedMaximum.CriticalValue(row.Number("alpha"), row.Number("k"), row.Number("rho"), twoSided);
            row.Agrees("critical", critical);
            Assert.Equal(row.Number("alpha"), EquicorrelatedMaximum.PValue(critical, row.Number("k"), row.Number("rho"), twoSided), 1e-10);
        }
    }

    [Fact]
    public void Independent_and_equal_tests_are_the_ends()
    {
        Assert.Equal(4, EffectiveTests.Of(Square([[1, 0, 0, 0], [0, 1, 0, 0], [0, 0, 1, 0], [0, 0, 0, 1]])).LiJi);
        Assert.Equal(1, EffectiveTests.Of(Square([[1, 1], [1, 1]])).Galwey, 1e-9);
        Assert.Equal(EquicorrelatedMaximum.CriticalValue(0.05, 1, 0.5), EquicorrelatedMaximum.CriticalValue(0.05, 50, 1), 1e-12);
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentException>("correlation", () => EffectiveTests.Of(new double[2, 3]));
        Assert.Throws<ArgumentOutOfRangeException>("correlation", () => EffectiveTests.Of(Square([[1, 0.5], [0.4, 1]])));
        Assert.Throws<ArgumentOutOfRangeException>("correlation", () => EffectiveTests.Of(Square([[1, double.NaN], [double.NaN, 1]])));
        Assert.Throws<ArgumentOutOfRangeException>("correlation", () => EffectiveTests.Of(Square([[1, 0.9, -0.9], [0.9, 1, 0.9], [-0.9, 0.9, 1]])));
        Assert.Throws<ArgumentOutOfRangeException>("correlation", () => EquicorrelatedMaximum.PValue(2, 3, -0.1));
    }

    private static double[,] Square(double[][] rows)
    {
        double[,] matrix = new double[rows.Length, rows.Length];
        for (int i = 0; i < rows.Length; i++)
        {
            for (int j = 0; j < rows.Length; j++)
                matrix[i, j] = rows[i][j];
        }

        return matrix;
    }
}
