namespace Tare;

/// <summary>What an exact one-sided binomial test on so many rows can do.</summary>
/// <param name="Rows">Test rows.</param>
/// <param name="Level">Level of the test.</param>
/// <param name="CriticalCount">Smallest number of hits that passes; rows + 1 when the test can never pass.</param>
/// <param name="Size">Probability of passing at the baseline, at most the level.</param>
/// <param name="Power">Probability of passing at the true accuracy.</param>
public readonly record struct BinomialPower(long Rows, double Level, long CriticalCount, double Size, double Power)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>200 rows: passes from 113 hits on at level 0.05, power 0.8945</c>.</returns>
    public override string ToString() => CriticalCount > Rows
        ? $"{Plain.Count(Rows)} rows: can never pass at level {Plain.Level(Level)}"
        : $"{Plain.Count(Rows)} rows: passes from {Plain.Count(CriticalCount)} hits on at level {Plain.Level(Level)}, power {Plain.Number(Power)}";
}
