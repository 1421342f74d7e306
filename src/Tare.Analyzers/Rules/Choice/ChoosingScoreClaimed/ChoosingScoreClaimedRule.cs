using Microsoft.CodeAnalysis;
using Tare.Analyzers.Flow;

namespace Tare.Analyzers.Rules.Choice;

/// <summary>TARE108: the score that chose is claimed, and no untouched rows judge the winner.</summary>
internal sealed class ChoosingScoreClaimed : IRule
{
    public const string Id = "TARE108";

    public static readonly DiagnosticDescriptor Rule = Rules.Rule.Describe(
        Id,
        "Choosing score claimed",
        "{0}",
        "The validation or cross-validation score that won the choice is claimed, and the winner is never scored on untouched rows.",
        DiagnosticSeverity.Info);

    public IEnumerable<Finding> Find(Reading reading)
    {
        foreach (var (claim, choice, rows) in Claims.Of(reading, Role.Validation, Role.Unsplit))
        {
            if (reading.Roles.WinnerScoredElsewhere(choice))
                continue;
            double? k = reading.SizeOf(choice, rows.Family);
            string name = claim.Name ?? choice.ScoreName ?? "The score";
            string message =
                $"'{name}' won a choice among {ChoiceFacts.Candidates(reading, choice, rows.Family)}{(k is null ? "" : " candidates")} on {ChoiceFacts.RoleWord(rows.Role)} '{Reading.NameOf(rows.Rows)}' "
                + $"and is claimed, yet the winner is never scored on rows that had no part in the choice. {ChoiceFacts.Odds(reading, k)} Keep test rows back and score the winner on them once.";
            var finding = new Finding(Rule, claim.Place, message);
            ChoiceFacts.Describe(finding, reading, choice, rows);
            yield return finding.Beside("choice", choice.Place);
        }
    }
}
