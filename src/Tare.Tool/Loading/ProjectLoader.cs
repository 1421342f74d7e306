using System.Collections.Concurrent;
using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.MSBuild;
using Tare.Tool.Printing;

namespace Tare.Tool.Loading;

/// <summary>Loads projects and solutions the way the build reads them.</summary>
internal static class ProjectLoader
{
    public static Task<LoadedCode> LoadSolutionAsync(string solution, string root, string workingDirectory, Action<string> progress, CancellationToken cancel) =>
        LoadAsync(solution, root, null, workingDirectory, progress, async (workspace, report) =>
        {
            await workspace.OpenSolutionAsync(solution, report, cancel);
            return [.. workspace.CurrentSolution.Projects.Where(IsCSharp).Select(project => project.Id)];
        });

    public static Task<LoadedCode> LoadProjectsAsync(
        IReadOnlyList<string> projects, string root, string? onlyFile, string workingDirectory, Action<string> progress, CancellationToken cancel) =>
        LoadAsync(projects[0], root, onlyFile, workingDirectory, progress, async (workspace, report) =>
        {
            foreach (var path in projects)
            {
                // It may be here already, as a reference of one before it.
                if (!workspace.CurrentSolution.Projects.Any(project => project.FilePath == path))
                {
                    await workspace.OpenProjectAsync(path, report, cancel);
                }
            }

            // A project with several targets is several projects with one path.
            return [.. workspace.CurrentSolution.Projects.Where(project => IsCSharp(project) && projects.Contains(project.FilePath)).Select(project => project.Id)];
        });

    /// <summary>Loads the project of a file.</summary>
    /// <returns>Null when the project does not compile the file after all.</returns>
    public static async Task<LoadedCode?> TryLoadFileAsync(
        string file, string project, string root, string workingDirectory, Action<string> progress, CancellationToken cancel)
    {
        var code = await LoadProjectsAsync([project], root, file, workingDirectory, progress, cancel);
        if (code.DocumentCount > 0)
        {
            return code;
        }

        code.Dispose();
        return null;
    }

    private static async Task<LoadedCode> LoadAsync(
        string path,
        string root,
        string? onlyFile,
        string workingDirectory,
        Action<string> progress,
        Func<MSBuildWorkspace, IProgress<ProjectLoadProgress>, Task<ImmutableArray<ProjectId>>> open)
    {
        // As the user would type it, so that a command in a message can be copied.
        var name = DisplayPath.From(workingDirectory, path);
        var workspace = MSBuildWorkspace.Create();
        try
        {
            workspace.SkipUnrecognizedProjects = true;
            var failures = new ConcurrentQueue<string>();
            using var subscription = workspace.RegisterWorkspaceFailedHandler(failed =>
            {
                if (failed.Diagnostic.Kind == WorkspaceDiagnosticKind.Failure)
                {
                    failures.Enqueue(failed.Diagnostic.Message);
                }
            });
            ImmutableArray<ProjectId> projects;
            try
            {
                projects = await open(workspace, new LoadProgress(progress));
            }
            catch (Exception problem) when (problem is not (OperationCanceledException or ToolException))
            {
                throw new ToolException($"{name} does not load: {Sentence(problem.Message)}");
            }

            RequireLoaded(name, workingDirectory, workspace.CurrentSolution, projects, failures);
            var code = new LoadedCode(workspace, root, projects, onlyFile, IsLoose: false);
            return code.DocumentCount > 0 || onlyFile != null ? code : throw new ToolException($"{name} compiles no C# file.");
        }
        catch
        {
            workspace.Dispose();
            throw;
        }
    }

    private static void RequireLoaded(
        string name, string workingDirectory, Solution solution, ImmutableArray<ProjectId> projects, IReadOnlyCollection<string> failures)
    {
        // Other languages are left to their own tools.
        var failure = failures.FirstOrDefault(failure => !failure.Contains(".fsproj", StringComparison.Ordinal) && !failure.Contains(".vbproj", StringComparison.Ordinal));
        if (failure != null)
        {
            throw new ToolException($"{name} does not load: {Sentence(failure)}");
        }

        if (projects.Length == 0)
        {
            throw new ToolException($"{name} holds no C# project.");
        }

        foreach (var project in projects.Select(id => solution.GetProject(id)!))
        {
            if (!IsRestored(project))
            {
                var own = DisplayPath.From(workingDirectory, project.FilePath!);
                throw new ToolException($"{own} is not restored; run `dotnet restore {(projects.Length > 1 && name.EndsWith(".csproj", StringComparison.Ordinal) ? own : name)}` first.");
            }

            if (project.MetadataReferences.Count == 0)
            {
                throw new ToolException($"{project.Name} has no references, not even the base library; see that `dotnet build {name}` works.");
            }
        }
    }

    /// <summary>
    /// Whether packages were resolved. Without that a project loads with the base library alone, and code that uses a package would be passed over in silence.
    /// </summary>
    private static bool IsRestored(Project project)
    {
        // Only the SDK writes the file of resolved packages; it stands in a folder above the intermediate assembly.
        if (project.FilePath is not { } file || !File.ReadAllText(file).Contains("Sdk", StringComparison.Ordinal))
        {
            return true;
        }

        var folder = Path.GetDirectoryName(project.CompilationOutputInfo.AssemblyPath);
        for (var level = 0; level < 5 && folder != null; level++)
        {
            if (File.Exists(Path.Combine(folder, "project.assets.json")))
            {
                return true;
            }

            folder = Path.GetDirectoryName(folder);
        }

        return File.Exists(Path.Combine(Path.GetDirectoryName(file)!, "obj", "project.assets.json"));
    }

    private static bool IsCSharp(Project project) => project.Language == LanguageNames.CSharp;

    private static string Sentence(string message)
    {
        var line = string.Join(' ', message.Split('\n', '\r').Select(part => part.Trim()).Where(part => part.Length > 0));
        return line.EndsWith('.') ? line : line + ".";
    }

    /// <summary>Names the project that is being read.</summary>
    private sealed class LoadProgress(Action<string> progress) : IProgress<ProjectLoadProgress>
    {
        public void Report(ProjectLoadProgress value) => progress($"Loading {Path.GetFileName(value.FilePath)}");
    }
}
