namespace Tare.Tests.Numerics;

/// <summary>Special functions against 50-digit values (mpmath 1.2.1; see Reference/schema.csv).</summary>
public class SpecialFunctionTests
{
    [Fact]
    public void Log_gamma()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("special_lgamma.csv"))
            row.AgreesAbsolutely("lgamma", Gamma.Log(row.Number("x")), 1e-14);
    }

    [Fact]
    public void Normal_tails()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("special_normal.csv"))
        {
            double z = row.Number("x");
            row.Agrees("cdf", Normal.Cdf(z));
            row.Agrees("sf", Normal.Upper(z));
            row.Agrees("log_sf", Normal.LogUpper(z));
            row.Agrees("log_cdf", Normal.LogUpper(-z));
        }
    }

    [Fact]
    public void Normal_quantiles()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("special_normal_quantile.csv"))
            row.AgreesAbsolutely("upper_quantile", Normal.UpperQuantile(row.Number("p")));
    }

    [Fact]
    public void Incomplete_beta()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("special_beta.csv"))
        {
            double x = row.Number("x");
            Tails tails = Beta.Tails(x, 1 - x, row.Number("a"), row.Number("b"));
            row.Agrees("i", tails.Lower);
            row.Agrees("one_minus_i", tails.Upper);
            row.Agrees("log_i", tails.LogLower);
        }
    }

    [Fact]
    public void Incomplete_beta_inverse()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("special_beta_quantile.csv"))
        {
            double p = row.Number("p");
            row.Agrees("quantile", Beta.Quantile(p, 1 - p, row.Number("a"), row.Number("b")));
        }
    }

    [Fact]
    public void Student_t_tails()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("special_t.csv"))
        {
            Tails tails = StudentT.Tails(row.Number("t"), row.Number("df"));
            row.Agrees("cdf", tails.Lower);
            row.Agrees("sf", tails.Upper);
            row.Agrees("log_sf", tails.LogUpper);
        }
    }

    [Fact]
    public void Student_t_quantiles()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("special_t_quantile.csv"))
            row.Agrees("quantile", StudentT.UpperQuantile(row.Number("upper_p"), row.Number("df")));
    }

    [Fact]
    public void Chi_square_tails()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("special_chi2.csv"))
        {
            Tails tails = ChiSquare.Tails(row.Number("x"), row.Number("df"));
            row.Agrees("cdf", tails.Lower);
            row.Agrees("sf", tails.Upper);
            row.Agrees("log_sf", tails.LogUpper);
        }
    }

    [Fact]
    public void F_tails()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("special_f.csv"))
        {
            Tails tails = FisherF.Tails(row.Number("f"), row.Number("df1"), row.Number("df2"));
            row.Agrees("cdf", tails.Lower);
            row.Agrees("sf", tails.Upper);
        }
    }

    [Fact]
    public void Binomial_law()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("special_binomial.csv"))
        {
            long k = row.Count("k"), n = row.Count("n");
            double p = row.Number("p");
            row.Agrees("log_pmf", Binomial.LogPmf(k, n, p));
            row.Agrees("cdf", Binomial.AtMost(k, n, p));
            row.Agrees("sf_inclusive", Binomial.AtLeast(k, n, p));
        }
    }
}
