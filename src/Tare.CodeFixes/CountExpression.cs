using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.CodeFixes;

/// <summary>
/// Decides whether an expression that counts a family may stand at a place: it means the same there, has no effect, costs
/// nothing and does not change while the family is gone through.
/// </summary>
internal static class CountExpression
{
    private static readonly HashSet<string> _changing = new(StringComparer.Ordinal)
    {
        "Add", "AddRange", "Clear", "Dequeue", "Enqueue", "Insert", "InsertRange", "Pop", "Push", "Remove", "RemoveAll", "RemoveAt", "RemoveRange", "TryAdd", "UnionWith", "ExceptWith",
    };

    /// <summary>The count as it may be written at <paramref name="at"/>, or null.</summary>
    public static ExpressionSyntax? ValidAt(Place place, SyntaxNode at, string? text, SyntaxNode? family)
    {
        if (text is null)
            return null;
        var count = SyntaxFactory.ParseExpression(text);
        if (count.ContainsDiagnostics || count.ToString() != text || !IsPure(place, at.SpanStart, count))
            return null;
        if (!IsInteger(place.TypeAt(at.SpanStart, count)))
            return null;
        return Roots(count).All(r => MeansTheSame(place, at, r, family) && !Changes(place, at.SpanStart, r, family)) ? count : null;
    }

    /// <summary>The count of a collection that is held in memory: `xs.Length`, `xs.Count`; null for what would be gone through again.</summary>
    public static string? Of(ExpressionSyntax collection, ITypeSymbol? type) => type switch
    {
        IArrayTypeSymbol { Rank: 1 } => collection + ".Length",
        INamedTypeSymbol named when named.GetMembers("Length").Any(IsCounter) => collection + ".Length",
        INamedTypeSymbol named when named.GetMembers("Count").Any(IsCounter) || named.AllInterfaces.Add(named).Any(i => IsCollection(i)) && named.TypeKind == TypeKind.Interface => collection + ".Count",
        _ => null,
    };

    private static bool IsCollection(INamedTypeSymbol type) =>
        type.OriginalDefinition.SpecialType is SpecialType.System_Collections_Generic_IReadOnlyCollection_T or SpecialType.System_Collections_Generic_ICollection_T;

    private static bool IsCounter(ISymbol member) => member is IPropertySymbol { IsStatic: false, Parameters.IsEmpty: true, Type.SpecialType: SpecialType.System_Int32, DeclaredAccessibility: Accessibility.Public };

    private static bool IsInteger(ITypeSymbol? type) => type?.SpecialType is SpecialType.System_Int32 or SpecialType.System_Int64 or SpecialType.System_UInt32
        or SpecialType.System_Int16 or SpecialType.System_UInt16 or SpecialType.System_Byte or SpecialType.System_SByte;

    private static bool IsPure(Place place, int position, ExpressionSyntax expression)
    {
        switch (expression)
        {
            case LiteralExpressionSyntax:
                return true;
            case ThisExpressionSyntax:
                return true;
            case PredefinedTypeSyntax:
                return true;
            case ParenthesizedExpressionSyntax parenthesised:
                return IsPure(place, position, parenthesised.Expression);
            case BinaryExpressionSyntax { RawKind: (int)SyntaxKind.AddExpression or (int)SyntaxKind.SubtractExpression or (int)SyntaxKind.MultiplyExpression } binary:
                return IsPure(place, position, binary.Left) && IsPure(place, position, binary.Right);
            case IdentifierNameSyntax:
                return place.SymbolAt(position, expression) is ILocalSymbol or IParameterSymbol or IFieldSymbol or INamedTypeSymbol or IPropertySymbol { IsIndexer: false };
            case MemberAccessExpressionSyntax { RawKind: (int)SyntaxKind.SimpleMemberAccessExpression } member:
                return place.SymbolAt(position, expression) is IFieldSymbol or IPropertySymbol { IsIndexer: false } or INamedTypeSymbol && IsPure(place, position, member.Expression);
            case InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax called } invocation:
                return place.SymbolAt(position, expression) is IMethodSymbol method && IsCountingCall(place, position, called, method)
                    && invocation.ArgumentList.Arguments.All(a => IsPure(place, position, a.Expression) || a.Expression is TypeOfExpressionSyntax);
            default:
                return false;
        }
    }

    private static bool IsCountingCall(Place place, int position, MemberAccessExpressionSyntax called, IMethodSymbol method)
    {
        string owner = method.ContainingType.ToDisplayString();
        if (owner == "System.Array" && method.Name == "GetLength")
            return IsPure(place, position, called.Expression);
        if (owner == "System.Enum" && method.Name is "GetValues" or "GetNames")
            return true;
        // going through a sequence again may run the tests again, or give other elements
        return owner == "System.Linq.Enumerable" && method.Name == "Count" && method.Parameters.Length == 0
            && IsPure(place, position, called.Expression) && Of(called.Expression, place.TypeAt(position, called.Expression)) is not null;
    }

    private static IEnumerable<IdentifierNameSyntax> Roots(ExpressionSyntax count) => count.DescendantNodesAndSelf().OfType<IdentifierNameSyntax>().Where(i =>
        i.Parent is not MemberAccessExpressionSyntax member || member.Expression == i || member.Expression is ThisExpressionSyntax);

    /// <summary>The name stands for the same thing where the family is gone through.</summary>
    private static bool MeansTheSame(Place place, SyntaxNode at, IdentifierNameSyntax name, SyntaxNode? family)
    {
        if (place.SymbolAt(at.SpanStart, name) is not { } here)
            return false;
        if (here is INamedTypeSymbol)
            return true;
        if (family is null)
            return false;
        if (MemberOf(family) == MemberOf(at))
        {
            // of two grids the place names the outer one, where the inner one need not be declared yet
            var there = place.SymbolAt(family.SpanStart, name);
            return there is null || !IsDeclaredBefore(there, family) || SymbolEqualityComparer.Default.Equals(there, here);
        }

        return here is IFieldSymbol or IPropertySymbol or IParameterSymbol { ContainingSymbol: IMethodSymbol { MethodKind: MethodKind.Constructor } } && here.DeclaringSyntaxReferences.Any(d => d.SyntaxTree == family.SyntaxTree && d.GetSyntax().FullSpan.Contains(family.Span));
    }

    private static bool IsDeclaredBefore(ISymbol symbol, SyntaxNode family) =>
        symbol is not ILocalSymbol || symbol.DeclaringSyntaxReferences.Any(d => d.SyntaxTree == family.SyntaxTree && d.Span.Start <= family.SpanStart);

    /// <summary>The collection grows, shrinks or is replaced inside the loop over the family.</summary>
    private static bool Changes(Place place, int position, IdentifierNameSyntax name, SyntaxNode? family)
    {
        var symbol = place.SymbolAt(position, name);
        var loop = family?.AncestorsAndSelf().FirstOrDefault(n => n is ForStatementSyntax or CommonForEachStatementSyntax or WhileStatementSyntax or DoStatementSyntax);
        if (loop is null || symbol is INamedTypeSymbol)
            return false;
        foreach (var use in loop.DescendantNodes().OfType<IdentifierNameSyntax>().Where(i => i.Identifier.ValueText == name.Identifier.ValueText))
        {
            if (!SymbolEqualityComparer.Default.Equals(place.Model.GetSymbolInfo(use, place.Cancel).Symbol, symbol))
                continue;
            SyntaxNode target = use.Parent is MemberAccessExpressionSyntax { Expression: ThisExpressionSyntax } own ? own : use;
            switch (target.Parent)
            {
                case AssignmentExpressionSyntax assignment when assignment.Left == target:
                case ArgumentSyntax { RefKindKeyword.RawKind: not (int)SyntaxKind.None }:
                case PostfixUnaryExpressionSyntax { RawKind: (int)SyntaxKind.PostIncrementExpression or (int)SyntaxKind.PostDecrementExpression }:
                case PrefixUnaryExpressionSyntax { RawKind: (int)SyntaxKind.PreIncrementExpression or (int)SyntaxKind.PreDecrementExpression }:
                case MemberAccessExpressionSyntax { Parent: InvocationExpressionSyntax } call when call.Expression == target && _changing.Contains(call.Name.Identifier.ValueText):
                    return true;
            }
        }

        return false;
    }

    public static SyntaxNode? MemberOf(SyntaxNode node) =>
        node.AncestorsAndSelf().FirstOrDefault(n => n is MemberDeclarationSyntax and not GlobalStatementSyntax and not BaseNamespaceDeclarationSyntax)
        ?? node.AncestorsAndSelf().LastOrDefault();
}
