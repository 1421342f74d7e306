using Microsoft.CodeAnalysis;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers;

/// <summary>A cheap look at the text before any flow is built.</summary>
internal static class Gate
{
    public static bool MayMatter(SyntaxTree tree, Vocabulary vocabulary, CancellationToken cancellation) => true;
}
