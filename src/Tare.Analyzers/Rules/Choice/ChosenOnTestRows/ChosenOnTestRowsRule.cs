using Microsoft.CodeAnalysis;
using Tare.Analyzers.Flow;

namespace Tare.Analyzers.Rules.Choice;

/// <summary>TARE101: a candidate is taken because of its score on test rows.</summary>
internal sealed class ChosenOnTestRows : IRule
{
    public const string Id = "TARE101";

    public static readonly DiagnosticDescriptor Rule = Rules.Rule.Describe(
        Id,
        "Candidate chosen on test rows",
        "{0}",
        "The best of K scores on the rows that should judge it flatters the winner. Choose on validation rows and score the winner once on the test rows, or hold every candidate to a level corrected for all of them.");

    public IEnumerable<Finding> Find(Reading reading)
    {
        foreach (var choice in reading.Facts.Choices)
        {
            if (!choice.Kept || choice.IsPValue || choice.Kind == ChoiceKind.Extreme)
                continue;
            if (reading.RowsOf(choice) is not { Role: Role.Test } rows)
                continue;
            var place = reading.Climb(choice.Place, choice.Frame, reading.SameRole(choice, reading.Roles.Of(rows.Rows.Id).Role), out var helper);
            double? k = reading.SizeOf(choice, rows.Family);
            string what = choice.ScoreName is { } name ? $"'{name}' is" : "The winner is taken by";
            string extreme = choice.LowerWins ? "lowest" : "highest";
            string scores = k is null
                ? $"score of {ChoiceFacts.Candidates(reading, choice, rows.Family)}"
                : $"of {ChoiceFacts.Candidates(reading, choice, rows.Family)} scores";
            string message =
                $"{what} the {extreme} {scores} on test rows '{Reading.NameOf(rows.Rows)}', so it flatters the winner. "
                + $"{ChoiceFacts.Odds(reading, k)} Choose on validation rows, or {ChoiceFacts.Requirement(reading, k)}.";
            var finding = new Finding(Rule, place, message);
            ChoiceFacts.Describe(finding, reading, choice, rows);
            yield return finding.Beside("helper", helper);
        }
    }
}
