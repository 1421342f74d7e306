using CsCheck;
using Oracle = MathNet.Numerics.Distributions.Binomial;

namespace Tare.Tests;

public class ExactTestTests
{
    /// <summary>R 4.2.2 binom.test, and mid-p from pbinom/dbinom (see Reference/schema.csv).</summary>
    [Fact]
    public void Binomial_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("binom_test.csv"))
        {
            long x = row.Count("x"), n = row.Count("n");
            double p0 = row.Number("p0");
            row.Agrees("p_two_sided", BinomialTest.PValue(x, n, p0));
            row.Agrees("p_less", BinomialTest.PValue(x, n, p0, Side.Less));
            row.Agrees("p_greater", BinomialTest.PValue(x, n, p0, Side.Greater));
            row.Agrees("midp_less", BinomialTest.MidP(x, n, p0, Side.Less));
            row.Agrees("midp_greater", BinomialTest.MidP(x, n, p0, Side.Greater));
            row.Agrees("midp_two_sided", BinomialTest.MidP(x, n, p0));
        }
    }

    [Fact]
    public void Sign_test_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("sign_test.csv"))
        {
            long positive = row.Count("positive"), negative = row.Count("negative");
            row.Agrees("p_two_sided", SignTest.PValue(positive, negative));
            row.Agrees("p_greater", SignTest.PValue(positive, negative, Side.Greater));
            row.Agrees("p_less", SignTest.PValue(positive, negative, Side.Less));
        }
    }

    [Fact]
    public void McNemar_agrees_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("mcnemar.csv"))
        {
            long b = row.Count("b"), c = row.Count("c");
            row.Agrees("exact_two_sided", McNemarTest.Exact(b, c));
            row.Agrees("exact_first_better", McNemarTest.Exact(b, c, Side.Greater));
            row.Agrees("midp_two_sided", McNemarTest.MidP(b, c));
        }
    }

    /// <summary>MathNet.Numerics as oracle where it is accurate: tails that are not small, below the last count (where it fails).</summary>
    [Fact]
    public void Tails_agree_with_MathNet() =>
        Gen.Select(Gen.Int[1, 300], Gen.Double[0.01, 0.99]).SelectMany((n, p) => Gen.Int[0, n - 1].Select(k => (n, p, k))).Sample(t =>
        {
            double want = Oracle.CDF(t.p, t.n, t.k);
            return Math.Abs(want - BinomialTest.PValue(t.k, t.n, t.p, Side.Less)) < 1e-9;
        });

    /// <summary>Exact sums of the law itself, by whole-number binomial coefficients.</summary>
    [Theory]
    [InlineData(14, 20, 0.0576591491699219)]
    [InlineData(10, 10, 0.0009765625)]
    [InlineData(5, 10, 0.623046875)]
    public void Coin_tails(int hits, int rows, double want) =>
        Assert.Equal(want, BinomialTest.PValue(hits, rows, 0.5, Side.Greater), 1e-14);

    [Fact]
    public void Tails_overlap_in_the_outcome_seen() =>
        Gen.Select(Gen.Long[1, 5000], Gen.Double[0, 1]).SelectMany((n, p) => Gen.Long[0, n].Select(k => (n, p, k))).Sample(t =>
        {
            double less = BinomialTest.PValue(t.k, t.n, t.p, Side.Less);
            double greater = BinomialTest.PValue(t.k, t.n, t.p, Side.Greater);
            double both = BinomialTest.PValue(t.k, t.n, t.p);
            return Math.Abs(less + greater - 1 - Binomial.Pmf(t.k, t.n, t.p)) < 1e-11
                && both <= 1 && both >= Math.Min(less, greater) * (1 - 1e-12)
                && Math.Abs(greater - BinomialTest.PValue(t.n - t.k, t.n, 1 - t.p, Side.Less)) < 1e-11;
        });

    [Fact]
    public void Far_tails_keep_their_digits()
    {
        // 2^-900, and a sum of two terms beside it: 901 * 2^-900.
        Assert.Equal(1, BinomialTest.PValue(900, 900, 0.5, Side.Greater) / Math.Pow(2, -900), 1e-12);
        Assert.Equal(1, BinomialTest.PValue(899, 900, 0.5, Side.Greater) / (901 * Math.Pow(2, -900)), 1e-12);
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("rows", () => BinomialTest.PValue(0, 0, 0.5));
        Assert.Throws<ArgumentOutOfRangeException>("hits", () => BinomialTest.PValue(-1, 5, 0.5));
        Assert.Throws<ArgumentOutOfRangeException>("hits", () => BinomialTest.PValue(6, 5, 0.5));
        Assert.Throws<ArgumentOutOfRangeException>("baseline", () => BinomialTest.PValue(1, 5, double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>("baseline", () => BinomialTest.MidP(1, 5, 1.5));
        Assert.Throws<ArgumentOutOfRangeException>("side", () => BinomialTest.PValue(1, 5, 0.5, (Side)9));
        Assert.Throws<ArgumentOutOfRangeException>("onlyFirst", () => McNemarTest.Exact(-1, 5));
        Assert.Throws<ArgumentOutOfRangeException>("onlySecond", () => McNemarTest.MidP(1, -5));
        Assert.Throws<ArgumentException>("differences", () => SignTest.PValue([]));
        Assert.Throws<ArgumentOutOfRangeException>("differences", () => SignTest.PValue([1, double.NaN]));
    }
}
