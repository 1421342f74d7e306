using System.Collections.Concurrent;
using System.Collections.Immutable;
using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>The reference assemblies of a choice of libraries, read once.</summary>
internal static class LibraryReferences
{
    // Written at build time by tests/AnalyzerTests.targets.
    private static readonly string[] Paths = File.ReadAllLines(Path.Combine(AppContext.BaseDirectory, "references.txt"));
    private static readonly ConcurrentDictionary<string, MetadataReference> Read = new();
    private static readonly ConcurrentDictionary<Libraries, ImmutableArray<MetadataReference>> Choices = new();

    /// <summary>The base library and the chosen ones.</summary>
    public static ImmutableArray<MetadataReference> Of(Libraries libraries) => Choices.GetOrAdd(libraries, chosen =>
        [.. Paths.Where(p => IsPartOf(p, chosen)).Select(p => Read.GetOrAdd(p, static path => MetadataReference.CreateFromFile(path)))]);

    private static bool IsPartOf(string path, Libraries chosen)
    {
        string name = Path.GetFileNameWithoutExtension(path);
        if (path.Replace('\\', '/').Contains("/Microsoft.NETCore.App.Ref/", StringComparison.OrdinalIgnoreCase))
            return true;
        return name switch
        {
            "Tare" or "Tare.MicrosoftML" => chosen.HasFlag(Libraries.Tare),
            "Microsoft.Data.Analysis" => chosen.HasFlag(Libraries.DataFrames),
            "MathNet.Numerics" => chosen.HasFlag(Libraries.MathNet),
            "TorchSharp" => chosen.HasFlag(Libraries.TorchSharp),
            _ when name.StartsWith("Microsoft.ML", StringComparison.Ordinal) => (chosen & (Libraries.MicrosoftML | Libraries.DataFrames)) != 0,
            _ when name.StartsWith("Microsoft.Extensions.", StringComparison.Ordinal) => chosen.HasFlag(Libraries.Extensions),
            _ when name.StartsWith("xunit.", StringComparison.Ordinal) => chosen.HasFlag(Libraries.Xunit),
            // The compiler under test is no part of a test program.
            _ => false,
        };
    }
}
