namespace Tare.Benchmarks.Analyzers;

/// <summary>Real code: all C# files below a folder, whatever they need to compile.</summary>
internal static class SourceFolder
{
    public static SourceSet Read(string path) =>
        new(Path.GetFileName(Path.GetFullPath(path).TrimEnd(Path.DirectorySeparatorChar)),
            [.. Directory.EnumerateFiles(path, "*.cs", SearchOption.AllDirectories).Order(StringComparer.Ordinal).Select(File.ReadAllText)]);
}
