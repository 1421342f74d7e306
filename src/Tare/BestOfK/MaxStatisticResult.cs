namespace Tare;

/// <summary>K candidates tested together against no difference, whatever their dependence.</summary>
/// <param name="Statistics">Each candidate's statistic: the sum of its differences, over the root of their squared sum when studentized.</param>
/// <param name="PValues">Each candidate's own p-value, not corrected.</param>
/// <param name="SingleStep">p-values corrected by the law of the largest statistic.</param>
/// <param name="StepDown">The same with each candidate compared only with those that are no better: never larger than <paramref name="SingleStep"/>.</param>
/// <param name="Patterns">Sign patterns looked at, with the observed one.</param>
/// <param name="Exact">Whether these are all patterns there are.</param>
/// <param name="Side">Which difference was tested.</param>
public sealed record MaxStatisticResult(
    IReadOnlyList<double> Statistics, IReadOnlyList<double> PValues, IReadOnlyList<double> SingleStep, IReadOnlyList<double> StepDown,
    long Patterns, bool Exact, Side Side)
{
    /// <summary>The candidate with the largest statistic, from 0; the first among equals.</summary>
    public int Best
    {
        get
        {
            int best = 0;
            for (int j = 1; j < Statistics.Count; j++)
            {
                if (Size(j) > Size(best))
                    best = j;
            }

            return best;

            double Size(int j) => Side == Side.TwoSided ? Math.Abs(Statistics[j]) : Statistics[j];
        }
    }

    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>max-statistic sign-flip test of 60 candidates: best is candidate 17, corrected p = 0.31 (10000 patterns)</c>.</returns>
    public override string ToString() =>
        $"max-statistic sign-flip test of {Plain.Count(Statistics.Count)} candidates: best is candidate {Plain.Count(Best + 1)}, "
        + $"corrected p = {Plain.Number(StepDown[Best])} ({Plain.Count(Patterns)} patterns{(Exact ? ", all there are" : "")})";
}
