using System.Collections.Immutable;
using System.Composition;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeActions;
using Microsoft.CodeAnalysis.CodeFixes;
using Tare.CodeFixes.Choosing;

namespace Tare.CodeFixes.Choice;

/// <summary>TARE101: chooses on validation rows, those there are or some held out of the training rows, and scores the winner once on the test rows.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp), Shared]
public sealed class ChosenOnTestRowsFix : CodeFixProvider
{
    /// <summary>Equivalence key of the action.</summary>
    public const string EquivalenceKey = "Tare.ChooseOnValidationRows";

    /// <inheritdoc/>
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = ImmutableArray.Create("TARE101");

    /// <inheritdoc/>
    public override FixAllProvider GetFixAllProvider() => ChooseOnValidationRowsInAll.Instance;

    /// <inheritdoc/>
    public override async Task RegisterCodeFixesAsync(CodeFixContext context)
    {
        foreach (var diagnostic in context.Diagnostics)
        {
            if (await ChooseOnValidationRows.PlanAsync(context.Document, diagnostic, context.CancellationToken).ConfigureAwait(false) is { } plan)
                context.RegisterCodeFix(CodeAction.Create(plan.Title, _ => Task.FromResult(plan.Document), EquivalenceKey), diagnostic);
        }
    }
}
