using System.Collections.Immutable;
using System.Text;

namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>Findings held against the labels of a program.</summary>
internal sealed record Score(ImmutableArray<Finding> Hits, ImmutableArray<Label> Misses, ImmutableArray<Finding> FalseReports)
{
    public static Score Empty { get; } = new([], [], []);

    public bool IsPerfect => Misses.IsEmpty && FalseReports.IsEmpty;

    /// <summary>Compares by rule, file and line; rules that are not judged do not count on either side.</summary>
    public static Score Of(IEnumerable<Label> labels, IEnumerable<Finding> findings, Func<string, bool> judged)
    {
        var all = labels.Where(l => judged(l.Rule)).ToArray();
        var found = findings.Where(f => judged(f.Rule)).DistinctBy(f => (f.Rule, f.File, f.Line)).ToArray();
        bool Stands(Label l, Finding f) => (l.Rule, l.File, l.Line) == (f.Rule, f.File, f.Line);
        return new Score(
            [.. found.Where(f => all.Any(l => l.Required && Stands(l, f)))],
            [.. all.Where(l => l.Required && !found.Any(f => Stands(l, f)))],
            [.. found.Where(f => !all.Any(l => Stands(l, f)))]);
    }

    public Score Plus(Score other) =>
        new(Hits.AddRange(other.Hits), Misses.AddRange(other.Misses), FalseReports.AddRange(other.FalseReports));

    public override string ToString()
    {
        var text = new StringBuilder();
        foreach (var miss in Misses)
            text.AppendLine($"{miss.File}({miss.Line}): {miss.Rule} missed");
        foreach (var report in FalseReports)
            text.AppendLine($"{report.File}({report.Line}): {report.Rule} reported without a label: {report.Message}");
        return text.ToString();
    }
}
