using System.Text;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.CodeFixes.Choosing;

/// <summary>Writes code again with other names in it: a candidate's turn as the winner's.</summary>
internal sealed class Renderer
{
    private readonly Scene _scene;

    public Renderer(Scene scene) => _scene = scene;

    /// <summary>What stands for a variable.</summary>
    public Dictionary<ISymbol, string> Symbols { get; } = new(SymbolEqualityComparer.Default);

    /// <summary>What stands for an expression, by its tokens.</summary>
    public Dictionary<string, string> Expressions { get; } = new(StringComparer.Ordinal);

    /// <summary>What stands for an expression after the names in it were exchanged: code that already computes it.</summary>
    public Dictionary<string, string> Computed { get; } = new(StringComparer.Ordinal);

    /// <summary>Statements that have no part in what is written.</summary>
    public Func<StatementSyntax, bool> Drops { get; set; } = static _ => false;

    public string Text(SyntaxNode node)
    {
        var text = new StringBuilder();
        Write(node, text);
        return text.ToString().Trim();
    }

    /// <summary>The text at another depth: lines after the first move with the first.</summary>
    public string Text(SyntaxNode node, string indent)
    {
        string old = Code.IndentOf(node);
        string[] lines = Text(node).Split('\n');
        for (int i = 1; i < lines.Length; i++)
        {
            if (lines[i].Trim().Length == 0)
                lines[i] = lines[i].Trim(' ', '\t');
            else if (lines[i].StartsWith(old, StringComparison.Ordinal))
                lines[i] = indent + lines[i].Substring(old.Length);
            else
                lines[i] = indent + lines[i].TrimStart();
        }

        return string.Join("\n", lines);
    }

    private void Write(SyntaxNode node, StringBuilder text)
    {
        if (node is StatementSyntax statement && Drops(statement))
            return;
        if (node is ExpressionSyntax expression)
        {
            if (Replacement(expression) is { } replacement)
            {
                text.Append(expression.GetLeadingTrivia().ToFullString()).Append(replacement).Append(expression.GetTrailingTrivia().ToFullString());
                return;
            }

            if (Computed.Count > 0)
            {
                var inner = new StringBuilder();
                WriteParts(node, inner);
                string written = inner.ToString();
                if (Computed.TryGetValue(Code.Key(written), out string? computed))
                    text.Append(expression.GetLeadingTrivia().ToFullString()).Append(computed).Append(expression.GetTrailingTrivia().ToFullString());
                else
                    text.Append(written);
                return;
            }
        }

        // A declared name may have another name here.
        if (node is VariableDeclaratorSyntax or SingleVariableDesignationSyntax or ForEachStatementSyntax or ParameterSyntax
            && _scene.Model.GetDeclaredSymbol(node) is { } declared && Symbols.TryGetValue(declared, out string? name))
        {
            var identifier = node switch
            {
                VariableDeclaratorSyntax v => v.Identifier,
                SingleVariableDesignationSyntax s => s.Identifier,
                ForEachStatementSyntax f => f.Identifier,
                _ => ((ParameterSyntax)node).Identifier,
            };
            foreach (var part in node.ChildNodesAndTokens())
            {
                if (part.AsNode() is { } child)
                    Write(child, text);
                else if (part.AsToken() == identifier)
                    text.Append(identifier.LeadingTrivia.ToFullString()).Append(name).Append(identifier.TrailingTrivia.ToFullString());
                else
                    text.Append(part.ToFullString());
            }

            return;
        }

        WriteParts(node, text);
    }

    private void WriteParts(SyntaxNode node, StringBuilder text)
    {
        foreach (var part in node.ChildNodesAndTokens())
        {
            if (part.AsNode() is { } child)
                Write(child, text);
            else
                text.Append(part.AsToken().ToFullString());
        }
    }

    private string? Replacement(ExpressionSyntax expression)
    {
        if (expression.Parent is MemberAccessExpressionSyntax access && access.Name == expression)
            return null;
        if (expression is IdentifierNameSyntax { Parent: NameColonSyntax or NameEqualsSyntax } or LiteralExpressionSyntax)
            return null;
        if (Expressions.TryGetValue(Code.Key(expression), out string? whole))
            return whole;
        return expression is IdentifierNameSyntax name && _scene.Model.GetSymbolInfo(name).Symbol is { } symbol && Symbols.TryGetValue(symbol, out string? text)
            ? text
            : null;
    }
}
