using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>Where the elements of a sequence of candidates or of their scores come from.</summary>
internal sealed class ElementTurn
{
    private ElementTurn(SyntaxNode region, SyntaxNode anchor, ExpressionSyntax element, ISymbol? candidate, ExpressionSyntax? source)
    {
        Region = region;
        Anchor = anchor;
        Element = element;
        Candidate = candidate;
        Source = source;
    }

    /// <summary>The code of one candidate's turn: a lambda, a loop, a query.</summary>
    public SyntaxNode Region { get; }

    /// <summary>The node up to which a turn has run when its element is made.</summary>
    public SyntaxNode Anchor { get; }

    /// <summary>What is put into the sequence.</summary>
    public ExpressionSyntax Element { get; }

    /// <summary>The variable that is another candidate each turn, if there is one.</summary>
    public ISymbol? Candidate { get; }

    /// <summary>What the candidates come from.</summary>
    public ExpressionSyntax? Source { get; }

    /// <summary>The key under which a dictionary holds the element.</summary>
    public ExpressionSyntax? Key { get; private set; }

    public static ElementTurn? OfLambda(Scene scene, AnonymousFunctionExpressionSyntax lambda, ExpressionSyntax? source)
    {
        var parameters = lambda switch
        {
            SimpleLambdaExpressionSyntax simple => new[] { simple.Parameter },
            ParenthesizedLambdaExpressionSyntax several => several.ParameterList.Parameters.ToArray(),
            _ => Array.Empty<ParameterSyntax>(),
        };
        if (parameters.Length == 0)
            return null;
        var candidate = scene.Model.GetDeclaredSymbol(parameters[0]);
        if (lambda.ExpressionBody is { } body)
            return new ElementTurn(lambda, body, body, candidate, source);
        return lambda.Block is { } block && block.DescendantNodes(n => n is not AnonymousFunctionExpressionSyntax).OfType<ReturnStatementSyntax>().ToList() is { Count: 1 } returns && returns[0].Expression is { } made
            ? new ElementTurn(lambda, returns[0], made, candidate, source)
            : null;
    }

    /// <summary>The turn that made the elements of an expression.</summary>
    public static ElementTurn? Of(Scene scene, ExpressionSyntax sequence)
    {
        switch (sequence)
        {
            case ParenthesizedExpressionSyntax inner:
                return Of(scene, inner.Expression);
            case QueryExpressionSyntax { Body.SelectOrGroup: SelectClauseSyntax select } query when scene.Mentions(query, RowsRole.Test):
                return new ElementTurn(query, select, select.Expression, null, null);
            case InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax called } call:
                if (called.Name.Identifier.ValueText is "Select" or "ConvertAll" or "SelectMany" && call.ArgumentList.Arguments.LastOrDefault()?.Expression is AnonymousFunctionExpressionSyntax lambda && scene.Mentions(lambda, RowsRole.Test))
                    return OfLambda(scene, lambda, called.Expression);
                if (called.Name.Identifier.ValueText == "ConvertAll" && call.ArgumentList.Arguments.Count == 2 && call.ArgumentList.Arguments[1].Expression is AnonymousFunctionExpressionSyntax convert && scene.Mentions(convert, RowsRole.Test))
                    return OfLambda(scene, convert, call.ArgumentList.Arguments[0].Expression);
                return Of(scene, called.Expression);
            case CollectionExpressionSyntax { Elements: [SpreadElementSyntax spread] }:
                return Of(scene, spread.Expression);
            case IdentifierNameSyntax name when scene.Model.GetSymbolInfo(name).Symbol is ILocalSymbol local:
                return OfLocal(scene, local);
            default:
                return null;
        }
    }

    private static ElementTurn? OfLocal(Scene scene, ILocalSymbol local)
    {
        if (local.DeclaringSyntaxReferences.Length == 1 && local.DeclaringSyntaxReferences[0].GetSyntax() is VariableDeclaratorSyntax { Initializer.Value: { } made }
            && scene.Mentions(made, RowsRole.Test) && Of(scene, made) is { } turn)
            return turn;
        var found = new List<ElementTurn>();
        foreach (var use in scene.Frame.DescendantNodes().OfType<IdentifierNameSyntax>())
        {
            if (use.Identifier.ValueText != local.Name || !SymbolEqualityComparer.Default.Equals(scene.Model.GetSymbolInfo(use).Symbol, local))
                continue;
            if (use.Parent is MemberAccessExpressionSyntax { Name.Identifier.ValueText: "Add" or "Enqueue" or "Push" or "TryAdd", Parent: InvocationExpressionSyntax { ArgumentList.Arguments: { Count: > 0 } arguments } add } && add.Parent is ExpressionStatementSyntax statement)
            {
                if (RegionOf(scene, statement, local) is not { } region)
                    return null;
                found.Add(new ElementTurn(region, statement, arguments[arguments.Count - 1].Expression, null, null) { Key = arguments.Count == 2 ? arguments[0].Expression : null });
            }
            else if (use.Parent is ElementAccessExpressionSyntax { Parent: AssignmentExpressionSyntax { Parent: ExpressionStatementSyntax set } assignment } access && assignment.Left == access && access.ArgumentList.Arguments.Count == 1)
            {
                if (RegionOf(scene, set, local) is not { } region)
                    return null;
                found.Add(new ElementTurn(region, set, assignment.Right, null, null) { Key = access.ArgumentList.Arguments[0].Expression });
            }
        }

        return found.Count == 1 ? found[0] : null;
    }

    /// <summary>The outermost loop, within the variable's own scope, that adds the elements.</summary>
    private static StatementSyntax? RegionOf(Scene scene, StatementSyntax add, ILocalSymbol local)
    {
        StatementSyntax? region = null;
        var declared = local.DeclaringSyntaxReferences[0].GetSyntax();
        for (SyntaxNode? node = add.Parent; node is not null && node != scene.Frame && !node.Span.Contains(declared.Span); node = node.Parent)
        {
            if (node is ForStatementSyntax or CommonForEachStatementSyntax or WhileStatementSyntax or DoStatementSyntax)
                region = (StatementSyntax)node;
            else if (node is AnonymousFunctionExpressionSyntax { Parent: ArgumentSyntax } && Code.StatementOf(node) is ExpressionStatementSyntax call)
                region = call;
        }

        return region;
    }
}
