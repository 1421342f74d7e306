using System.Globalization;
using Microsoft.CodeAnalysis;
using Tare.Tool.Analysis;

namespace Tare.Tool.Printing;

/// <summary>Writes findings for people, in the form that editors and build logs make links of.</summary>
internal sealed class FindingPrinter(TextWriter output, Ink ink, Func<string, string> displayPath)
{
    /// <summary>The head line, the frame and a blank line.</summary>
    public void Write(Finding finding)
    {
        WriteHead(finding);
        if (!finding.Places.IsEmpty)
        {
            new CodeFrame(output, ink, displayPath).Write(finding.Places, ToneOf(finding.Severity));
        }

        output.WriteLine();
    }

    /// <summary>One line, as a compiler writes it.</summary>
    public void WriteHead(Finding finding)
    {
        var place = "tare";
        if (!finding.Places.IsEmpty)
        {
            var start = finding.Places[0].Lines.Start;
            place = string.Create(CultureInfo.InvariantCulture, $"{displayPath(finding.Places[0].Path)}({start.Line + 1},{start.Character + 1})");
        }

        output.WriteLine($"{ink.Paint(place, Tone.Strong)}: {ink.Paint($"{WordOf(finding.Severity)} {finding.Id}", ToneOf(finding.Severity))}: {finding.Message}");
    }

    private static string WordOf(DiagnosticSeverity severity) => severity switch
    {
        DiagnosticSeverity.Error => "error",
        DiagnosticSeverity.Warning => "warning",
        _ => "info",
    };

    private static Tone ToneOf(DiagnosticSeverity severity) => severity switch
    {
        DiagnosticSeverity.Error => Tone.Error,
        DiagnosticSeverity.Warning => Tone.Warning,
        _ => Tone.Info,
    };
}
