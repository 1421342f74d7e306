namespace Tare;

/// <summary>A confidence interval; a one-sided bound leaves the other end at the end of the domain.</summary>
/// <param name="Lower">Lower end.</param>
/// <param name="Upper">Upper end.</param>
/// <param name="Confidence">Confidence, strictly between 0 and 1.</param>
/// <param name="Method">Name of the method.</param>
public readonly record struct Interval(double Lower, double Upper, double Confidence, string Method)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>0.4508 to 0.5492 (95 % Clopper-Pearson)</c>.</returns>
    public override string ToString() =>
        $"{Plain.Number(Lower)} to {Plain.Number(Upper)} ({Plain.Percent(Confidence)} {Method})";
}
