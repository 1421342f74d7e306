using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Tare.Analyzers.Rules.Choice;
using Tare.Analyzers.Rules.Threshold;

namespace Tare.Analyzers.Rules;

/// <summary>All descriptors, in id order.</summary>
internal static class Descriptors
{
    public static readonly ImmutableArray<DiagnosticDescriptor> All = ImmutableArray.Create(
        ChosenOnTestRows.Rule, WinnerScoreClaimed.Rule, ChoosingScoreClaimed.Rule, LevelNotCorrected.Rule);
}
