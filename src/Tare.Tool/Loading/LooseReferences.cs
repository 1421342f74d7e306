using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.Tool.Loading;

/// <summary>What files without a project are compiled against: the running base library, Tare beside the tool, and packages the files name.</summary>
internal static class LooseReferences
{
    private static readonly Lazy<ImmutableArray<MetadataReference>> BaseLibrary = new(() =>
    {
        // The list of trusted assemblies holds this tool's own too; those of the user's code are the runtime's.
        var runtime = Path.GetDirectoryName(typeof(object).Assembly.Location)!;
        var trusted = ((string?)AppContext.GetData("TRUSTED_PLATFORM_ASSEMBLIES") ?? "").Split(Path.PathSeparator, StringSplitOptions.RemoveEmptyEntries);
        return
        [
            .. trusted.Where(path => string.Equals(Path.GetDirectoryName(path), runtime, StringComparison.OrdinalIgnoreCase))
                .Concat(new[] { "Tare.dll", "Tare.MicrosoftML.dll" }.Select(name => Path.Combine(AppContext.BaseDirectory, name)).Where(File.Exists))
                .Select(path => (MetadataReference)MetadataReference.CreateFromFile(path)),
        ];
    });

    public static IEnumerable<MetadataReference> For(IEnumerable<CompilationUnitSyntax> files)
    {
        var packages = files.SelectMany(PackagesNamedIn).ToArray();
        return packages.Length == 0
            ? BaseLibrary.Value
            : BaseLibrary.Value.Concat(PackageCache.Resolve(packages, PackageCache.Folder).Select(path => MetadataReference.CreateFromFile(path)));
    }

    /// <summary>The `#:package Id@Version` lines at the head of a file-based program.</summary>
    private static IEnumerable<(string Id, string? Version)> PackagesNamedIn(CompilationUnitSyntax root)
    {
        const string Directive = "#:package ";
        foreach (var trivia in root.GetLeadingTrivia().Where(trivia => trivia.IsKind(SyntaxKind.IgnoredDirectiveTrivia)))
        {
            var text = trivia.ToString().Trim();
            if (text.StartsWith(Directive, StringComparison.Ordinal))
            {
                var parts = text[Directive.Length..].Split('@', 2, StringSplitOptions.TrimEntries);
                yield return (parts[0], parts.Length > 1 ? parts[1] : null);
            }
        }
    }
}
