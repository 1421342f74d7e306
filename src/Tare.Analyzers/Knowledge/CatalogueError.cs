using Microsoft.CodeAnalysis.Text;

namespace Tare.Analyzers.Knowledge;

/// <summary>Why a line of a catalogue was not understood.</summary>
/// <param name="Line">Zero-based line.</param>
/// <param name="Span">The part of the text that is wrong; inside the line, empty only when the line ends too early.</param>
/// <param name="Reason">One sentence.</param>
internal sealed record CatalogueError(int Line, TextSpan Span, string Reason);
