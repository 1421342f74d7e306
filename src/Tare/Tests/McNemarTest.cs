namespace Tare;

/// <summary>Exact comparison of two classifiers on the same rows, from the rows on which exactly one of them is right.</summary>
/// <remarks>It assumes independent rows. The counts can come from anywhere, such as a grouped query, and can be added up over parts.</remarks>
public static class McNemarTest
{
    /// <summary>Exact p-value: given b+c discordant rows, b follows a binomial law with probability 1/2.</summary>
    /// <param name="onlyFirst">b: rows only the first classifier gets right, at least 0.</param>
    /// <param name="onlySecond">c: rows only the second classifier gets right, at least 0.</param>
    /// <param name="side"><see cref="Side.Greater"/>: the first is better.</param>
    /// <returns>A p-value in [0,1]; 1 when no row is discordant.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A count is negative.</exception>
    /// <remarks>Source: McNemar 1947, Note on the sampling error of the difference between correlated proportions, Psychometrika 12.</remarks>
    public static double Exact(long onlyFirst, long onlySecond, Side side = Side.TwoSided)
    {
        Check.AtLeast(onlyFirst, 0, nameof(onlyFirst));
        Check.AtLeast(onlySecond, 0, nameof(onlySecond));
        long discordant = onlyFirst + onlySecond;
        return discordant == 0 ? 1 : BinomialTest.PValue(onlyFirst, discordant, 0.5, side);
    }

    /// <summary>Mid-p value: less conservative than the exact one; it may exceed its level slightly.</summary>
    /// <param name="onlyFirst">b: rows only the first classifier gets right, at least 0.</param>
    /// <param name="onlySecond">c: rows only the second classifier gets right, at least 0.</param>
    /// <param name="side"><see cref="Side.Greater"/>: the first is better.</param>
    /// <returns>A mid-p value in [0,1]; 1 when no row is discordant.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A count is negative.</exception>
    /// <remarks>Source: Fagerland, Lydersen and Laake 2013, The McNemar test for binary matched-pairs data, BMC Med. Res. Methodol. 13.</remarks>
    public static double MidP(long onlyFirst, long onlySecond, Side side = Side.TwoSided)
    {
        Check.AtLeast(onlyFirst, 0, nameof(onlyFirst));
        Check.AtLeast(onlySecond, 0, nameof(onlySecond));
        long discordant = onlyFirst + onlySecond;
        return discordant == 0 ? 1 : BinomialTest.MidP(onlyFirst, discordant, 0.5, side);
    }
}
