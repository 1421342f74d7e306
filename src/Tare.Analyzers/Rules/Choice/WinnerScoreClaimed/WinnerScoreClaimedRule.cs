using Microsoft.CodeAnalysis;
using Tare.Analyzers.Flow;

namespace Tare.Analyzers.Rules.Choice;

/// <summary>TARE102: the score that won the choice is claimed as the winner's performance.</summary>
internal sealed class WinnerScoreClaimed : IRule
{
    public const string Id = "TARE102";

    public static readonly DiagnosticDescriptor Rule = Rules.Rule.Describe(
        Id,
        "Winner's own score claimed",
        "{0}",
        "The score that won the choice is claimed as the winner's performance. It is the best of K scores and too good as an estimate.");

    public IEnumerable<Finding> Find(Reading reading)
    {
        foreach (var (claim, choice, rows) in Claims.Of(reading, Role.Test))
        {
            double? k = reading.SizeOf(choice, rows.Family);
            string name = claim.Name ?? choice.ScoreName ?? "The score";
            string message =
                $"'{name}' won a choice among {ChoiceFacts.Candidates(reading, choice, rows.Family)}{(k is null ? "" : " candidates")} on test rows '{Reading.NameOf(rows.Rows)}' and is claimed as the winner's own performance. "
                + $"{ChoiceFacts.Odds(reading, k)} Score the winner once on rows that had no part in the choice, or {ChoiceFacts.Requirement(reading, k)}.";
            var finding = new Finding(Rule, claim.Place, message);
            ChoiceFacts.Describe(finding, reading, choice, rows);
            yield return finding.Beside("choice", choice.Place);
        }
    }
}
