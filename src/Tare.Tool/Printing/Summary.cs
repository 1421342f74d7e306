using System.Globalization;
using Microsoft.CodeAnalysis;
using Tare.Tool.Analysis;
using Tare.Tool.Loading;

namespace Tare.Tool.Printing;

/// <summary>The line at the end.</summary>
internal static class Summary
{
    public static string Of(IReadOnlyCollection<Finding> findings, LoadedCode code, TimeSpan time)
    {
        var where = code.IsLoose ? Count(code.DocumentCount, "document") : $"{Count(code.ProjectCount, "project")}, {Count(code.DocumentCount, "document")}";
        return string.Create(CultureInfo.InvariantCulture, $"{Total(findings)} in {where}, {time.TotalSeconds:0.0} s");
    }

    /// <summary>As in "1 file", "2 files".</summary>
    public static string Count(int count, string noun) => string.Create(CultureInfo.InvariantCulture, $"{count} {noun}{(count == 1 ? "" : "s")}");

    private static string Total(IReadOnlyCollection<Finding> findings)
    {
        if (findings.Count == 0)
        {
            return "no findings";
        }

        var parts = new List<string>();
        foreach (var (severity, noun) in new[] { (DiagnosticSeverity.Error, "error"), (DiagnosticSeverity.Warning, "warning") })
        {
            if (findings.Count(finding => finding.Severity == severity) is var count and > 0)
            {
                parts.Add(Count(count, noun));
            }
        }

        if (findings.Count(finding => finding.Severity == DiagnosticSeverity.Info) is var infos and > 0)
        {
            parts.Add(string.Create(CultureInfo.InvariantCulture, $"{infos} info"));
        }

        return $"{Count(findings.Count, "finding")} ({string.Join(", ", parts)})";
    }
}
