using System.Globalization;

namespace Tare;

/// <summary>Numbers as the plain result lines show them, always in the invariant culture.</summary>
internal static class Plain
{
    /// <summary>Four significant digits.</summary>
    public static string Number(double value) => value.ToString("G4", CultureInfo.InvariantCulture);

    /// <summary>A level, rounded down to three digits so that the line never promises more than holds.</summary>
    public static string Level(double value) => Thresholds.RoundDown(value).ToString("G15", CultureInfo.InvariantCulture);

    /// <summary>A share as percent, with as many digits as it takes not to show 100 %.</summary>
    public static string Percent(double share)
    {
        double percent = 100 * share;
        string text = percent.ToString("G4", CultureInfo.InvariantCulture);
        if (text == "100" && share < 1)
            text = percent.ToString("G15", CultureInfo.InvariantCulture);
        return text + " %";
    }

    public static string Count(long value) => value.ToString(CultureInfo.InvariantCulture);
}
