using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Text;

namespace Tare.CodeFixes;

/// <summary>Small questions about source text that the fixes ask.</summary>
internal static class Code
{
    /// <summary>The tokens of a node without what stands between them: equal for code that differs in layout only.</summary>
    public static string Key(SyntaxNode node) => string.Concat(node.DescendantTokens().Select(t => t.Text));

    public static string Key(string code) => string.Concat(SyntaxFactory.ParseTokens(code).Select(t => t.Text));

    /// <summary>White space before the first token of the line on which a node starts.</summary>
    public static string IndentOf(SyntaxNode node)
    {
        var text = node.SyntaxTree.GetText();
        string line = text.ToString(text.Lines.GetLineFromPosition(node.SpanStart).Span);
        return line.Substring(0, line.Length - line.TrimStart().Length);
    }

    public static string NewLineOf(SourceText text)
    {
        var line = text.Lines[0];
        return line.EndIncludingLineBreak - line.End == 2 ? "\r\n" : "\n";
    }

    /// <summary>One step of indentation as the file uses it.</summary>
    public static string StepOf(SyntaxNode root)
    {
        foreach (var block in root.DescendantNodes().OfType<BlockSyntax>())
        {
            if (block.Statements.Count == 0)
                continue;
            string outer = IndentOf(block.Parent!), inner = IndentOf(block.Statements[0]);
            if (inner.Length > outer.Length && inner.StartsWith(outer, StringComparison.Ordinal))
                return inner.Substring(outer.Length);
        }

        return "    ";
    }

    /// <summary>Where text goes that is to stand before a statement and the comments above it.</summary>
    public static int BeforeStatement(StatementSyntax statement)
    {
        SyntaxNode node = statement.Parent is GlobalStatementSyntax global ? global : statement;
        var text = node.SyntaxTree.GetText();
        var trivia = node.GetLeadingTrivia();
        int position = text.Lines.GetLineFromPosition(node.SpanStart).Start;
        if (position < node.FullSpan.Start)
            return node.SpanStart;
        for (int i = trivia.Count - 1; i >= 0; i--)
        {
            var one = trivia[i];
            if (one.IsDirective)
                break;
            int start = text.Lines.GetLineFromPosition(one.SpanStart).Start;
            if (one.IsKind(SyntaxKind.EndOfLineTrivia) && one.SpanStart == start)
                break;
            if (start >= node.FullSpan.Start && (one.IsKind(SyntaxKind.SingleLineCommentTrivia) || one.IsKind(SyntaxKind.MultiLineCommentTrivia)))
                position = start;
        }

        return position;
    }

    /// <summary>The statements beside which a statement stands; nothing when it stands alone under an <c>if</c> or a loop.</summary>
    public static IReadOnlyList<StatementSyntax> Siblings(StatementSyntax statement) => statement.Parent switch
    {
        BlockSyntax block => block.Statements,
        SwitchSectionSyntax section => section.Statements,
        GlobalStatementSyntax { Parent: CompilationUnitSyntax unit } => unit.Members.OfType<GlobalStatementSyntax>().Select(g => g.Statement).ToList(),
        _ => Array.Empty<StatementSyntax>(),
    };

    public static StatementSyntax? StatementOf(SyntaxNode node) => node.FirstAncestorOrSelf<StatementSyntax>();

    /// <summary>The identifier at the root of what is assigned: <c>a</c> of <c>a[i].X</c>.</summary>
    public static ExpressionSyntax RootOf(ExpressionSyntax expression)
    {
        while (true)
        {
            switch (expression)
            {
                case MemberAccessExpressionSyntax { Expression: not ThisExpressionSyntax } member: expression = member.Expression; break;
                case ElementAccessExpressionSyntax element: expression = element.Expression; break;
                case ParenthesizedExpressionSyntax inner: expression = inner.Expression; break;
                case PostfixUnaryExpressionSyntax { RawKind: (int)SyntaxKind.SuppressNullableWarningExpression } sure: expression = sure.Operand; break;
                case InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax called }: expression = called.Expression; break;
                case ConditionalAccessExpressionSyntax access: expression = access.Expression; break;
                default: return expression;
            }
        }
    }
}
