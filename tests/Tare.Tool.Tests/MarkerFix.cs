using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeActions;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.Tool.Tests;

/// <summary>
/// Renames `bad…` to `good…`, below a comment of its own with a Unix ending; renames `trap…` only where it is declared; puts an `again` before `again…`.
/// </summary>
[ExportCodeFixProvider(LanguageNames.CSharp)]
public sealed class MarkerFix : CodeFixProvider
{
    public override ImmutableArray<string> FixableDiagnosticIds => ["TEST001", "TEST004", "TEST005", "TEST006"];

    public override FixAllProvider GetFixAllProvider() => WellKnownFixAllProviders.BatchFixer;

    public override Task RegisterCodeFixesAsync(CodeFixContext context)
    {
        var diagnostic = context.Diagnostics[0];
        context.RegisterCodeFix(CodeAction.Create("Rename", cancel => RenameAsync(context.Document, diagnostic, cancel), "rename"), diagnostic);
        context.RegisterCodeFix(CodeAction.Create("Do harm", (Func<CancellationToken, Task<Document>>)(_ => throw new InvalidOperationException("only the first action is applied")), "harm"), diagnostic);
        return Task.CompletedTask;
    }

    private static async Task<Document> RenameAsync(Document document, Diagnostic diagnostic, CancellationToken cancel)
    {
        var root = (await document.GetSyntaxRootAsync(cancel))!;
        var old = root.FindToken(diagnostic.Location.SourceSpan.Start);
        if (old.Text.StartsWith("bomb", StringComparison.Ordinal))
        {
            throw new InvalidOperationException("marker bomb");
        }

        var isTrap = old.Text.StartsWith("trap", StringComparison.Ordinal);
        var isAgain = old.Text.StartsWith("again", StringComparison.Ordinal);
        var name = isTrap ? "x" + old.Text : isAgain ? "again" + old.Text : "good" + old.Text[3..];
        var uses = root.DescendantTokens().Where(token => token.IsKind(SyntaxKind.IdentifierToken) && token.Text == old.Text && (!isTrap || token == old));
        root = root.ReplaceTokens(uses, (token, _) => SyntaxFactory.Identifier(token.LeadingTrivia, name, token.TrailingTrivia));
        if (!isTrap && !isAgain)
        {
            var statement = root.FindToken(old.SpanStart).Parent!.FirstAncestorOrSelf<StatementSyntax>()!;
            var trivia = statement.GetLeadingTrivia();
            root = root.ReplaceNode(statement, statement.WithLeadingTrivia(
                trivia.Add(SyntaxFactory.Comment("// mended")).Add(SyntaxFactory.LineFeed).AddRange(trivia.Where(t => t.IsKind(SyntaxKind.WhitespaceTrivia)))));
        }

        return document.WithSyntaxRoot(root);
    }
}
