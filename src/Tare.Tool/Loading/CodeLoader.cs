namespace Tare.Tool.Loading;

/// <summary>Decides what a path means and loads it.</summary>
internal static class CodeLoader
{
    private static readonly string[] SolutionEndings = [".sln", ".slnx", ".slnf"];
    private static readonly string[] SkippedFolders = ["bin", "obj", "node_modules"];

    // A folder that may not be read is passed over, as a build would; hidden files are files.
    private static readonly EnumerationOptions Readable = new() { IgnoreInaccessible = true, AttributesToSkip = 0 };

    /// <exception cref="ToolException">There is nothing at the path, or it does not load.</exception>
    public static async Task<LoadedCode> LoadAsync(string path, string workingDirectory, Action<string> progress, CancellationToken cancel)
    {
        var full = Path.GetFullPath(path, workingDirectory);
        if (File.Exists(full))
        {
            return await LoadFileAsync(path, full, workingDirectory, progress, cancel);
        }

        if (!Directory.Exists(full))
        {
            throw new ToolException($"there is nothing at '{path}'; name a C# file, a project, a solution or a folder.");
        }

        return await LoadFolderAsync(path, Path.TrimEndingDirectorySeparator(full), workingDirectory, progress, cancel);
    }

    private static async Task<LoadedCode> LoadFileAsync(string path, string full, string workingDirectory, Action<string> progress, CancellationToken cancel)
    {
        var root = Path.GetDirectoryName(full)!;
        if (IsSolution(full))
        {
            return await ProjectLoader.LoadSolutionAsync(full, root, workingDirectory, progress, cancel);
        }

        if (IsProject(full))
        {
            return await ProjectLoader.LoadProjectsAsync([full], root, null, workingDirectory, progress, cancel);
        }

        if (!IsSource(full))
        {
            throw new ToolException($"'{path}' is neither a C# file (.cs) nor a C# project (.csproj) nor a solution (.sln, .slnx, .slnf).");
        }

        return OwnerOf(full) is { } project && await ProjectLoader.TryLoadFileAsync(full, project, root, workingDirectory, progress, cancel) is { } code
            ? code
            : LooseLoader.Load([full], root, full, cancel);
    }

    private static async Task<LoadedCode> LoadFolderAsync(string path, string full, string workingDirectory, Action<string> progress, CancellationToken cancel)
    {
        var solutions = Directory.EnumerateFiles(full, "*", Readable).Where(IsSolution).Order(StringComparer.Ordinal).ToArray();
        if (solutions.Length > 1)
        {
            throw new ToolException($"'{path}' holds several solutions ({string.Join(", ", solutions.Select(Path.GetFileName))}); name one.");
        }

        if (solutions.Length == 1)
        {
            return await ProjectLoader.LoadSolutionAsync(solutions[0], full, workingDirectory, progress, cancel);
        }

        var files = FilesUnder(full).ToArray();
        var projects = files.Where(IsProject).ToArray();
        if (projects.Length > 0)
        {
            return await ProjectLoader.LoadProjectsAsync(projects, full, null, workingDirectory, progress, cancel);
        }

        var sources = files.Where(IsSource).ToArray();
        return sources.Length > 0
            ? LooseLoader.Load(sources, full, null, cancel)
            : throw new ToolException($"'{path}' holds no C# file, project or solution.");
    }

    /// <summary>The project that would compile a file: the only one in the nearest folder above it that has any.</summary>
    private static string? OwnerOf(string file)
    {
        for (var folder = Path.GetDirectoryName(file); folder != null; folder = Path.GetDirectoryName(folder))
        {
            var projects = Directory.EnumerateFiles(folder, "*.csproj", Readable).Take(2).ToArray();
            if (projects.Length > 0)
            {
                return projects.Length == 1 ? projects[0] : null;
            }

            if (Directory.EnumerateFiles(folder, "*", Readable).Any(IsSolution) || Path.Exists(Path.Combine(folder, ".git")))
            {
                return null;
            }
        }

        return null;
    }

    private static IEnumerable<string> FilesUnder(string folder)
    {
        foreach (var file in Directory.EnumerateFiles(folder, "*", Readable).Order(StringComparer.Ordinal))
        {
            yield return file;
        }

        foreach (var child in Directory.EnumerateDirectories(folder, "*", Readable).Order(StringComparer.Ordinal))
        {
            var name = Path.GetFileName(child);
            var isLink = (File.GetAttributes(child) & FileAttributes.ReparsePoint) != 0;
            if (name.StartsWith('.') || isLink || SkippedFolders.Contains(name, StringComparer.OrdinalIgnoreCase))
            {
                continue;
            }

            foreach (var file in FilesUnder(child))
            {
                yield return file;
            }
        }
    }

    private static bool IsSolution(string path) => SolutionEndings.Contains(Path.GetExtension(path), StringComparer.OrdinalIgnoreCase);

    private static bool IsProject(string path) => Path.GetExtension(path).Equals(".csproj", StringComparison.OrdinalIgnoreCase);

    private static bool IsSource(string path) => Path.GetExtension(path).Equals(".cs", StringComparison.OrdinalIgnoreCase);
}
