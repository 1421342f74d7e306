using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Rules.Choice;

/// <summary>TARE101: Candidate chosen on test rows.</summary>
internal static class ChosenOnTestRows
{
    public const string Id = "TARE101";

    public static readonly DiagnosticDescriptor Rule = Rules.Rule.Describe(Id, "Candidate chosen on test rows", "{0}", "The best of K scores on the rows that should judge it flatters the winner. Choose on validation rows and score the winner once on the test rows, or hold every candidate to a level corrected for all of them.", DiagnosticSeverity.Warning);
}
