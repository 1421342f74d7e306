using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Rules.Choice;

/// <summary>TARE108: Choosing score claimed.</summary>
internal static class ChoosingScoreClaimed
{
    public const string Id = "TARE108";

    public static readonly DiagnosticDescriptor Rule = Rules.Rule.Describe(Id, "Choosing score claimed", "{0}", "The validation or cross-validation score that won the choice is claimed, and the winner is never scored on untouched rows.", DiagnosticSeverity.Info);
}
