using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Text;

namespace Tare.Analyzers.Knowledge;

/// <summary>
/// What library members mean. Immutable and made of strings only, so the embedded one is read once a process and shared
/// by all compilations.
/// </summary>
internal sealed class Catalogue
{
    private static readonly Lazy<Catalogue> _embedded = new(LoadEmbedded);

    private readonly Catalogue? _under;
    private readonly Dictionary<string, List<CatalogueEntry>> _byMember = new(StringComparer.Ordinal);
    private readonly Dictionary<string, List<CatalogueEntry>> _byType = new(StringComparer.Ordinal);

    private Catalogue(ImmutableArray<CatalogueEntry> entries, Catalogue? under)
    {
        Entries = entries;
        _under = under;
        foreach (var entry in entries)
        {
            var index = entry.IsType ? _byType : _byMember;
            var name = entry.IsType ? entry.TypeName : entry.MemberName;
            if (!index.TryGetValue(name, out var list))
                index.Add(name, list = []);
            list.Add(entry);
        }
    }

    /// <summary>The lines that ship with the analyzer.</summary>
    public static Catalogue Embedded => _embedded.Value;

    /// <summary>This catalogue's own lines, without those of the one it lies over.</summary>
    public ImmutableArray<CatalogueEntry> Entries { get; }

    /// <summary>The simple names of all members and types, for a look at a text before any symbol is bound. May repeat.</summary>
    public IEnumerable<string> Words
    {
        get
        {
            for (var layer = this; layer is not null; layer = layer._under)
            {
                foreach (var entry in layer.Entries)
                    yield return entry.SimpleName;
            }
        }
    }

    /// <summary>A catalogue whose lines win over those of <paramref name="under"/>.</summary>
    public static Catalogue Over(Catalogue under, ImmutableArray<CatalogueEntry> entries) =>
        entries.IsEmpty ? under : new Catalogue(entries, under);

    /// <summary>A catalogue of these lines only.</summary>
    public static Catalogue Of(ImmutableArray<CatalogueEntry> entries) => new(entries, under: null);

    /// <summary>The simple names of the members and types with one effect. May repeat.</summary>
    public IEnumerable<string> WordsOf(CatalogueEffect effect)
    {
        for (var layer = this; layer is not null; layer = layer._under)
        {
            foreach (var entry in layer.Entries)
            {
                if (entry.Effect == effect)
                    yield return entry.SimpleName;
            }
        }
    }

    /// <summary>What the catalogue says of a member or type.</summary>
    public bool TryGet(ISymbol symbol, [NotNullWhen(true)] out CatalogueEntry? entry) => TryGet(symbol, out entry, out _);

    /// <summary>
    /// What the catalogue says of a member or type. A line holds for the member it names, for overrides and for
    /// implementations of it; the nearest wins, a single overload before <c>(*)</c>, a member before its type.
    /// </summary>
    /// <param name="symbol">A method, constructor, property, accessor, field or type, constructed or not.</param>
    /// <param name="entry">The line.</param>
    /// <param name="declared">
    /// The member the line was found for. Its parameters have the names that the line uses, at the same ordinals as those
    /// of <paramref name="symbol"/>, whose own may be called otherwise.
    /// </param>
    public bool TryGet(ISymbol symbol, [NotNullWhen(true)] out CatalogueEntry? entry, [NotNullWhen(true)] out ISymbol? declared)
    {
        symbol = Written(symbol);
        if (symbol is INamedTypeSymbol or IMethodSymbol { ContainingType: not null } or IPropertySymbol or IFieldSymbol)
        {
            for (var layer = this; layer is not null; layer = layer._under)
            {
                if (layer.TryGetOwn(symbol, out entry, out declared))
                    return true;
            }
        }

        entry = null;
        declared = null;
        return false;
    }

    private static ISymbol Written(ISymbol symbol)
    {
        if (symbol is IMethodSymbol method)
        {
            if (method.AssociatedSymbol is IPropertySymbol property)
                return property.OriginalDefinition;
            if (method.MethodKind is MethodKind.LocalFunction or MethodKind.AnonymousFunction)
                return method;
            return (method.ReducedFrom ?? method).OriginalDefinition;
        }

        return symbol.OriginalDefinition;
    }

    private bool TryGetOwn(ISymbol symbol, [NotNullWhen(true)] out CatalogueEntry? entry, [NotNullWhen(true)] out ISymbol? declared)
    {
        for (var member = symbol; member is not null; member = Overridden(member))
        {
            entry = Direct(member);
            if (entry is not null)
            {
                declared = member;
                return true;
            }
        }

        return TryGetImplemented(symbol, out entry, out declared);
    }

    private CatalogueEntry? Direct(ISymbol symbol)
    {
        if (symbol is INamedTypeSymbol type)
            return OfType(type);

        var containing = symbol.ContainingType;
        if (_byMember.TryGetValue(symbol.MetadataName, out var candidates))
        {
            string? id = null;
            CatalogueEntry? general = null;
            foreach (var candidate in candidates)
            {
                // Names first: an id is a new string, and most members of the same name belong to other types.
                if (candidate.TypeName != containing.MetadataName)
                    continue;
                id ??= symbol.GetDocumentationCommentId();
                if (id is null)
                    break;
                if (candidate.AllOverloads ? IsOverload(id, candidate.Id) : id == candidate.Id)
                {
                    if (!candidate.AllOverloads)
                        return candidate;
                    general ??= candidate;
                }
            }

            if (general is not null)
                return general;
        }

        return OfType(containing);
    }

    private CatalogueEntry? OfType(INamedTypeSymbol type)
    {
        if (_byType.TryGetValue(type.MetadataName, out var candidates))
        {
            var id = type.OriginalDefinition.GetDocumentationCommentId();
            foreach (var candidate in candidates)
            {
                if (candidate.Id == id)
                    return candidate;
            }
        }

        return null;
    }

    private bool TryGetImplemented(ISymbol symbol, [NotNullWhen(true)] out CatalogueEntry? entry, [NotNullWhen(true)] out ISymbol? declared)
    {
        foreach (var explicitly in Explicit(symbol))
        {
            declared = explicitly.OriginalDefinition;
            entry = Direct(declared);
            if (entry is not null)
                return true;
        }

        if (symbol is IMethodSymbol or IPropertySymbol && !symbol.IsStatic
            && symbol.ContainingType.TypeKind != TypeKind.Interface
            && _byMember.TryGetValue(symbol.MetadataName, out var candidates))
        {
            foreach (var contract in symbol.ContainingType.AllInterfaces)
            {
                if (!AnyOfType(candidates, contract.MetadataName))
                    continue;
                foreach (var member in contract.GetMembers(symbol.Name))
                {
                    declared = member.OriginalDefinition;
                    entry = Direct(declared);
                    if (entry is not null
                        && SymbolEqualityComparer.Default.Equals(symbol.ContainingType.FindImplementationForInterfaceMember(member), symbol))
                        return true;
                }
            }
        }

        entry = null;
        declared = null;
        return false;
    }

    private static bool AnyOfType(List<CatalogueEntry> candidates, string typeName)
    {
        foreach (var candidate in candidates)
        {
            if (candidate.TypeName == typeName)
                return true;
        }

        return false;
    }

    private static bool IsOverload(string id, string name) =>
        id.StartsWith(name, StringComparison.Ordinal) && (id.Length == name.Length || id[name.Length] is '(' or '`');

    private static ISymbol? Overridden(ISymbol symbol) => symbol switch
    {
        IMethodSymbol method => method.OverriddenMethod?.OriginalDefinition,
        IPropertySymbol property => property.OverriddenProperty?.OriginalDefinition,
        _ => null,
    };

    private static IEnumerable<ISymbol> Explicit(ISymbol symbol) => symbol switch
    {
        IMethodSymbol { ExplicitInterfaceImplementations.IsEmpty: false } method => method.ExplicitInterfaceImplementations,
        IPropertySymbol { ExplicitInterfaceImplementations.IsEmpty: false } property => property.ExplicitInterfaceImplementations,
        _ => [],
    };

    private static Catalogue LoadEmbedded()
    {
        using var stream = typeof(Catalogue).Assembly.GetManifestResourceStream("catalogue.txt")
            ?? throw new InvalidOperationException("The assembly holds no resource 'catalogue.txt'.");
        return Of(CatalogueReader.Read(SourceText.From(stream)).Entries);
    }
}
