namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>The folder of labelled programs that the environment variable TARE_CASES names.</summary>
internal static class Cases
{
    public const string Variable = "TARE_CASES";

    /// <summary>The folder; empty when the variable is not set.</summary>
    public static string Folder { get; } = Environment.GetEnvironmentVariable(Variable) ?? "";

    public static bool Exist => Folder.Length > 0;

    /// <summary>Why tests over the folder do not run; null when they do.</summary>
    public static string? SkipReason => Exist ? null : $"{Variable} names no folder of labelled programs.";

    /// <summary>All programs below the folder, or below one part of it, by their path in it.</summary>
    public static string[] Files(string part = "")
    {
        string folder = Path.Combine(Folder, part);
        if (!Directory.Exists(folder))
            throw new DirectoryNotFoundException($"{Variable} points at a folder without '{part}': {Folder}");
        return [.. Directory.EnumerateFiles(folder, "*.cs", SearchOption.AllDirectories)
            .Select(f => Path.GetRelativePath(Folder, f).Replace('\\', '/'))
            .Order(StringComparer.Ordinal)];
    }

    public static string Read(string file) => File.ReadAllText(Path.Combine(Folder, file));

    /// <summary>The program of a file, whose findings and labels carry the path below the folder.</summary>
    public static TestProgram Program(string file) => new(Read(file));
}
