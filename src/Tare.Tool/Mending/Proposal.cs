using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeActions;
using Microsoft.CodeAnalysis.CodeFixes;

namespace Tare.Tool.Mending;

/// <summary>The first action that a provider offers for a diagnostic.</summary>
internal sealed record Proposal(Diagnostic Diagnostic, Document Document, CodeAction Action)
{
    /// <returns>Null when the provider offers nothing, or the place is in no document that somebody wrote.</returns>
    public static async Task<Proposal?> OfAsync(CodeFixProvider provider, Diagnostic diagnostic, Solution solution, CancellationToken cancel)
    {
        if (!provider.FixableDiagnosticIds.Contains(diagnostic.Id)
            || diagnostic.Location.SourceTree is not { } tree
            || solution.GetDocument(tree) is not { FilePath: { } path } document
            || Loading.GeneratedCode.Is(path))
        {
            return null;
        }

        CodeAction? first = null;
        await provider.RegisterCodeFixesAsync(new CodeFixContext(document, diagnostic, (action, _) => first ??= action, cancel));
        while (first is { NestedActions: { IsDefaultOrEmpty: false } nested })
        {
            first = nested[0];
        }

        return first == null ? null : new Proposal(diagnostic, document, first);
    }

    /// <summary>The solution as the action leaves it; null when it changes none.</summary>
    public static async Task<Solution?> OutcomeOf(CodeAction action, CancellationToken cancel) =>
        (await action.GetOperationsAsync(cancel)).OfType<ApplyChangesOperation>().FirstOrDefault()?.ChangedSolution;
}
