using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Text;

namespace Tare.Tool.Analysis;

/// <summary>One diagnostic, with the places it names.</summary>
/// <param name="Diagnostic">As the analyzer reported it.</param>
/// <param name="Project">The first project that reported it; a file shared by several projects or targets is reported once.</param>
/// <param name="Places">The place itself first; empty when the finding is about the whole compilation.</param>
internal sealed record Finding(Diagnostic Diagnostic, ProjectId Project, ImmutableArray<Place> Places)
{
    public string Id => Diagnostic.Id;

    public DiagnosticSeverity Severity => Diagnostic.Severity;

    /// <summary>Always in the invariant culture, as in a build on any machine.</summary>
    public string Message => Diagnostic.GetMessage(System.Globalization.CultureInfo.InvariantCulture);

    /// <summary>Equal for the same finding in another target of the same file.</summary>
    public (string Id, string Path, TextSpan Span, string Message) Identity =>
        (Id, Places.IsEmpty ? "" : Places[0].Path, Places.IsEmpty ? default : Places[0].Span, Message);
}
