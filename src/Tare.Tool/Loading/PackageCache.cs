using System.Xml.Linq;

namespace Tare.Tool.Loading;

/// <summary>Finds the assemblies of packages that are already on this machine; nothing is downloaded.</summary>
internal static class PackageCache
{
    /// <summary>Where NuGet keeps the packages of this user.</summary>
    public static string Folder { get; } = Environment.GetEnvironmentVariable("NUGET_PACKAGES")
        ?? Path.Combine(Environment.GetFolderPath(Environment.SpecialFolder.UserProfile), ".nuget", "packages");

    /// <summary>Paths of the assemblies of the packages and of what they depend on; a package that is not here is left out, and its uses do not bind.</summary>
    public static IReadOnlyList<string> Resolve(IEnumerable<(string Id, string? Version)> packages, string cache)
    {
        var found = new Dictionary<string, string>(StringComparer.OrdinalIgnoreCase);
        var open = new Queue<(string Id, string? Version)>(packages);
        var seen = new HashSet<string>(StringComparer.OrdinalIgnoreCase);
        while (open.TryDequeue(out var package))
        {
            if (!seen.Add(package.Id) || FolderOf(cache, package.Id, package.Version) is not { } folder)
            {
                continue;
            }

            foreach (var assembly in AssembliesIn(folder))
            {
                found.TryAdd(Path.GetFileName(assembly), assembly);
            }

            foreach (var dependency in DependenciesOf(folder, package.Id))
            {
                open.Enqueue(dependency);
            }
        }

        return [.. found.Values];
    }

    public static bool Holds(string id, string cache) => Directory.Exists(Path.Combine(cache, id.ToLowerInvariant()));

    private static string? FolderOf(string cache, string id, string? version)
    {
        var folder = Path.Combine(cache, id.ToLowerInvariant());
        if (!Directory.Exists(folder))
        {
            return null;
        }

        var versions = Directory.EnumerateDirectories(folder)
            .Select(path => (Path: path, Version: NumberOf(Path.GetFileName(path))))
            .OrderBy(entry => entry.Version)
            .ToArray();
        if (versions.Length == 0)
        {
            return null;
        }

        // As a restore does: the lowest version that is not below the one asked for.
        var least = version == null || version.Contains('*', StringComparison.Ordinal) ? null : NumberOf(version);
        var match = least == null ? versions[^1] : versions.FirstOrDefault(entry => entry.Version >= least);
        return match.Path;
    }

    private static IEnumerable<string> AssembliesIn(string folder)
    {
        var library = Path.Combine(folder, "lib");
        if (!Directory.Exists(library))
        {
            return [];
        }

        var target = Directory.EnumerateDirectories(library).Select(Path.GetFileName).OfType<string>()
            .Where(name => RankOf(name) >= 0).MaxBy(RankOf);
        return target == null ? [] : Directory.EnumerateFiles(Path.Combine(library, target), "*.dll");
    }

    private static IEnumerable<(string Id, string? Version)> DependenciesOf(string folder, string id)
    {
        var file = Path.Combine(folder, id.ToLowerInvariant() + ".nuspec");
        if (!File.Exists(file))
        {
            return [];
        }

        var dependencies = XDocument.Load(file).Descendants().FirstOrDefault(element => element.Name.LocalName == "dependencies");
        if (dependencies == null)
        {
            return [];
        }

        var groups = dependencies.Elements().Where(element => element.Name.LocalName == "group").ToArray();
        var chosen = groups.Length == 0
            ? dependencies
            : groups.Where(group => RankOf(ShortName((string?)group.Attribute("targetFramework") ?? "")) >= 0)
                .MaxBy(group => RankOf(ShortName((string?)group.Attribute("targetFramework") ?? "")));
        return chosen?.Elements().Where(element => element.Name.LocalName == "dependency")
            .Select(element => ((string)element.Attribute("id")!, (string?)element.Attribute("version"))) ?? [];
    }

    /// <summary>How well a target serves the running .NET: the newest modern target that is not above it, then .NET Standard; -1 for others.</summary>
    private static int RankOf(string target)
    {
        if (target.Length == 0)
        {
            return 0;
        }

        if (target.StartsWith("netstandard", StringComparison.OrdinalIgnoreCase))
        {
            return Version.TryParse(target["netstandard".Length..], out var standard) ? (standard.Major * 10) + standard.Minor : -1;
        }

        if (target.StartsWith("netcoreapp", StringComparison.OrdinalIgnoreCase))
        {
            return Version.TryParse(target["netcoreapp".Length..], out var core) ? 100 + (core.Major * 10) + core.Minor : -1;
        }

        return target.StartsWith("net", StringComparison.OrdinalIgnoreCase) && Version.TryParse(target["net".Length..], out var modern)
            && modern.Major >= 5 && modern.Major <= Environment.Version.Major
                ? 200 + (modern.Major * 10) + modern.Minor
                : -1;
    }

    private static string ShortName(string target) => target
        .Replace(".NETStandard", "netstandard", StringComparison.OrdinalIgnoreCase)
        .Replace(".NETCoreApp", "netcoreapp", StringComparison.OrdinalIgnoreCase);

    private static Version NumberOf(string text)
    {
        var number = new string([.. text.Trim('[', ']', '(', ')').TakeWhile(c => char.IsAsciiDigit(c) || c == '.')]).TrimEnd('.');
        return Version.TryParse(number.Contains('.', StringComparison.Ordinal) ? number : number + ".0", out var version) ? version : new Version(0, 0);
    }
}
