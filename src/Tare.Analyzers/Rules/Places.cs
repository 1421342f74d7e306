using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Text;

namespace Tare.Analyzers.Rules;

internal static class Places
{
    public static TextSpan SpanOf(SyntaxNode syntax) => syntax switch
    {
        ForStatementSyntax s => TextSpan.FromBounds(s.ForKeyword.SpanStart, s.CloseParenToken.Span.End),
        CommonForEachStatementSyntax s => TextSpan.FromBounds(s.ForEachKeyword.SpanStart, s.CloseParenToken.Span.End),
        WhileStatementSyntax s => TextSpan.FromBounds(s.WhileKeyword.SpanStart, s.CloseParenToken.Span.End),
        DoStatementSyntax s => s.DoKeyword.Span,
        VariableDeclaratorSyntax s => s.Identifier.Span,
        ParameterSyntax s => s.Identifier.Span,
        PropertyDeclarationSyntax s => s.Identifier.Span,
        SingleVariableDesignationSyntax s => s.Identifier.Span,
        MethodDeclarationSyntax s => s.Identifier.Span,
        LocalFunctionStatementSyntax s => s.Identifier.Span,
        BaseTypeDeclarationSyntax s => s.Identifier.Span,
        _ => syntax.Span,
    };
}
