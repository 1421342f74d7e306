namespace Tare.Tool.Printing;

/// <summary>Paths as they are printed.</summary>
internal static class DisplayPath
{
    /// <summary>Relative to the folder the user stands in, so that a terminal can follow it.</summary>
    public static string From(string workingDirectory, string path) => Slashed(Path.GetRelativePath(workingDirectory, path));

    /// <summary>For a diff that is applied where the user stands, or, for code elsewhere, in the inspected folder.</summary>
    public static string ForDiff(string workingDirectory, string root, string path)
    {
        var here = From(workingDirectory, path);
        return here.StartsWith("../", StringComparison.Ordinal) || Path.IsPathRooted(here) ? From(root, path) : here;
    }

    private static string Slashed(string path) => Path.DirectorySeparatorChar == '\\' ? path.Replace('\\', '/') : path;
}
