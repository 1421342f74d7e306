using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Knowledge;

/// <summary>Types that can hold rows.</summary>
internal static class RowsTypes
{
    private static readonly HashSet<string> Names = new(StringComparer.Ordinal)
    {
        "IDataView", "DataFrame", "Tensor", "DataLoader", "Dataset", "Matrix", "Vector", "Span", "ReadOnlySpan", "Memory", "ReadOnlyMemory",
        "ImmutableArray", "NDarray", "IAsyncEnumerable",
    };

    private static readonly string[] DataWords = { "data", "dataset", "set", "rows", "samples", "split", "table", "frame", "examples", "records", "loader", "view", "matrix", "corpus" };

    public static bool IsRowsLike(ITypeSymbol? type) => type switch
    {
        null => false,
        IErrorTypeSymbol => true,
        IArrayTypeSymbol => true,
        { SpecialType: SpecialType.System_String } => false,
        INamedTypeSymbol named => IsCollection(named) || Names.Contains(named.Name) || IsDataSet(named),
        ITypeParameterSymbol => false,
        { TypeKind: TypeKind.Dynamic } => true,
        _ => false,
    };

    /// <summary>Something that can be enumerated and is not text.</summary>
    public static bool IsCollection(ITypeSymbol? type)
    {
        if (type is null || type.SpecialType == SpecialType.System_String)
            return false;
        if (type is IArrayTypeSymbol)
            return true;
        if (type is not INamedTypeSymbol named)
            return false;
        if (named.SpecialType is SpecialType.System_Collections_IEnumerable or SpecialType.System_Collections_Generic_IEnumerable_T)
            return true;
        if (named.Name is "Span" or "ReadOnlySpan" or "Memory" or "ReadOnlyMemory" or "IAsyncEnumerable" or "PriorityQueue")
            return true;
        foreach (var i in named.AllInterfaces)
        {
            if (i.SpecialType == SpecialType.System_Collections_IEnumerable)
                return true;
        }

        return false;
    }

    /// <summary>A type's name alone says that it can hold rows.</summary>
    public static bool SaysRows(string typeName)
    {
        if (Names.Contains(typeName))
            return true;
        var words = Vocabulary.Words(typeName);
        return words.Count > 0 && Array.IndexOf(DataWords, words[words.Count - 1]) >= 0;
    }

    /// <summary>A user's own wrapper around rows, by its name.</summary>
    private static bool IsDataSet(INamedTypeSymbol type)
    {
        if (type.TypeKind is not (TypeKind.Class or TypeKind.Struct or TypeKind.Interface))
            return false;
        var words = Vocabulary.Words(type.Name);
        return words.Count > 0 && Array.IndexOf(DataWords, words[words.Count - 1]) >= 0;
    }

    public static bool IsNumber(ITypeSymbol? type)
    {
        if (type is null)
            return false;
        if (type is INamedTypeSymbol { OriginalDefinition.SpecialType: SpecialType.System_Nullable_T } nullable)
            type = nullable.TypeArguments[0];
        return type.SpecialType is >= SpecialType.System_SByte and <= SpecialType.System_Double || type.TypeKind == TypeKind.Enum;
    }

    public static bool IsReal(ITypeSymbol? type)
    {
        if (type is INamedTypeSymbol { OriginalDefinition.SpecialType: SpecialType.System_Nullable_T } nullable)
            type = nullable.TypeArguments[0];
        return type?.SpecialType is SpecialType.System_Double or SpecialType.System_Single or SpecialType.System_Decimal;
    }

    public static bool IsScalar(ITypeSymbol? type) =>
        IsNumber(type) || type?.SpecialType is SpecialType.System_Boolean or SpecialType.System_String or SpecialType.System_Char or SpecialType.System_DateTime;

    public static bool IsTask(ITypeSymbol? type, out ITypeSymbol? result)
    {
        result = null;
        if (type is INamedTypeSymbol { Name: "Task" or "ValueTask", ContainingNamespace.Name: "Tasks" } named)
        {
            result = named.TypeArguments.Length == 1 ? named.TypeArguments[0] : null;
            return true;
        }

        return false;
    }
}
