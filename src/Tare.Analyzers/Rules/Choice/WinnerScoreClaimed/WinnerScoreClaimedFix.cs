using System.Collections.Immutable;
using System.Composition;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Tare.CodeFixes.Claims;

namespace Tare.CodeFixes.Choice;

/// <summary>TARE102: claims the winner's share of test rows with its interval, corrected for all candidates that were compared on them.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(WinnerScoreClaimedFix)), Shared]
public sealed class WinnerScoreClaimedFix : ClaimFix
{
    /// <inheritdoc/>
    public override ImmutableArray<string> FixableDiagnosticIds => ImmutableArray.Create("TARE102");
}
