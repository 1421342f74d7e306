namespace Tare;

/// <summary>A statistic with its bootstrap intervals.</summary>
/// <param name="Estimate">The statistic on the rows themselves.</param>
/// <param name="StandardError">Standard deviation of the replicates.</param>
/// <param name="Percentile">Quantiles of the replicates.</param>
/// <param name="Basic">Quantiles turned about the estimate.</param>
/// <param name="BiasCorrected">BCa: quantiles at levels corrected for bias and skewness; the one to prefer. Equals <paramref name="Percentile"/> when degenerate.</param>
/// <param name="BiasCorrection">z0: normal quantile of the share of replicates below the estimate.</param>
/// <param name="Acceleration">Skewness of the jackknife values over six.</param>
/// <param name="Degenerate">True when all replicates lie on one side of the estimate, so that no bias correction exists.</param>
public readonly record struct BootstrapResult(
    double Estimate, double StandardError, Interval Percentile, Interval Basic, Interval BiasCorrected, double BiasCorrection,
    double Acceleration, bool Degenerate)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>estimate 1.244, 0.6216 to 1.835 (95 % BCa bootstrap)</c>.</returns>
    public override string ToString() => $"estimate {Plain.Number(Estimate)}, {BiasCorrected}" + (Degenerate ? " (degenerate data)" : "");
}
