using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;

namespace Tare.Analyzers.Flow;

/// <summary>
/// The one adapter for collection expressions: the floor compiler shows them as untyped operations with children, newer
/// ones as operations of a kind that the floor does not know, spreads among the children.
/// </summary>
internal static class CollectionExpression
{
    public static bool IsOne(IOperation operation) =>
        operation.Syntax.IsKind(SyntaxKind.CollectionExpression) || (operation.Type is IArrayTypeSymbol && operation.IsImplicit && operation.ChildOperations.Count > 0);

    public static IReadOnlyList<IOperation> Elements(IOperation operation) => operation.ChildOperations.ToArray();

    public static bool IsSpread(IOperation element) => element.Syntax.IsKind(SyntaxKind.SpreadElement);
}
