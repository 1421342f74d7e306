using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;

namespace Tare.Analyzers.Tests.Knowledge;

/// <summary>Compiles a text against the libraries that the catalogue speaks of.</summary>
internal static class KnowledgeCompilation
{
    private static readonly MetadataReference[] _references = References();

    public static CSharpCompilation Create(string source = "") => CSharpCompilation.Create(
        "Knowledge",
        [CSharpSyntaxTree.ParseText(source, new CSharpParseOptions(LanguageVersion.Latest))],
        _references,
        new CSharpCompilationOptions(OutputKind.DynamicallyLinkedLibrary));

    private static MetadataReference[] References()
    {
        // The build lists what it compiled this project against (tests/AnalyzerTests.targets).
        var list = File.ReadAllLines(Path.Combine(AppContext.BaseDirectory, "references.txt"));
        return [.. list.Where(File.Exists).Select(path => MetadataReference.CreateFromFile(path))];
    }
}
