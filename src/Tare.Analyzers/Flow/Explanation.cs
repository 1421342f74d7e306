using System.Text;
using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Flow;

/// <summary>The facts of one walk as text, so that a missed or false finding can be understood by anyone.</summary>
internal static class Explanation
{
    public static string Of(Reading reading, Func<SyntaxNode, bool> wanted)
    {
        var text = new StringBuilder();
        var facts = reading.Facts;
        foreach (var rows in facts.Rows)
        {
            var (role, evidence) = reading.Roles.Of(rows.Id);
            if (rows.Syntax is not null && !wanted(rows.Syntax))
                continue;
            text.Append($"rows #{rows.Id} {role} ({evidence}) {rows.Source}");
            if (rows.Parent is not null)
                text.Append($" part of #{rows.Parent.Id} [{rows.Key}]");
            if (rows.Names.Count > 0)
                text.Append(" named " + string.Join(", ", rows.Names.Select(n => n.Name)));
            if (!rows.Varies.IsEmpty)
                text.Append(" differs with " + rows.Varies);
            text.AppendLine(Where(rows.Syntax));
        }

        foreach (var origin in facts.Origins)
        {
            if (origin.Syntax is not null && wanted(origin.Syntax))
                text.AppendLine($"origin #{origin.Id} '{origin.Name}' size {origin.Size?.ToString() ?? "?"} {origin.CountText} rows {origin.Rows}{Where(origin.Syntax)}");
        }

        foreach (var choice in facts.Choices)
        {
            if (!wanted(choice.Place))
                continue;
            var rows = reading.RowsOf(choice);
            text.AppendLine($"choice #{choice.Id} {choice.Kind} family {choice.Family} by rows only {choice.RowFamily} rows {choice.Rows} kept {choice.Kept} straight {choice.StraightCount} -> {(rows is null ? "nothing" : $"{rows.Role} #{rows.Rows.Id}")}{Where(choice.Place)}");
        }

        foreach (var claim in facts.Claims.Values)
        {
            if (wanted(claim.Place))
                text.AppendLine($"claim tags {Tags(claim.Value.Tags)} won {claim.Value.Wins} running {claim.Running}{Where(claim.Place)}");
        }

        foreach (var test in facts.LevelTests)
        {
            if (wanted(test.Place))
                text.AppendLine($"level test {test.PName} against {test.LevelName ?? test.Level.Number?.ToString()} family {test.Family} conjunction {test.Conjunction}{Where(test.Place)}");
        }

        foreach (var comparison in facts.Comparisons)
        {
            if (comparison.Operation is not null && wanted(comparison.Operation.Syntax))
                text.AppendLine($"comparison left {Tags(comparison.Left.Tags)} varies {comparison.Left.Varies} right {Tags(comparison.Right.Tags)} varies {comparison.Right.Varies} sites {comparison.Left.Sites}/{comparison.Right.Sites}{Where(comparison.Operation.Syntax)}");
        }

        foreach (var meeting in facts.Meetings.GroupBy(m => (m.Fitted, m.Scored, m.Stored)))
            text.AppendLine($"{(meeting.Key.Stored ? "model" : "statistic")} of #{meeting.Key.Fitted} applied to #{meeting.Key.Scored}");
        if (facts.OverBudget)
            text.AppendLine("the budget ran out: nothing is reported here");
        return text.ToString();
    }

    private static string Tags(IdSet tags)
    {
        var parts = new List<string>();
        foreach (int tag in tags)
            parts.Add("#" + Tag.Rows(tag) + "." + Tag.LevelOf(tag));
        return "{" + string.Join(" ", parts) + "}";
    }

    private static string Where(SyntaxNode? syntax) => syntax is null ? "" : $"  at line {syntax.GetLocation().GetLineSpan().StartLinePosition.Line + 1}";
}
