using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Rules.Threshold;

/// <summary>TARE201: Significance level not corrected for the family.</summary>
internal static class LevelNotCorrected
{
    public const string Id = "TARE201";

    public static readonly DiagnosticDescriptor Rule = Rules.Rule.Describe(Id, "Significance level not corrected for the family", "{0}", "Each of K p-values is compared with one uncorrected level, so the chance of at least one false finding grows with K.", DiagnosticSeverity.Warning);
}
