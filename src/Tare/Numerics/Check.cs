using System.Globalization;

namespace Tare;

/// <summary>Guards. Comparisons are written so that NaN fails them, and every message carries the value.</summary>
internal static class Check
{
    public static void Level(double value, string name)
    {
        if (!(value > 0 && value < 1))
            throw OutOfRange(name, value, "must lie strictly between 0 and 1");
    }

    public static void Probability(double value, string name)
    {
        if (!(value >= 0 && value <= 1))
            throw OutOfRange(name, value, "must lie between 0 and 1");
    }

    public static void Finite(double value, string name)
    {
        if (!IsFinite(value))
            throw OutOfRange(name, value, "must be a finite number");
    }

    public static void Positive(double value, string name)
    {
        if (!(value > 0 && IsFinite(value)))
            throw OutOfRange(name, value, "must be a finite number above 0");
    }

    public static void AtLeast(double value, double least, string name)
    {
        if (!(value >= least && IsFinite(value)))
            throw OutOfRange(name, value, $"must be a finite number of at least {Text(least)}");
    }

    public static void AtLeast(long value, long least, string name)
    {
        if (value < least)
            throw OutOfRange(name, value, $"must be at least {Text(least)}");
    }

    public static void HitsOf(long hits, long rows, string hitsName, string rowsName)
    {
        AtLeast(rows, 1, rowsName);
        if (hits < 0 || hits > rows)
            throw OutOfRange(hitsName, hits, $"must lie between 0 and {rowsName} = {Text(rows)}");
    }

    public static void PValues(ReadOnlySpan<double> values, string name)
    {
        if (values.IsEmpty)
            throw new ArgumentException("There must be at least one p-value.", name);
        for (int i = 0; i < values.Length; i++)
        {
            if (!(values[i] >= 0 && values[i] <= 1))
                throw OutOfRange(name, values[i], $"at index {i} must lie between 0 and 1");
        }
    }

    public static void FiniteRow(double value, long index, string name)
    {
        if (!IsFinite(value))
            throw OutOfRange(name, value, $"at index {Text(index)} must be a finite number");
    }

    public static T NotNull<T>(T? value, string name) where T : class =>
        value ?? throw new ArgumentNullException(name);

    public static ArgumentException UnequalLengths(string first, long firstLength, string second, long secondLength) =>
        new($"'{first}' has {Text(firstLength)} rows and '{second}' has {Text(secondLength)}; they must be parallel.", second);

    public static ArgumentException Empty(string name) => new($"'{name}' has no rows.", name);

    public static ArgumentOutOfRangeException OutOfRange(string name, object value, string rule) =>
        new(name, value, $"'{name}' = {Convert.ToString(value, CultureInfo.InvariantCulture)} {rule}.");

    public static string Text(IFormattable value) => value.ToString(null, CultureInfo.InvariantCulture);

    public static bool IsFinite(double value) => !double.IsNaN(value) && !double.IsInfinity(value);
}
