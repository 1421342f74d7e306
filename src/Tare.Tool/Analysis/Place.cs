using Microsoft.CodeAnalysis.Text;

namespace Tare.Tool.Analysis;

/// <summary>A stretch of source and what happens there.</summary>
/// <param name="Path">Absolute path.</param>
/// <param name="Text">The whole file as it was analysed.</param>
/// <param name="Span">The stretch.</param>
/// <param name="Label">What happens there; empty when nothing is known.</param>
internal sealed record Place(string Path, SourceText Text, TextSpan Span, string Label)
{
    public LinePositionSpan Lines => Text.Lines.GetLinePositionSpan(Span);
}
