using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.Tool.Loading;

/// <summary>What files without a project are compiled against: the running base library, and packages of this machine that the files name.</summary>
internal static class LooseReferences
{
    private static readonly Lazy<ImmutableDictionary<string, MetadataReference>> BaseLibrary = new(() =>
    {
        // The list of trusted assemblies holds this tool's own too; those of the user's code are the runtime's.
        var runtime = Path.GetDirectoryName(typeof(object).Assembly.Location)!;
        var trusted = ((string?)AppContext.GetData("TRUSTED_PLATFORM_ASSEMBLIES") ?? "").Split(Path.PathSeparator, StringSplitOptions.RemoveEmptyEntries);
        return trusted
            .Where(path => string.Equals(Path.GetDirectoryName(path), runtime, StringComparison.OrdinalIgnoreCase))
            .DistinctBy(path => Path.GetFileName(path), StringComparer.OrdinalIgnoreCase)
            .ToImmutableDictionary(path => Path.GetFileName(path), path => (MetadataReference)MetadataReference.CreateFromFile(path), StringComparer.OrdinalIgnoreCase);
    });

    public static IEnumerable<MetadataReference> For(IReadOnlyCollection<CompilationUnitSyntax> files)
    {
        var named = files.SelectMany(PackagesNamedIn).ToArray();
        var namespaces = files
            .SelectMany(file => file.DescendantNodes(node => node is CompilationUnitSyntax or BaseNamespaceDeclarationSyntax).OfType<UsingDirectiveSyntax>())
            .Select(directive => directive.NamespaceOrType.ToString())
            .ToArray();

        // A file that names its packages has said what it needs; for others the namespaces tell.
        var packages = named.Length > 0 ? named : namespaces.SelectMany(PackagesOf).Distinct().ToArray();
        var paths = PackageCache.Resolve(packages, PackageCache.Folder).ToList();
        if (namespaces.Any(name => name == "Tare" || name.StartsWith("Tare.", StringComparison.Ordinal)) && !paths.Any(path => Path.GetFileName(path) == "Tare.dll"))
        {
            // Only where it is used: a fix writes other code where the library is missing.
            paths.AddRange(new[] { Path.Combine(AppContext.BaseDirectory, "Tare.dll") }.Where(File.Exists));
        }

        return BaseLibrary.Value.Values.Concat(paths
            .Where(path => !BaseLibrary.Value.ContainsKey(Path.GetFileName(path)))
            .Select(path => MetadataReference.CreateFromFile(path)));
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

    /// <summary>The package whose id is the longest beginning of a namespace, as most libraries name theirs.</summary>
    private static IEnumerable<(string Id, string? Version)> PackagesOf(string name)
    {
        if (name == "System" || name.StartsWith("System.", StringComparison.Ordinal))
        {
            yield break;
        }

        for (var id = name; id.Length > 0; id = id.Contains('.', StringComparison.Ordinal) ? id[..id.LastIndexOf('.')] : "")
        {
            if (PackageCache.Holds(id, PackageCache.Folder))
            {
                yield return (id, null);
                yield break;
            }
        }
    }
}
