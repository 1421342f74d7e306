using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Text;

namespace Tare.CodeFixes.Choosing;

/// <summary>Plans the rewriting of one choice, and takes the plan back when the code would not compile.</summary>
internal static class ChooseOnValidationRows
{
    public static async Task<(string Title, Document Document)?> PlanAsync(Document document, Diagnostic diagnostic, CancellationToken cancel)
    {
        if (await document.GetSyntaxRootAsync(cancel).ConfigureAwait(false) is not { } root
            || await document.GetSemanticModelAsync(cancel).ConfigureAwait(false) is not { } model
            || diagnostic.Location.SourceTree != root.SyntaxTree)
            return null;
        foreach (var form in new Func<Scene, Edits, string?>[] { LoopChoice.Rewrite, SequenceChoice.Rewrite })
        {
            var edits = new Edits();
            if (form(new Scene(document, root, model, diagnostic), edits) is not { } title)
                continue;
            var text = await document.GetTextAsync(cancel).ConfigureAwait(false);
            var changed = document.WithText(WithUsings(text.WithChanges(edits.Changes()), root, edits));
            if (await CompilesAsync(document, changed, cancel).ConfigureAwait(false))
                return (title, changed);
        }

        return null;
    }

    private static SourceText WithUsings(SourceText text, SyntaxNode root, Edits edits)
    {
        if (root is not CompilationUnitSyntax old)
            return text;
        foreach (string name in edits.Usings)
        {
            if (old.DescendantNodes().OfType<UsingDirectiveSyntax>().Any(u => u.Name?.ToString() == name && u.Alias is null))
                continue;
            if (old.DescendantNodes().OfType<BaseNamespaceDeclarationSyntax>().Any(n => n.Name.ToString() == name || n.Name.ToString().StartsWith(name + ".", StringComparison.Ordinal)))
                continue;
            string line = $"using {name};" + Code.NewLineOf(text);
            var usings = old.Usings.Where(u => u.GlobalKeyword.RawKind == 0 && u.StaticKeyword.RawKind == 0 && u.Alias is null).ToList();
            var next = usings.FirstOrDefault(u => !IsSystem(u.Name?.ToString()) && string.CompareOrdinal(u.Name?.ToString(), name) > 0);

            // Usings come before everything that the fix inserts, so that places in the old text still hold.
            int position = next is not null ? next.SpanStart : usings.Count > 0 ? usings[usings.Count - 1].FullSpan.End : old.Usings.Count > 0 ? old.Usings.Last().FullSpan.End : StartOf(old);
            text = text.WithChanges(new TextChange(new TextSpan(position, 0), usings.Count == 0 && old.Usings.Count == 0 ? line + Code.NewLineOf(text) : line));
        }

        return text;
    }

    private static bool IsSystem(string? name) => name is not null && (name == "System" || name.StartsWith("System.", StringComparison.Ordinal));

    /// <summary>Behind the comments at the top of a file.</summary>
    private static int StartOf(CompilationUnitSyntax unit)
    {
        var first = unit.GetFirstToken(includeZeroWidth: true);
        int position = 0;
        foreach (var trivia in first.LeadingTrivia)
        {
            if (trivia.IsKind(SyntaxKind.SingleLineCommentTrivia) || trivia.IsKind(SyntaxKind.MultiLineCommentTrivia) || trivia.IsDirective)
                position = -1;
            else if (trivia.IsKind(SyntaxKind.EndOfLineTrivia) && position < 0)
                position = trivia.Span.End;
        }

        return Math.Max(position, 0);
    }

    private static async Task<bool> CompilesAsync(Document before, Document after, CancellationToken cancel)
    {
        if (await before.Project.GetCompilationAsync(cancel).ConfigureAwait(false) is not { } old
            || await after.Project.GetCompilationAsync(cancel).ConfigureAwait(false) is not { } next)
            return false;
        int Errors(Compilation c) => c.GetDiagnostics(cancel).Count(d => d.Severity == DiagnosticSeverity.Error);
        return Errors(next) <= Errors(old);
    }
}
