namespace Tare;

/// <summary>Outcome of a t test of a mean difference, with its interval.</summary>
/// <param name="Test">Name of the test.</param>
/// <param name="Mean">Mean difference.</param>
/// <param name="StandardError">Standard error the test sets it against.</param>
/// <param name="T">Mean over standard error; infinite when the differences are all equal and not zero, 0 when all are zero.</param>
/// <param name="DegreesOfFreedom">Degrees of freedom.</param>
/// <param name="PValue">p-value in [0,1], never NaN.</param>
/// <param name="Side">Which departure from zero was tested.</param>
/// <param name="Interval">Two-sided confidence interval of the mean difference.</param>
/// <param name="Degenerate">True when the differences do not vary at all: read the p-value with care.</param>
public readonly record struct TTestResult(
    string Test, double Mean, double StandardError, double T, double DegreesOfFreedom, double PValue, Side Side, Interval Interval, bool Degenerate)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>paired t test: mean difference 0.75, -0.5298 to 2.03 (95 % Student t), t = 1.326 on 9 df, p = 0.2176</c>.</returns>
    public override string ToString() =>
        $"{Test}: mean difference {Plain.Number(Mean)}, {Interval}, t = {Plain.Number(T)} on {Plain.Number(DegreesOfFreedom)} df, p = {Plain.Number(PValue)}"
        + (Side == Side.TwoSided ? "" : Side == Side.Greater ? ", greater" : ", less")
        + (Degenerate ? " (degenerate data)" : "");

    internal static TTestResult Of(string test, double mean, double error, double df, Side side, double confidence)
    {
        bool degenerate = error == 0;
        double t = degenerate ? (mean == 0 ? 0 : mean > 0 ? double.PositiveInfinity : double.NegativeInfinity) : mean / error;
        double p = degenerate && mean == 0 ? 1 : TestResult.OfTails(StudentT.Tails(t, df), side);
        double reach = degenerate ? 0 : error * StudentT.UpperQuantile(0.5 * (1 - confidence), df);
        return new TTestResult(test, mean, error, t, df, p, side, new Interval(mean - reach, mean + reach, confidence, "Student t"), degenerate);
    }
}
