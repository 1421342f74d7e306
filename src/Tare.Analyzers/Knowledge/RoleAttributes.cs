using Microsoft.CodeAnalysis;
using Tare.Analyzers.Flow;

namespace Tare.Analyzers.Knowledge;

/// <summary>The attributes that declare roles, matched by full name, so that a project may declare its own copies.</summary>
internal static class RoleAttributes
{
    public static Role RoleOf(ISymbol? symbol, ITypeSymbol? type)
    {
        var role = Of(symbol);
        if (role == Role.Unknown && type is INamedTypeSymbol { DeclaringSyntaxReferences.Length: > 0 })
            role = Of(type);
        return role;
    }

    public static bool Has(ISymbol symbol, string attribute)
    {
        foreach (var data in symbol.GetAttributes())
        {
            if (Is(data, attribute))
                return true;
        }

        return false;
    }

    public static Role Of(ISymbol? symbol)
    {
        if (symbol is null || symbol.DeclaringSyntaxReferences.Length == 0 || symbol is ILocalSymbol)
            return Role.Unknown;
        return Of(symbol.GetAttributes());
    }

    public static Role OfReturn(IMethodSymbol method) =>
        method.DeclaringSyntaxReferences.Length == 0 ? Role.Unknown : Of(method.GetReturnTypeAttributes());

    private static Role Of(System.Collections.Immutable.ImmutableArray<AttributeData> attributes)
    {
        foreach (var data in attributes)
        {
            if (Is(data, "TrainingRowsAttribute"))
                return Role.Training;
            if (Is(data, "ValidationRowsAttribute"))
                return Role.Validation;
            if (Is(data, "TestRowsAttribute"))
                return Role.Test;
            if (Is(data, "UnsplitRowsAttribute"))
                return Role.Unsplit;
            if (Is(data, "NoRoleAttribute"))
                return Role.None;
        }

        return Role.Unknown;
    }

    public static bool Is(AttributeData data, string name) =>
        data.AttributeClass is { ContainingNamespace: { Name: "Tare", ContainingNamespace.IsGlobalNamespace: true } } type && type.Name == name;
}
