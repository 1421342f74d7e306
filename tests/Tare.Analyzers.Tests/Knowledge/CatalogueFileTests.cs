using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.Text;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Tests.Knowledge;

/// <summary>Every line of the catalogue that ships is held against the real assemblies.</summary>
public class CatalogueFileTests
{
    private static readonly CSharpCompilation _compilation = KnowledgeCompilation.Create();

    [Fact]
    public void The_reader_understands_every_line()
    {
        var path = typeof(Catalogue).Assembly.GetManifestResourceStream("catalogue.txt")!;
        var text = CatalogueReader.Read(SourceText.From(path));
        Assert.Empty(text.Errors.Select(e => $"line {e.Line + 1}: {e.Reason}"));
        Assert.Equal(text.Entries.Length, Catalogue.Embedded.Entries.Length);
    }

    [Fact]
    public void Every_line_names_a_member_and_its_parameters()
    {
        var wrong = new List<string>();
        foreach (var entry in Catalogue.Embedded.Entries)
        {
            var members = Members(entry);
            if (members.Count == 0)
            {
                wrong.Add($"line {entry.Line + 1}: '{entry.Id}' names no member");
                continue;
            }

            foreach (var (key, names) in entry.Keys)
            {
                if (CatalogueGrammar.WordsOf(key) is not null)
                    continue;
                foreach (var name in names)
                {
                    if (!members.Exists(member => Has(member, name)))
                        wrong.Add($"line {entry.Line + 1}: no overload of '{entry.Id}' has '{name}'");
                }
            }
        }

        Assert.True(wrong.Count == 0, string.Join("\n", wrong));
    }

    [Fact]
    public void Every_overload_has_a_parameter_for_what_its_effect_needs()
    {
        // Overloads of one method may call the same thing by two names ("s" and "input"); a line must give both.
        var wrong = new List<string>();
        foreach (var entry in Catalogue.Embedded.Entries.Where(e => e.AllOverloads))
        {
            foreach (var key in CatalogueGrammar.Required(entry.Effect).Where(k => CatalogueGrammar.WordsOf(k) is null))
            {
                foreach (var overload in Symbols(entry).Where(s => s.DeclaredAccessibility == Accessibility.Public))
                {
                    if (overload is IMethodSymbol { Parameters.Length: 0 })
                        continue;
                    if (Catalogue.Embedded.TryGet(overload, out var found) && ReferenceEquals(found, entry) && !entry[key].Any(n => Has(overload, n)))
                        wrong.Add($"line {entry.Line + 1}: '{overload.GetDocumentationCommentId()}' lacks a '{CatalogueGrammar.NameOf(key)}'");
                }
            }
        }

        Assert.True(wrong.Count == 0, string.Join("\n", wrong));
    }

    [Fact]
    public void Every_line_is_found_again_by_its_symbol()
    {
        var wrong = new List<string>();
        foreach (var entry in Catalogue.Embedded.Entries)
        {
            // A T: line is found by the type itself, a (*) line by those overloads that have no line of their own.
            var found = Symbols(entry).Any(s => Catalogue.Embedded.TryGet(s, out var got) && ReferenceEquals(got, entry));
            if (!found)
                wrong.Add($"line {entry.Line + 1}: {entry}");
        }

        Assert.True(wrong.Count == 0, string.Join("\n", wrong));
    }

    [Fact]
    public void Every_trainer_that_takes_validation_rows_is_in_the_catalogue()
    {
        var missing = new List<string>();
        foreach (var type in Types(_compilation.GlobalNamespace))
        {
            foreach (var method in type.GetMembers("Fit").OfType<IMethodSymbol>())
            {
                if (method.DeclaredAccessibility == Accessibility.Public
                    && method.Parameters.Any(p => p.Name == "validationData")
                    && !(Catalogue.Embedded.TryGet(method, out var entry) && entry.Names(CatalogueKey.Validation, "validationData")))
                    missing.Add(method.GetDocumentationCommentId()!);
            }
        }

        Assert.True(missing.Count == 0, string.Join("\n", missing));
    }

    [Fact]
    public void Every_number_on_a_metrics_object_of_Microsoft_ML_is_in_the_catalogue()
    {
        var seen = 0;
        var missing = new List<string>();
        foreach (var type in Types(_compilation.GlobalNamespace))
        {
            if (type.ContainingNamespace.ToDisplayString() != "Microsoft.ML.Data" || !type.Name.EndsWith("Metrics", StringComparison.Ordinal))
                continue;
            foreach (var property in type.GetMembers().OfType<IPropertySymbol>())
            {
                if (property.DeclaredAccessibility != Accessibility.Public)
                    continue;
                seen++;
                if (!Catalogue.Embedded.TryGet(property, out _))
                    missing.Add(property.GetDocumentationCommentId()!);
            }
        }

        Assert.True(missing.Count == 0, string.Join("\n", missing));
        Assert.True(seen > 20);
    }

    [Fact]
    public void Every_cumulative_distribution_of_MathNet_is_a_tail()
    {
        var types = Types(_compilation.GlobalNamespace).Where(t => t.ContainingNamespace.ToDisplayString() == "MathNet.Numerics.Distributions");
        var methods = types.SelectMany(t => t.GetMembers()).OfType<IMethodSymbol>()
            .Where(m => m.DeclaredAccessibility == Accessibility.Public && m.Name is "CDF" or "CumulativeDistribution").ToList();
        Assert.True(methods.Count > 60);
        Assert.All(methods, m => Assert.True(Catalogue.Embedded.TryGet(m, out var entry) && entry.Effect == CatalogueEffect.Tail, m.ToDisplayString()));
    }

    private static List<ISymbol> Members(CatalogueEntry entry)
    {
        var symbols = Symbols(entry).ToList();
        return entry.IsType ? symbols.OfType<INamedTypeSymbol>().SelectMany(t => t.GetMembers()).ToList() : symbols;
    }

    private static IEnumerable<ISymbol> Symbols(CatalogueEntry entry)
    {
        if (!entry.AllOverloads)
            return DocumentationCommentId.GetSymbolsForDeclarationId(entry.Id, _compilation);
        var dot = entry.Id.LastIndexOf('.');
        var type = DocumentationCommentId.GetFirstSymbolForDeclarationId("T:" + entry.Id.Substring(2, dot - 2), _compilation) as INamedTypeSymbol;
        return type?.GetMembers().Where(m => m.MetadataName == entry.MemberName && m.GetDocumentationCommentId()![0] == entry.Id[0]) ?? [];
    }

    private static bool Has(ISymbol member, string name) => name switch
    {
        "this" => !member.IsStatic,
        "return" => member is IMethodSymbol { ReturnsVoid: false } or IPropertySymbol or IFieldSymbol,
        _ => (member as IMethodSymbol)?.Parameters.Any(p => p.Name == name)
            ?? (member as IPropertySymbol)?.Parameters.Any(p => p.Name == name) ?? false,
    };

    private static IEnumerable<INamedTypeSymbol> Types(INamespaceOrTypeSymbol container)
    {
        foreach (var member in container.GetMembers())
        {
            if (member is INamedTypeSymbol type)
                yield return type;
            if (member is INamespaceOrTypeSymbol inner)
            {
                foreach (var deeper in Types(inner))
                    yield return deeper;
            }
        }
    }
}
