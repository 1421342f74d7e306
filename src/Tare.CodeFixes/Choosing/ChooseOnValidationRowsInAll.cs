using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.Text;

namespace Tare.CodeFixes.Choosing;

/// <summary>Rewrites every choice of a document; of two that overlap, the first.</summary>
internal sealed class ChooseOnValidationRowsInAll : DocumentBasedFixAllProvider
{
    public static readonly ChooseOnValidationRowsInAll Instance = new();

    protected override string GetFixAllTitle(FixAllContext fixAllContext) => "Choose on validation rows";

    protected override async Task<Document?> FixAllAsync(FixAllContext fixAllContext, Document document, ImmutableArray<Diagnostic> diagnostics)
    {
        var cancel = fixAllContext.CancellationToken;
        var text = await document.GetTextAsync(cancel).ConfigureAwait(false);
        var taken = new List<TextChange>();
        foreach (var diagnostic in diagnostics.OrderBy(d => d.Location.SourceSpan.Start))
        {
            if (await ChooseOnValidationRows.PlanAsync(document, diagnostic, cancel).ConfigureAwait(false) is not { } plan)
                continue;
            var changes = (await plan.Document.GetTextChangesAsync(document, cancel).ConfigureAwait(false)).Where(c => !taken.Contains(c)).ToList();
            if (!changes.Any(c => taken.Any(t => t.Span.IntersectsWith(c.Span))))
                taken.AddRange(changes);
        }

        return taken.Count == 0 ? null : document.WithText(text.WithChanges(taken.OrderBy(c => c.Span.Start)));
    }
}
