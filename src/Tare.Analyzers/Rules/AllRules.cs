using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Tare.Analyzers.Rules.Choice;
using Tare.Analyzers.Rules.Threshold;

namespace Tare.Analyzers.Rules;

/// <summary>Every rule and its descriptor, in id order.</summary>
internal static class AllRules
{
    public static readonly ImmutableArray<DiagnosticDescriptor> Descriptors = ImmutableArray.Create(
        ChosenOnTestRows.Rule, WinnerScoreClaimed.Rule, ChoosingScoreClaimed.Rule, LevelNotCorrected.Rule);

    public static ImmutableArray<IRule> Create() => ImmutableArray.Create<IRule>(
        new ChosenOnTestRows(), new WinnerScoreClaimed(), new ChoosingScoreClaimed(), new LevelNotCorrected());
}
