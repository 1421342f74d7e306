using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.CodeFixes.Choosing;

/// <summary>
/// The statements of one candidate's turn that a value depends on, found backwards from the choice: what has to run again
/// for the winner.
/// </summary>
internal sealed class Slice
{
    private readonly Scene _scene;
    private readonly Func<ExpressionSyntax, bool> _isKnown;
    private readonly HashSet<ISymbol> _needed = new(SymbolEqualityComparer.Default);

    /// <param name="isKnown">Says of an expression that its value for the winner is at hand, so that what it is made of does not matter.</param>
    public Slice(Scene scene, Func<ExpressionSyntax, bool> isKnown)
    {
        _scene = scene;
        _isKnown = isKnown;
    }

    /// <summary>In the order in which they run. Query clauses and statements.</summary>
    public List<SyntaxNode> Nodes { get; } = new();

    public IReadOnlyCollection<ISymbol> Needed => _needed;

    public void Need(SyntaxNode node) => _needed.UnionWith(Reads(node));

    /// <summary>Goes back over everything that runs before a node within a region.</summary>
    public void Back(SyntaxNode from, SyntaxNode region)
    {
        foreach (var node in Before(from, region))
        {
            var defined = Defines(node);
            if (!defined.Any(_needed.Contains))
                continue;
            Nodes.Insert(0, node);
            _needed.UnionWith(Reads(node));
        }
    }

    public bool IsNeeded(ISymbol symbol) => _needed.Contains(symbol);

    /// <summary>Symbols that a node declares or changes.</summary>
    public HashSet<ISymbol> Defines(SyntaxNode node)
    {
        var defined = new HashSet<ISymbol>(SymbolEqualityComparer.Default);
        void Add(ISymbol? symbol)
        {
            if (symbol is not null)
                defined.Add(symbol);
        }

        void AddTarget(ExpressionSyntax target)
        {
            if (target is TupleExpressionSyntax tuple)
            {
                foreach (var argument in tuple.Arguments)
                    AddTarget(argument.Expression);
            }
            else if (target is not DeclarationExpressionSyntax)
            {
                Add(_scene.Model.GetSymbolInfo(Code.RootOf(target)).Symbol);
            }
        }

        foreach (var inner in node.DescendantNodesAndSelf())
        {
            switch (inner)
            {
                case VariableDeclaratorSyntax or SingleVariableDesignationSyntax or LocalFunctionStatementSyntax or LetClauseSyntax:
                    Add(_scene.Model.GetDeclaredSymbol(inner));
                    break;
                case AssignmentExpressionSyntax { Parent: not InitializerExpressionSyntax } assignment:
                    AddTarget(assignment.Left);
                    break;
                case PrefixUnaryExpressionSyntax { RawKind: (int)SyntaxKind.PreIncrementExpression or (int)SyntaxKind.PreDecrementExpression } prefix:
                    AddTarget(prefix.Operand);
                    break;
                case PostfixUnaryExpressionSyntax { RawKind: (int)SyntaxKind.PostIncrementExpression or (int)SyntaxKind.PostDecrementExpression } postfix:
                    AddTarget(postfix.Operand);
                    break;
                case ArgumentSyntax { RefKindKeyword.RawKind: not (int)SyntaxKind.None } argument:
                    AddTarget(argument.Expression);
                    break;
                case ExpressionStatementSyntax { Expression: InvocationExpressionSyntax call }:
                    // A call whose result is dropped is there for what it changes: its receiver or what it is given.
                    if (call.Expression is MemberAccessExpressionSyntax member)
                        AddTarget(member.Expression);
                    foreach (var argument in call.ArgumentList.Arguments)
                    {
                        if (_scene.RowsAt(argument.Expression) is null && _scene.Model.GetTypeInfo(argument.Expression).Type is { IsReferenceType: true, SpecialType: SpecialType.None })
                            AddTarget(argument.Expression);
                    }

                    break;
            }
        }

        return defined;
    }

    private HashSet<ISymbol> Reads(SyntaxNode node)
    {
        var read = new HashSet<ISymbol>(SymbolEqualityComparer.Default);
        Walk(node);
        return read;

        void Walk(SyntaxNode inner)
        {
            if (inner is ExpressionSyntax expression)
            {
                if (_isKnown(expression) || _scene.RowsAt(expression) is not null)
                    return;
                if (inner is IdentifierNameSyntax name && _scene.Model.GetSymbolInfo(name).Symbol is ILocalSymbol or IParameterSymbol or IRangeVariableSymbol or IMethodSymbol { MethodKind: MethodKind.LocalFunction } or IFieldSymbol)
                    read.Add(_scene.Model.GetSymbolInfo(name).Symbol!);
            }

            foreach (var child in inner.ChildNodes())
                Walk(child);
        }
    }

    /// <summary>What runs before a node, last first, up to the edge of the region.</summary>
    public static IEnumerable<SyntaxNode> Before(SyntaxNode from, SyntaxNode region)
    {
        for (var node = from; node != region && node.Parent is { } parent; node = parent)
        {
            if (node is StatementSyntax statement)
            {
                var siblings = Code.Siblings(statement);
                int at = siblings.ToList().IndexOf(statement);
                for (int i = at - 1; i >= 0; i--)
                    yield return siblings[i];
            }
            else if (node is QueryClauseSyntax or SelectOrGroupClauseSyntax && parent is QueryBodySyntax body)
            {
                int at = node is QueryClauseSyntax clause ? body.Clauses.IndexOf(clause) : body.Clauses.Count;
                for (int i = at - 1; i >= 0; i--)
                {
                    if (body.Clauses[i] is LetClauseSyntax let)
                        yield return let;
                }
            }
        }
    }
}
