using Microsoft.CodeAnalysis;
using Tare.Analyzers.Flow;

namespace Tare.Analyzers.Rules.Choice;

/// <summary>What the rules about choices say alike: names, numbers, places beside the finding.</summary>
internal static class ChoiceFacts
{
    public static string Candidates(Reading reading, Flow.Choice choice, IdSet family)
    {
        if (reading.SizeOf(choice, family) is { } k)
            return Numbers.Plain(k);
        return reading.GridName(family) is { } grid ? $"the candidates in '{grid}'" : "the candidates";
    }

    /// <summary>How likely a family without skill passes, and the level that would make up for it.</summary>
    public static string Odds(Reading reading, double? size)
    {
        double k = size ?? 10;
        double level = reading.Options.FamilyLevel;
        string odds = Numbers.Percent(Numbers.FamilyWise(level, k));
        return size is null
            ? $"If none beats the baseline, testing each at {Numbers.Plain(level)} passes at least one with probability 1 - (1 - {Numbers.Plain(level)})^K when they are independent ({odds} for K = 10)."
            : $"If none beats the baseline, testing each at {Numbers.Plain(level)} passes at least one with probability {odds} when they are independent.";
    }

    public static string Requirement(Reading reading, double? size) => size is { } k
        ? $"require p <= {Numbers.Level(Numbers.Corrected(reading.Options.FamilyLevel, k, reading.Options.Sidak))} of each"
        : $"require p <= {Numbers.Plain(reading.Options.FamilyLevel)} / K of each";

    public static string RoleWord(Role role) => role switch { Role.Test => "test rows", Role.Validation => "validation rows", _ => "rows that were never split" };

    public static void Describe(Finding finding, Reading reading, Flow.Choice choice, ChoiceRows rows)
    {
        double? k = reading.SizeOf(choice, rows.Family);
        finding
            .With("k", k is { } size ? Numbers.Plain(size) : null)
            .With("count", reading.CountText(rows.Family))
            .With("role", rows.Role.ToString().ToLowerInvariant())
            .With("evidence", rows.Evidence.ToString().ToLowerInvariant())
            .With("score", choice.ScoreName)
            .With("direction", choice.LowerWins ? "lower" : "higher")
            .With("level", k is { } n ? Numbers.Level(Numbers.Corrected(reading.Options.FamilyLevel, n, reading.Options.Sidak)) : null)
            .With("cut", CutOf(rows.Rows));
        var names = new List<string>();
        foreach (var one in reading.SameRole(choice, reading.Roles.Of(rows.Rows.Id).Role))
        {
            AddRows(finding, "rows", one, names);
        }

        finding.With("rows", string.Join(",", names));
        var training = new List<string>();
        foreach (int id in choice.Rows)
        {
            if (reading.Roles.Of(id).Role == Role.Training)
                AddRows(finding, "training", reading.Roles.Rows(id), training);
        }

        finding.With("training", string.Join(",", training));
        var validation = new List<string>();
        foreach (var one in reading.Facts.Rows)
        {
            if (rows.Role != Role.Validation && reading.Roles.Of(one.Id) is { Role: Role.Validation, Evidence: not Evidence.None } && one.Source != Source.Folds)
                AddRows(finding, "validation", one, validation);
        }

        finding.With("validation", string.Join(",", validation));
        foreach (var birth in reading.Facts.Births)
        {
            if (choice.Sites.Contains(birth.Site) && birth.Rows == rows.Rows.Id)
            {
                finding.Beside("score", birth.Place);
                break;
            }
        }

        finding.Beside("family", reading.FamilyPlace(rows.Family));
    }

    private static void AddRows(Finding finding, string label, RowSet rows, List<string> names)
    {
        bool any = false;
        foreach (var name in rows.Names)
        {
            if (name.Symbol is not { DeclaringSyntaxReferences.Length: > 0 } symbol)
                continue;
            any = true;
            if (!names.Contains(name.Name))
                names.Add(name.Name);
            finding.Beside(label, symbol.DeclaringSyntaxReferences[0].GetSyntax());
        }

        if (!any)
            finding.Beside(label, rows.Syntax);
    }

    private static string CutOf(RowSet rows)
    {
        for (var r = rows; r is not null; r = r.Parent)
        {
            if (r.Cut == Cut.Half || r.Shuffled)
                return "random";
            if (r.Cut is Cut.Tail or Cut.Head or Cut.Middle)
                return "tail";
        }

        return "unknown";
    }
}
