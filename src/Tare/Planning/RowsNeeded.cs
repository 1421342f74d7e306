namespace Tare;

/// <summary>Test rows an exact test needs. Its power goes up and down like a saw with the number of rows, so there are two answers.</summary>
/// <param name="Level">Level of each test.</param>
/// <param name="First">Smallest number of rows that reaches the power.</param>
/// <param name="PowerAtFirst">Power there.</param>
/// <param name="FromThenOn">Smallest number of rows after which the power never drops below again; plan with this one.</param>
/// <param name="PowerFromThenOn">Power there.</param>
/// <param name="NormalApproximation">The normal approximation's answer, for comparison.</param>
public readonly record struct RowsNeeded(
    double Level, long First, double PowerAtFirst, long FromThenOn, double PowerFromThenOn, double NormalApproximation)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>169 rows at level 0.05 (power 0.8231; 158 just reach it)</c>.</returns>
    public override string ToString() =>
        $"{Plain.Count(FromThenOn)} rows at level {Plain.Level(Level)} (power {Plain.Number(PowerFromThenOn)}; {Plain.Count(First)} just reach it)";
}
