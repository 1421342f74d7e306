using Tare.Analyzers.Flow;

namespace Tare.Analyzers.Rules.Choice;

/// <summary>Claims that a winner's own score makes.</summary>
internal static class Claims
{
    /// <summary>One entry a reporting call: the claim, the choice whose score it is, and the rows that chose.</summary>
    public static IEnumerable<(Claim Claim, Flow.Choice Choice, ChoiceRows Rows)> Of(Reading reading, params Role[] roles)
    {
        foreach (var claim in reading.Facts.Claims.Values)
        {
            (Claim, Flow.Choice, ChoiceRows)? found = null;
            bool onTest = false;
            foreach (int id in claim.Value.Wins)
            {
                var choice = reading.Facts.Choices[id];
                if (choice.IsPValue || choice.Family.Overlaps(claim.Running))
                    continue;
                if (reading.RowsOf(choice) is not { } rows || !CarriesScore(reading, claim, choice, rows))
                    continue;
                onTest |= rows.Role == Role.Test;
                if (Array.IndexOf(roles, rows.Role) >= 0)
                    found ??= (claim, choice, rows);
            }

            if (found is not null && (onTest == (found.Value.Item3.Role == Role.Test)))
                yield return found.Value;
        }
    }

    private static bool CarriesScore(Reading reading, Claim claim, Flow.Choice choice, ChoiceRows rows)
    {
        var claimed = Tag.At(claim.Value.Tags, Level.Aggregate);
        if (claimed.Contains(rows.Rows.Id))
            return true;
        foreach (var same in reading.SameRole(choice, reading.Roles.Of(rows.Rows.Id).Role))
        {
            if (claimed.Contains(same.Id))
                return true;
        }

        return false;
    }
}
