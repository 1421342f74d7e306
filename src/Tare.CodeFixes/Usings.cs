using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Text;

namespace Tare.CodeFixes;

/// <summary>Adds a using directive as a text change, in the order of those that are there.</summary>
internal static class Usings
{
    /// <summary>Directives between conditional ones would be there for some targets only: then names are spelled out instead.</summary>
    public static bool CanAdd(CompilationUnitSyntax root)
    {
        var list = ListOf(root);
        if (list.Count == 0)
            return !HasConditional(root.GetFirstToken(includeZeroWidth: true).LeadingTrivia);
        return !list.Any(u => HasConditional(u.GetLeadingTrivia()) || HasConditional(u.GetTrailingTrivia()))
            && !HasConditional(list.Last().GetLastToken().GetNextToken(includeZeroWidth: true).LeadingTrivia, onlyClosing: true);
    }

    public static TextChange? Add(CompilationUnitSyntax root, SourceText text, string name)
    {
        var list = ListOf(root);
        if (list.Any(u => u.Alias is null && u.StaticKeyword.IsKind(SyntaxKind.None) && u.Name?.ToString() == name))
            return null;
        string end = text.Lines.Count > 1 ? text.ToString(TextSpan.FromBounds(text.Lines[0].End, text.Lines[0].EndIncludingLineBreak)) : "\n";
        string line = $"using {name};{end}";
        if (list.Count > 0)
        {
            var next = list.FirstOrDefault(u => u.GlobalKeyword.IsKind(SyntaxKind.None) && u.Alias is null && u.StaticKeyword.IsKind(SyntaxKind.None) && ComesAfter(u, name));
            if (next is not null && next != list[0])
                return At(IndentOf(next, text) + line, LineOf(text, next.SpanStart).Start);
            if (next is not null)
                return At(line + IndentOf(next, text), next.SpanStart);
            var before = list.LastOrDefault(u => u.Alias is null && u.StaticKeyword.IsKind(SyntaxKind.None)) ?? list.Last();
            var own = LineOf(text, before.Span.End);
            string indented = IndentOf(before, text) + line;
            return own.EndIncludingLineBreak > own.End ? At(indented, own.EndIncludingLineBreak) : At(end + indented, own.End);
        }

        return At(line + end, StartOf(root, text));
    }

    private static SyntaxList<UsingDirectiveSyntax> ListOf(CompilationUnitSyntax root)
    {
        if (root.Usings.Count == 0 && root.Members.Count == 1 && root.Members[0] is BaseNamespaceDeclarationSyntax { Usings.Count: > 0 } only)
            return only.Usings;
        return root.Usings;
    }

    /// <summary>Below a head comment that a blank line sets apart and below directives; else at the very top.</summary>
    private static int StartOf(CompilationUnitSyntax root, SourceText text)
    {
        var first = root.GetFirstToken(includeZeroWidth: true);
        int start = 0;
        bool lineHasText = false;
        foreach (var trivia in first.LeadingTrivia)
        {
            if (trivia.IsDirective || trivia.IsKind(SyntaxKind.ShebangDirectiveTrivia))
                start = trivia.FullSpan.End;
            else if (trivia.IsKind(SyntaxKind.EndOfLineTrivia))
            {
                if (!lineHasText)
                    start = trivia.Span.End;
                lineHasText = false;
            }
            else if (!trivia.IsKind(SyntaxKind.WhitespaceTrivia))
                lineHasText = true;
        }

        return Math.Min(start, text.Length);
    }

    private static bool ComesAfter(UsingDirectiveSyntax directive, string name)
    {
        string other = directive.Name?.ToString() ?? "";
        return other != "System" && !other.StartsWith("System.", StringComparison.Ordinal) && string.Compare(other, name, StringComparison.OrdinalIgnoreCase) > 0;
    }

    private static bool HasConditional(SyntaxTriviaList trivia, bool onlyClosing = false) => trivia.Any(t =>
        t.IsKind(SyntaxKind.EndIfDirectiveTrivia) || t.IsKind(SyntaxKind.ElseDirectiveTrivia) || t.IsKind(SyntaxKind.ElifDirectiveTrivia)
        || (!onlyClosing && t.IsKind(SyntaxKind.IfDirectiveTrivia)));

    private static string IndentOf(SyntaxNode node, SourceText text)
    {
        var line = LineOf(text, node.SpanStart);
        string before = text.ToString(TextSpan.FromBounds(line.Start, node.SpanStart));
        return before.Trim().Length == 0 ? before : "";
    }

    private static TextLine LineOf(SourceText text, int position) => text.Lines.GetLineFromPosition(position);

    private static TextChange At(string added, int position) => new(new TextSpan(position, 0), added);
}
