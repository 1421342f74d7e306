namespace Tare;

/// <summary>The best accuracy that K candidates without skill show by luck.</summary>
/// <param name="Rows">Test rows.</param>
/// <param name="Baseline">Chance of each candidate to get a row right.</param>
/// <param name="Candidates">Number of candidates.</param>
/// <param name="Mean">Mean of the best accuracy.</param>
/// <param name="StandardDeviation">Its standard deviation.</param>
public readonly record struct BestAccuracy(long Rows, double Baseline, double Candidates, double Mean, double StandardDeviation)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>best of 60 without skill on 200 rows at baseline 0.5: accuracy 0.5812 on average, standard deviation 0.01609</c>.</returns>
    public override string ToString() =>
        $"best of {Plain.Number(Candidates)} without skill on {Plain.Count(Rows)} rows at baseline {Plain.Number(Baseline)}: "
        + $"accuracy {Plain.Number(Mean)} on average, standard deviation {Plain.Number(StandardDeviation)}";
}
