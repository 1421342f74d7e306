using System.Globalization;

namespace Tare;

/// <summary>Levels for K comparisons: what a family of tests costs, and what each test may use.</summary>
/// <remarks>
/// All formulas use <c>log(1+x)</c> and <c>exp(x)-1</c> forms that keep about 15 digits for levels from 1e-300 to 1-1e-12
/// and 1 to 1e12 comparisons, as long as the result is a normal number. The number of comparisons is a double, so that an
/// effective (fractional) number of tests can be given; whole numbers are exact up to 9e15.
/// </remarks>
public static class Thresholds
{
    /// <summary>Probability that at least one of K independent tests passes at <paramref name="level"/> when none should: 1-(1-level)^K.</summary>
    /// <param name="level">Level of each single test, between 0 and 1, both allowed.</param>
    /// <param name="comparisons">Number of tests K, at least 1.</param>
    /// <returns>A probability. It holds exactly for independent tests and is an upper bound for positively dependent ones.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Šidák 1967, Rectangular confidence regions for the means of multivariate normal distributions, JASA 62.</remarks>
    public static double FamilyWiseErrorRate(double level, double comparisons)
    {
        Check.Probability(level, nameof(level));
        Check.AtLeast(comparisons, 1, nameof(comparisons));
        return -Stable.Expm1(comparisons * Stable.Log1p(-level));
    }

    /// <summary>Level for each of K tests that keeps the family at <paramref name="familyLevel"/> whatever their dependence: familyLevel/K.</summary>
    /// <param name="familyLevel">Level of the family, strictly between 0 and 1.</param>
    /// <param name="comparisons">Number of tests K, at least 1.</param>
    /// <returns>The level of each test.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Dunn 1961, Multiple comparisons among means, JASA 56.</remarks>
    public static double Bonferroni(double familyLevel, double comparisons)
    {
        Check.Level(familyLevel, nameof(familyLevel));
        Check.AtLeast(comparisons, 1, nameof(comparisons));
        return familyLevel / comparisons;
    }

    /// <summary>Level for each of K tests that keeps the family at <paramref name="familyLevel"/> when they are independent or positively orthant dependent: 1-(1-familyLevel)^(1/K).</summary>
    /// <param name="familyLevel">Level of the family, strictly between 0 and 1.</param>
    /// <param name="comparisons">Number of tests K, at least 1.</param>
    /// <returns>The level of each test, never below Bonferroni's.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Šidák 1967, JASA 62.</remarks>
    public static double Sidak(double familyLevel, double comparisons)
    {
        Check.Level(familyLevel, nameof(familyLevel));
        Check.AtLeast(comparisons, 1, nameof(comparisons));
        return -Stable.Expm1(Stable.Log1p(-familyLevel) / comparisons);
    }

    /// <summary>Number of independent tests at <paramref name="level"/> each that together reach <paramref name="familyLevel"/>, as a real number: log(1-familyLevel)/log(1-level).</summary>
    /// <param name="level">Level of each single test, strictly between 0 and 1.</param>
    /// <param name="familyLevel">Level of the family, strictly between 0 and 1.</param>
    /// <returns>A number above 0; below 1 when <paramref name="level"/> exceeds <paramref name="familyLevel"/>.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Šidák 1967, solved for K.</remarks>
    public static double LooksAtFamilyLevel(double level, double familyLevel)
    {
        Check.Level(level, nameof(level));
        Check.Level(familyLevel, nameof(familyLevel));
        return Stable.Log1p(-familyLevel) / Stable.Log1p(-level);
    }

    /// <summary>How many independent tests at <paramref name="level"/> each fit into <paramref name="familyLevel"/>: the whole part of <see cref="LooksAtFamilyLevel"/>.</summary>
    /// <param name="level">Level of each single test, strictly between 0 and 1.</param>
    /// <param name="familyLevel">Level of the family, strictly between 0 and 1.</param>
    /// <returns>A count, 0 when not even one test fits; <see cref="long.MaxValue"/> when it does not fit a long.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    public static long LooksAllowed(double level, double familyLevel)
    {
        double looks = LooksAtFamilyLevel(level, familyLevel);
        if (looks >= long.MaxValue)
            return long.MaxValue;
        // A quotient that is a whole number but for rounding must not lose one.
        double next = Math.Ceiling(looks);
        return next - looks <= 1e-14 * next ? (long)next : (long)Math.Floor(looks);
    }

    /// <summary>Rounds a level down to a number of significant digits, so that what is shown never promises more than holds.</summary>
    /// <param name="value">A finite number of at least 0.</param>
    /// <param name="digits">Significant digits, 1 to 15.</param>
    /// <returns>The largest number with so many digits that is not above <paramref name="value"/>.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    public static double RoundDown(double value, int digits = 3)
    {
        Check.AtLeast(value, 0, nameof(value));
        if (digits < 1 || digits > 15)
            throw Check.OutOfRange(nameof(digits), digits, "must lie between 1 and 15");
        if (value == 0)
            return 0;
        // By digits, not by a product with a power of ten, which would turn 0.003 into 0.00299.
        string text = value.ToString("E16", CultureInfo.InvariantCulture);
        string rounded = value.ToString("E" + (digits - 1).ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        if (double.Parse(rounded, CultureInfo.InvariantCulture) <= value)
            return double.Parse(rounded, CultureInfo.InvariantCulture);
        int exponent = text.IndexOf('E');
        string cut = text.Substring(0, digits == 1 ? 1 : digits + 1) + text.Substring(exponent);
        return double.Parse(cut, CultureInfo.InvariantCulture);
    }
}
