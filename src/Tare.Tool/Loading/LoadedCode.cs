using System.Collections.Immutable;
using Microsoft.CodeAnalysis;

namespace Tare.Tool.Loading;

/// <summary>Code that is ready to be analysed.</summary>
/// <param name="Workspace">Kept alive for as long as the solution is read.</param>
/// <param name="Root">Folder that was inspected, or that holds the inspected file.</param>
/// <param name="Projects">The projects to report on; others are only referenced. Several stand for one file when it has several targets.</param>
/// <param name="OnlyFile">Set when one file of a project was asked for.</param>
/// <param name="IsLoose">Whether the files belong to no project.</param>
internal sealed record LoadedCode(
    Workspace Workspace, string Root, ImmutableArray<ProjectId> Projects, string? OnlyFile, bool IsLoose) : IDisposable
{
    public Solution Solution => Workspace.CurrentSolution;

    /// <summary>Number of project files.</summary>
    public int ProjectCount => Projects.Select(id => Solution.GetProject(id)!).DistinctBy(project => project.FilePath ?? project.Name).Count();

    /// <summary>Number of files that somebody wrote.</summary>
    public int DocumentCount => Projects
        .SelectMany(id => Solution.GetProject(id)!.Documents)
        .Select(document => document.FilePath)
        .Where(path => path != null && !GeneratedCode.Is(path) && Covers(path))
        .Distinct(StringComparer.Ordinal)
        .Count();

    /// <summary>Whether findings at <paramref name="path"/> were asked for.</summary>
    public bool Covers(string? path) => OnlyFile == null || (path != null && string.Equals(path, OnlyFile, StringComparison.Ordinal));

    public void Dispose() => Workspace.Dispose();
}
