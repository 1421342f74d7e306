namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>Finds files of the repository that the tests run in.</summary>
internal static class Repository
{
    /// <summary>The folder that holds Analyzers.sln.</summary>
    public static string Root { get; } = FindRoot();

    /// <summary>The path of a file or folder, from its parts below the root.</summary>
    public static string At(params string[] parts) => Path.Combine([Root, .. parts]);

    /// <summary>The path below the root, with forward slashes.</summary>
    public static string Relative(string path) => Path.GetRelativePath(Root, path).Replace('\\', '/');

    private static string FindRoot()
    {
        for (var folder = new DirectoryInfo(AppContext.BaseDirectory); folder is not null; folder = folder.Parent)
        {
            if (File.Exists(Path.Combine(folder.FullName, "Analyzers.sln")))
                return folder.FullName;
        }

        throw new InvalidOperationException("No folder above the tests holds Analyzers.sln.");
    }
}
