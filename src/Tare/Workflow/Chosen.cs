namespace Tare;

/// <summary>A winner chosen on validation rows, with all scores. Its own score flatters it: score the winner once on test rows and claim that.</summary>
/// <typeparam name="TCandidate">Type of a candidate.</typeparam>
/// <param name="Winner">The candidate taken; the first in the given order among equals.</param>
/// <param name="Index">Its place in the given order.</param>
/// <param name="Score">Its validation score.</param>
/// <param name="Scores">All validation scores, in the given order.</param>
public sealed record Chosen<TCandidate>(TCandidate Winner, int Index, double Score, IReadOnlyList<double> Scores)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>chose candidate 17 of 60 with validation score 0.6133 (flattered by the choice)</c>.</returns>
    public override string ToString() =>
        $"chose candidate {Plain.Count(Index + 1)} of {Plain.Count(Scores.Count)} with validation score {Plain.Number(Score)}"
        + (Scores.Count > 1 ? " (flattered by the choice)" : "");
}
