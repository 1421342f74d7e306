using System.Collections.Immutable;
using System.Composition;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Tare.CodeFixes.Claims;

namespace Tare.CodeFixes.Choice;

/// <summary>TARE108: claims the score that chose with its interval, corrected for all candidates that it chose among.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(ChoosingScoreClaimedFix)), Shared]
public sealed class ChoosingScoreClaimedFix : ClaimFix
{
    /// <inheritdoc/>
    public override ImmutableArray<string> FixableDiagnosticIds => ImmutableArray.Create("TARE108");
}
