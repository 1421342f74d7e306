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

    /// <summary>Chi-square form: (b-c)²/(b+c) on one degree of freedom; approximate, for many discordant rows.</summary>
    /// <param name="onlyFirst">b: rows only the first classifier gets right, at least 0.</param>
    /// <param name="onlySecond">c: rows only the second classifier gets right, at least 0.</param>
    /// <param name="continuity">Whether 1 is taken off |b-c| (not below 0).</param>
    /// <returns>The statistic and its two-sided p-value; degenerate with p = 1 when no row is discordant.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A count is negative.</exception>
    /// <remarks>Sources: McNemar 1947, Psychometrika 12; Edwards 1948, Psychometrika 13, for the correction.</remarks>
    public static TestResult ChiSquareForm(long onlyFirst, long onlySecond, bool continuity = false)
    {
        Check.AtLeast(onlyFirst, 0, nameof(onlyFirst));
        Check.AtLeast(onlySecond, 0, nameof(onlySecond));
        double discordant = (double)onlyFirst + onlySecond, distance = Math.Abs((double)onlyFirst - onlySecond);
        if (discordant == 0)
            return new TestResult("McNemar chi-square test", 0, 1, Side.TwoSided, Degenerate: true);
        if (continuity)
            distance = Math.Max(0, distance - 1);
        double statistic = distance * distance / discordant;
        return new TestResult("McNemar chi-square test", statistic, ChiSquare.Upper(statistic, 1), Side.TwoSided);
    }
}
