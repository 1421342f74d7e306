using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.CodeFixes;

/// <summary>Whether the runtime library is there for a document in every target that compiles it, and how its types are spelled.</summary>
internal sealed class TareLibrary
{
    private const string AssemblyName = "Tare";
    private readonly IReadOnlyList<Compilation> _compilations;
    private HashSet<string>? _typeNames;

    private TareLibrary(IReadOnlyList<Compilation> compilations)
    {
        _compilations = compilations;
    }

    public static async Task<TareLibrary> OfAsync(Document document, CancellationToken cancel)
    {
        var compilations = new List<Compilation>();
        foreach (var id in document.GetLinkedDocumentIds().Insert(0, document.Id))
        {
            if (document.Project.Solution.GetDocument(id) is { } linked && await linked.Project.GetCompilationAsync(cancel).ConfigureAwait(false) is { } compilation)
                compilations.Add(compilation);
        }

        return new TareLibrary(compilations);
    }

    /// <summary>Every target can name the type.</summary>
    public bool Has(string type) => _compilations.Count > 0 && _compilations.All(c => TypeIn(c, type) is { } found && c.IsSymbolAccessibleWithin(found, c.Assembly));

    /// <summary>
    /// How to write a type of the library at a position: its short name when that means it, or will with one more using
    /// directive that makes no other name of the file ambiguous; else the full name. Null when no spelling means it.
    /// </summary>
    public string? Spell(Place place, int position, string type, out bool needsUsing)
    {
        needsUsing = false;
        var simple = place.Model.LookupNamespacesAndTypes(position, name: type);
        if (simple.Length == 1 && IsOurs(simple[0]))
            return type;
        if (simple.IsEmpty && place.Model.LookupSymbols(position, name: type).IsEmpty && Usings.CanAdd(place.Root) && !WouldBeAmbiguous(place))
        {
            needsUsing = true;
            return type;
        }

        foreach (string full in new[] { "Tare." + type, "global::Tare." + type })
        {
            var name = SyntaxFactory.ParseTypeName(full);
            if (IsOurs(place.Model.GetSpeculativeSymbolInfo(position, name, SpeculativeBindingOption.BindAsTypeOrNamespace).Symbol))
                return full;
        }

        return null;
    }

    /// <summary>A name of the file that now means a type from another using directive would mean two.</summary>
    private bool WouldBeAmbiguous(Place place)
    {
        _typeNames ??= new HashSet<string>(TypesIn(place.Model.Compilation), StringComparer.Ordinal);
        foreach (var name in place.Root.DescendantNodes().OfType<SimpleNameSyntax>())
        {
            if (_typeNames.Contains(name.Identifier.ValueText) && place.Model.GetSymbolInfo(name, place.Cancel).Symbol is INamedTypeSymbol symbol && !IsOurs(symbol))
                return true;
        }

        return false;
    }

    private static IEnumerable<string> TypesIn(Compilation compilation) =>
        compilation.GlobalNamespace.GetNamespaceMembers().Where(n => n.Name == "Tare").SelectMany(n => n.GetTypeMembers()).Select(t => t.Name);

    private static INamedTypeSymbol? TypeIn(Compilation compilation, string type) =>
        compilation.GetTypesByMetadataName("Tare." + type).FirstOrDefault(IsOurs);

    private static bool IsOurs(ISymbol? symbol) =>
        symbol is INamedTypeSymbol { ContainingNamespace: { Name: "Tare", ContainingNamespace.IsGlobalNamespace: true } } type
        && type.ContainingAssembly?.Name.StartsWith(AssemblyName, StringComparison.Ordinal) == true;
}
