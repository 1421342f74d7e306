using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Rules.Choice;

/// <summary>TARE102: Winner's own score claimed.</summary>
internal static class WinnerScoreClaimed
{
    public const string Id = "TARE102";

    public static readonly DiagnosticDescriptor Rule = Rules.Rule.Describe(Id, "Winner's own score claimed", "{0}", "The score that won the choice is claimed as the winner's performance. It is the highest of K scores and too good as an estimate.", DiagnosticSeverity.Warning);
}
