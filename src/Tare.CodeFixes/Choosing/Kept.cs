using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.CodeFixes.Choosing;

/// <summary>One thing that is kept of the best candidate so far: <c>bestWeights = weights</c>.</summary>
internal sealed class Kept
{
    private Kept(ExpressionSyntax target, ExpressionSyntax value, StatementSyntax statement)
    {
        Target = target;
        Value = value;
        Statement = statement;
    }

    public ExpressionSyntax Target { get; }

    public ExpressionSyntax Value { get; }

    public StatementSyntax Statement { get; }

    /// <summary>What the statements keep; null when one does something that is no keeping and no report.</summary>
    public static List<Kept> In(IEnumerable<StatementSyntax> statements)
    {
        var kept = new List<Kept>();
        foreach (var statement in statements)
        {
            if (statement is ExpressionStatementSyntax { Expression: AssignmentExpressionSyntax { RawKind: (int)SyntaxKind.SimpleAssignmentExpression } assignment })
                Add(assignment.Left, assignment.Right, statement, kept);
        }

        return kept;
    }

    private static void Add(ExpressionSyntax target, ExpressionSyntax value, StatementSyntax statement, List<Kept> kept)
    {
        if (target is TupleExpressionSyntax targets && value is TupleExpressionSyntax values && targets.Arguments.Count == values.Arguments.Count)
        {
            for (int i = 0; i < targets.Arguments.Count; i++)
                Add(targets.Arguments[i].Expression, values.Arguments[i].Expression, statement, kept);
        }
        else if (value is AssignmentExpressionSyntax chained)
        {
            Add(target, chained.Right, statement, kept);
            Add(chained.Left, chained.Right, statement, kept);
        }
        else
        {
            kept.Add(new Kept(target, value, statement));
        }
    }

    /// <summary>The members of a created value by the expressions they hold: of a tuple, a record, an anonymous object, an initializer.</summary>
    public static IEnumerable<(string Member, ExpressionSyntax Value)> Parts(ExpressionSyntax created, SemanticModel model)
    {
        switch (created)
        {
            case TupleExpressionSyntax tuple when (model.GetTypeInfo(tuple).ConvertedType ?? model.GetTypeInfo(tuple).Type) is INamedTypeSymbol { IsTupleType: true } type:
                for (int i = 0; i < tuple.Arguments.Count && i < type.TupleElements.Length; i++)
                    yield return (type.TupleElements[i].Name, tuple.Arguments[i].Expression);
                break;
            case AnonymousObjectCreationExpressionSyntax anonymous:
                foreach (var one in anonymous.Initializers)
                {
                    if (model.GetDeclaredSymbol(one) is { } member)
                        yield return (member.Name, one.Expression);
                }

                break;
            case BaseObjectCreationExpressionSyntax creation:
                if (model.GetSymbolInfo(creation).Symbol is IMethodSymbol constructor && creation.ArgumentList is { } list)
                {
                    for (int i = 0; i < list.Arguments.Count && i < constructor.Parameters.Length; i++)
                    {
                        string name = list.Arguments[i].NameColon?.Name.Identifier.ValueText ?? constructor.Parameters[i].Name;
                        var member = constructor.ContainingType.GetMembers().FirstOrDefault(m => m is IPropertySymbol or IFieldSymbol && !m.IsImplicitlyDeclared && m.Name.Equals(name, StringComparison.OrdinalIgnoreCase))
                            ?? constructor.ContainingType.GetMembers().FirstOrDefault(m => m is IPropertySymbol && m.Name.Equals(name, StringComparison.OrdinalIgnoreCase));
                        if (member is not null)
                            yield return (member.Name, list.Arguments[i].Expression);
                    }
                }

                foreach (var one in creation.Initializer?.Expressions.OfType<AssignmentExpressionSyntax>() ?? Enumerable.Empty<AssignmentExpressionSyntax>())
                    yield return (one.Left.ToString(), one.Right);
                break;
        }
    }
}
