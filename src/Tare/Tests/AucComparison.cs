namespace Tare;

/// <summary>Two models' areas under the ROC curve on the same rows.</summary>
/// <param name="First">AUC of the first model.</param>
/// <param name="Second">AUC of the second model.</param>
/// <param name="FirstVariance">DeLong's variance of the first.</param>
/// <param name="SecondVariance">DeLong's variance of the second.</param>
/// <param name="Covariance">DeLong's covariance, since the rows are the same.</param>
/// <param name="Z">Difference over its standard error; infinite when the difference has no variance, 0 when there is no difference either.</param>
/// <param name="PValue">p-value in [0,1] for the side tested.</param>
/// <param name="Side">Which difference was tested.</param>
/// <param name="Degenerate">True when the difference has no variance.</param>
public readonly record struct AucComparison(
    double First, double Second, double FirstVariance, double SecondVariance, double Covariance, double Z, double PValue, Side Side, bool Degenerate)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>DeLong test: AUC 0.6386 against 0.3655, z = 2.832, p = 0.004626</c>.</returns>
    public override string ToString() =>
        $"DeLong test: AUC {Plain.Number(First)} against {Plain.Number(Second)}, z = {Plain.Number(Z)}, p = {Plain.Number(PValue)}"
        + (Side == Side.TwoSided ? "" : Side == Side.Greater ? ", greater" : ", less")
        + (Degenerate ? " (degenerate data)" : "");
}
