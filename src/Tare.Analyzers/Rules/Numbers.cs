using System.Globalization;

namespace Tare.Analyzers.Rules;

/// <summary>The numbers in messages: stable forms, invariant culture, levels rounded down.</summary>
internal static class Numbers
{
    /// <summary>1 - (1 - level)^k, by log1p and expm1 series where the direct form loses digits.</summary>
    public static double FamilyWise(double level, double k) => -Expm1(k * Log1p(-level));

    public static double Corrected(double familyLevel, double k, bool sidak) =>
        sidak ? -Expm1(Log1p(-familyLevel) / k) : familyLevel / k;

    public static string Percent(double share) => (share * 100).ToString(share > 0.9995 ? "0.0##" : "0.0", CultureInfo.InvariantCulture) + " %";

    /// <summary>Three significant digits, rounded down, so that the level shown is never too generous.</summary>
    public static string Level(double level)
    {
        if (level <= 0)
            return "0";
        double scale = Math.Pow(10, 2 - Math.Floor(Math.Log10(level)));
        double down = Math.Floor((level * scale) + 1e-9) / scale;
        return down.ToString(down < 1e-4 ? "0.##E-0" : "0.#########", CultureInfo.InvariantCulture);
    }

    public static string Plain(double number) => number.ToString("0.##########", CultureInfo.InvariantCulture);

    private static double Log1p(double x)
    {
        double u = 1 + x;
        return u == 1 ? x : Math.Log(u) * x / (u - 1);
    }

    private static double Expm1(double x)
    {
        if (Math.Abs(x) < 1e-5)
            return x + (x * x / 2);
        return Math.Exp(x) - 1;
    }
}
