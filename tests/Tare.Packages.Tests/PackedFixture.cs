using System.Globalization;
using System.IO.Compression;
using System.Xml.Linq;

namespace Tare.Packages.Tests;

/// <summary>Packs a copy of the sources, so that no build of the repository is disturbed or reused.</summary>
public sealed class PackedFixture : IAsyncLifetime
{
    private static readonly string[] Packed = ["Tare.Analyzers", "Tare", "Tare.MicrosoftML"];
    private readonly string _folder = Directory.CreateTempSubdirectory("tare-packages-").FullName;

    /// <summary>A version no earlier run has had: a package cache never holds it.</summary>
    public string Version { get; } = "0.1.0-run" + DateTime.UtcNow.ToString("yyyyMMddHHmmssfff", CultureInfo.InvariantCulture);

    /// <summary>The folder that serves the packages.</summary>
    public string Feed => Path.Combine(_folder, "feed");

    public async Task InitializeAsync()
    {
        string copy = Path.Combine(_folder, "copy");
        string root = FindRoot();
        foreach (string file in new[] { "Directory.Packages.props", ".editorconfig", "README.md", "LICENSE" })
        {
            Directory.CreateDirectory(copy);
            File.Copy(Path.Combine(root, file), Path.Combine(copy, file));
        }

        CopySources(Path.Combine(root, "src"), Path.Combine(copy, "src"));
        foreach (string package in Packed)
        {
            var packed = await Dotnet.RunAsync(copy, null, "pack", $"src/{package}", "-o", Feed, $"-p:Version={Version}", "-v:q", "-nologo");
            packed.AssertSucceeded();
        }
    }

    public Task DisposeAsync()
    {
        Directory.Delete(_folder, recursive: true);
        return Task.CompletedTask;
    }

    /// <summary>The entries of a package that its author chose, in order.</summary>
    internal string[] Entries(string package)
    {
        using var archive = ZipFile.OpenRead(Path.Combine(Feed, $"{package}.{Version}.nupkg"));
        return [.. archive.Entries.Select(e => e.FullName)
            .Where(e => !e.StartsWith("_rels/", StringComparison.Ordinal) && !e.StartsWith("package/", StringComparison.Ordinal) && e != "[Content_Types].xml")
            .Order(StringComparer.Ordinal)];
    }

    /// <summary>The package's own description of itself.</summary>
    internal XElement Metadata(string package)
    {
        using var archive = ZipFile.OpenRead(Path.Combine(Feed, $"{package}.{Version}.nupkg"));
        using var nuspec = archive.GetEntry(package + ".nuspec")!.Open();
        return XDocument.Load(nuspec).Root!.Elements().Single();
    }

    /// <summary>A new project folder outside the repository that finds the packages.</summary>
    internal FreshProject NewProject(string targets, string package) => new(this, targets, package);

    private static void CopySources(string from, string to)
    {
        Directory.CreateDirectory(to);
        foreach (string file in Directory.EnumerateFiles(from))
            File.Copy(file, Path.Combine(to, Path.GetFileName(file)));
        foreach (string folder in Directory.EnumerateDirectories(from))
        {
            if (Path.GetFileName(folder) is not ("bin" or "obj"))
                CopySources(folder, Path.Combine(to, Path.GetFileName(folder)));
        }
    }

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
