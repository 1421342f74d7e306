namespace Tare;

/// <summary>Outcome of a hypothesis test.</summary>
/// <param name="Test">Name of the test.</param>
/// <param name="Statistic">Its statistic; infinite when the data leave no variation at all to set a difference against.</param>
/// <param name="PValue">p-value in [0,1], never NaN.</param>
/// <param name="Side">Which departure from no difference was tested.</param>
/// <param name="Degenerate">True when the data are well formed but carry nothing to test with (all equal, no discordant row): read the p-value with care.</param>
public readonly record struct TestResult(string Test, double Statistic, double PValue, Side Side, bool Degenerate = false)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>Cochran Q test: statistic 8.222, p = 0.01639</c>.</returns>
    public override string ToString() =>
        $"{Test}: statistic {Plain.Number(Statistic)}, p = {Plain.Number(PValue)}"
        + (Side == Side.TwoSided ? "" : Side == Side.Greater ? ", greater" : ", less")
        + (Degenerate ? " (degenerate data)" : "");

    internal static double OfTails(Tails tails, Side side) => side switch
    {
        Side.Greater => tails.Upper,
        Side.Less => tails.Lower,
        Side.TwoSided => Math.Min(1, 2 * Math.Min(tails.Lower, tails.Upper)),
        _ => throw Check.OutOfRange(nameof(side), side, "is no side"),
    };
}
