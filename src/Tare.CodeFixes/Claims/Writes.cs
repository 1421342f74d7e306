using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;

namespace Tare.CodeFixes.Claims;

/// <summary>All values that a local variable is given, with the way into each: `["[]", "Item2"]` for the second part of an element.</summary>
internal sealed class Writes
{
    /// <summary>Stands for an element of a collection in a way.</summary>
    public const string Element = "[]";

    private readonly Compilation _compilation;
    private readonly CancellationToken _cancel;
    private readonly Dictionary<SyntaxNode, ImmutableArray<IOperation>> _operations = new();

    public Writes(Compilation compilation, CancellationToken cancel)
    {
        _compilation = compilation;
        _cancel = cancel;
    }

    /// <summary>A value that goes in whole (<paramref name="Into"/> empty) or as an element or member.</summary>
    /// <param name="From">Way from the value to what is written: `["[]"]` for a `foreach` variable.</param>
    public sealed record Write(IOperation? Value, ImmutableList<string> Into, ImmutableList<string> From, IOperation Syntax);

    public IEnumerable<Write> To(ISymbol local)
    {
        var root = ImmutableList<string>.Empty;
        foreach (var operation in OperationsAround(local))
        {
            switch (operation)
            {
                case IVariableDeclaratorOperation declarator when Same(declarator.Symbol, local) && declarator.GetVariableInitializer() is { } initial:
                    yield return new Write(initial.Value, root, root, operation);
                    break;
                case ISimpleAssignmentOperation assignment when TargetOf(assignment.Target, local) is { } into:
                    yield return new Write(assignment.Value, into, root, operation);
                    break;
                case ICoalesceAssignmentOperation assignment when TargetOf(assignment.Target, local) is { } into:
                    yield return new Write(assignment.Value, into, root, operation);
                    break;
                case IDeconstructionAssignmentOperation deconstruction when PartOf(deconstruction.Target, local) is { } part:
                    yield return new Write(deconstruction.Value, root, part, operation);
                    break;
                case IForEachLoopOperation loop when loop.Locals.Any(l => Same(l, local)):
                    var way = loop.LoopControlVariable is IDeclarationExpressionOperation ? PartOf(loop.LoopControlVariable, local) ?? root : root;
                    yield return new Write(loop.Collection, root, way.Insert(0, Element), operation);
                    break;
                case IInvocationOperation { Instance: { } instance, TargetMethod.Name: "Add" or "Enqueue" or "Push" or "Insert" } added when IsLocal(instance, local):
                    yield return new Write(added.Arguments[added.Arguments.Length - 1].Value, root.Add(Element), root, operation);
                    break;
                case ICompoundAssignmentOperation compound when TargetOf(compound.Target, local) is { } into:
                    yield return new Write(null, into, root, operation);
                    break;
                case IIncrementOrDecrementOperation step when TargetOf(step.Target, local) is { } into:
                    yield return new Write(null, into, root, operation);
                    break;
                case IArgumentOperation { Parameter.RefKind: RefKind.Out or RefKind.Ref } argument when IsLocal(argument.Value, local):
                    yield return new Write(null, root, root, operation);
                    break;
            }
        }
    }

    public SemanticModel ModelOf(SyntaxTree tree) => _compilation.GetSemanticModel(tree);

    private ImmutableArray<IOperation> OperationsAround(ISymbol local)
    {
        if (local.DeclaringSyntaxReferences.Length == 0)
            return ImmutableArray<IOperation>.Empty;
        var syntax = local.DeclaringSyntaxReferences[0].GetSyntax(_cancel);
        var member = CountExpression.MemberOf(syntax)!;
        if (_operations.TryGetValue(member, out var known))
            return known;
        var model = ModelOf(syntax.SyntaxTree);
        var found = ImmutableArray.CreateBuilder<IOperation>();
        // a member is many operations (initialisers, body, accessors): take the outermost of each
        foreach (var node in member is CompilationUnitSyntax unit ? unit.Members.OfType<GlobalStatementSyntax>().Select(g => (SyntaxNode)g.Statement) : new[] { member })
            Gather(node, model, found);
        return _operations[member] = found.ToImmutable();
    }

    private void Gather(SyntaxNode node, SemanticModel model, ImmutableArray<IOperation>.Builder found)
    {
        if (model.GetOperation(node, _cancel) is { } operation)
        {
            found.AddRange(operation.DescendantsAndSelf());
            return;
        }

        foreach (var child in node.ChildNodes())
            Gather(child, model, found);
    }

    /// <summary>`x`, `x[i]` or `x.P` as a target: the way from the variable to what is written.</summary>
    private static ImmutableList<string>? TargetOf(IOperation target, ISymbol local)
    {
        switch (target)
        {
            case ILocalReferenceOperation or IParameterReferenceOperation when IsLocal(target, local):
                return ImmutableList<string>.Empty;
            case IArrayElementReferenceOperation element when IsLocal(element.ArrayReference, local):
                return ImmutableList.Create(Element);
            case IPropertyReferenceOperation { Property.IsIndexer: true, Instance: { } list } indexer when IsLocal(list, local):
                return indexer.Property.ContainingType.Name.EndsWith("Dictionary", StringComparison.Ordinal) ? ImmutableList.Create(Element, "Value") : ImmutableList.Create(Element);
            case IMemberReferenceOperation { Instance: { } owner } member when IsLocal(owner, local):
                return ImmutableList.Create(NameOf(member.Member));
            default:
                return null;
        }
    }

    private static ImmutableList<string>? PartOf(IOperation target, ISymbol local)
    {
        switch (target)
        {
            case IDeclarationExpressionOperation declaration:
                return PartOf(declaration.Expression, local);
            case ITupleOperation tuple:
                for (int i = 0; i < tuple.Elements.Length; i++)
                {
                    if (PartOf(tuple.Elements[i], local) is { } part)
                        return part.Insert(0, "Item" + (i + 1));
                }

                return null;
            default:
                return IsLocal(target, local) ? ImmutableList<string>.Empty : null;
        }
    }

    public static string NameOf(ISymbol member) => member is IFieldSymbol { CorrespondingTupleField: { } field } ? field.Name : member.Name;

    private static bool IsLocal(IOperation operation, ISymbol local) => operation switch
    {
        ILocalReferenceOperation reference => Same(reference.Local, local),
        IParameterReferenceOperation reference => Same(reference.Parameter, local),
        IConversionOperation conversion => IsLocal(conversion.Operand, local),
        _ => false,
    };

    private static bool Same(ISymbol a, ISymbol b) => SymbolEqualityComparer.Default.Equals(a, b);
}
