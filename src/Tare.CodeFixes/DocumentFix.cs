using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeActions;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Text;

namespace Tare.CodeFixes;

/// <summary>
/// A fix whose findings each change a few spans of their own document. Only those spans are touched, so comments and layout
/// stay; FixAll applies all edits of a document at once, so the using directive comes in once.
/// </summary>
public abstract class DocumentFix : CodeFixProvider
{
    private const string Namespace = "Tare";

    /// <summary>Says what will happen.</summary>
    private protected abstract string Title { get; }

    private protected abstract string EquivalenceKey { get; }

    /// <inheritdoc/>
    public sealed override async Task RegisterCodeFixesAsync(CodeFixContext context)
    {
        if (await ReadAsync(context.Document, context.CancellationToken).ConfigureAwait(false) is not var (root, model))
            return;
        var library = await TareLibrary.OfAsync(context.Document, context.CancellationToken).ConfigureAwait(false);
        foreach (var diagnostic in context.Diagnostics)
        {
            if (EditFor(new Place(root, model, diagnostic, library, context.CancellationToken)) is not { } edit)
                continue;
            var document = context.Document;
            context.RegisterCodeFix(
                CodeAction.Create(Title, cancel => ApplyAsync(document, [edit], cancel), EquivalenceKey), diagnostic);
        }
    }

    /// <inheritdoc/>
    public sealed override FixAllProvider GetFixAllProvider() => FixAllProvider.Create(async (context, document, diagnostics) =>
    {
        if (await ReadAsync(document, context.CancellationToken).ConfigureAwait(false) is not var (root, model))
            return document;
        var library = await TareLibrary.OfAsync(document, context.CancellationToken).ConfigureAwait(false);
        var edits = new List<Edit>();
        foreach (var diagnostic in diagnostics.OrderBy(d => d.Location.SourceSpan.Start))
        {
            if (EditFor(new Place(root, model, diagnostic, library, context.CancellationToken)) is { } edit && !edits.Any(edit.Overlaps))
                edits.Add(edit);
        }

        return await ApplyAsync(document, edits, context.CancellationToken).ConfigureAwait(false);
    });

    /// <summary>The change for one finding, or null where there is none that is sound.</summary>
    private protected abstract Edit? EditFor(Place place);

    private static async Task<(CompilationUnitSyntax Root, SemanticModel Model)?> ReadAsync(Document document, CancellationToken cancel)
    {
        var root = await document.GetSyntaxRootAsync(cancel).ConfigureAwait(false) as CompilationUnitSyntax;
        var model = await document.GetSemanticModelAsync(cancel).ConfigureAwait(false);
        return root is null || model is null ? null : (root, model);
    }

    private static async Task<Document> ApplyAsync(Document document, IReadOnlyList<Edit> edits, CancellationToken cancel)
    {
        if (edits.Count == 0)
            return document;
        var text = await document.GetTextAsync(cancel).ConfigureAwait(false);
        var changes = edits.SelectMany(e => e.Changes).ToList();
        if (edits.Any(e => e.NeedsUsing) && await document.GetSyntaxRootAsync(cancel).ConfigureAwait(false) is CompilationUnitSyntax root
            && Usings.Add(root, text, Namespace) is { } added)
            changes.Add(added);
        return document.WithText(text.WithChanges(changes.OrderBy(c => c.Span.Start)));
    }
}
