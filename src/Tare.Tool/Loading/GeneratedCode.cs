namespace Tare.Tool.Loading;

/// <summary>Tells files that a tool wrote, by the names that the compiler goes by, and by the build's own folder.</summary>
internal static class GeneratedCode
{
    private static readonly string[] Endings = [".g.cs", ".g.i.cs", ".generated.cs", ".designer.cs"];

    public static bool Is(string path) =>
        Path.GetFileName(path).StartsWith("TemporaryGeneratedFile_", StringComparison.OrdinalIgnoreCase)
        || Endings.Any(ending => path.EndsWith(ending, StringComparison.OrdinalIgnoreCase))
        || path.Split('/', '\\').SkipLast(1).Contains("obj", StringComparer.OrdinalIgnoreCase);
}
