namespace Tare.Benchmarks.Analyzers;

/// <summary>Files that are compiled together.</summary>
internal sealed record SourceSet(string Name, IReadOnlyList<string> Files);
