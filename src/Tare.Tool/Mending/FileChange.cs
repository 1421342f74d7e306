namespace Tare.Tool.Mending;

/// <summary>A file before and after.</summary>
/// <param name="Path">Absolute path.</param>
/// <param name="Before">Null for a file that a fix adds.</param>
/// <param name="After">With the line endings and the end of file that the file had.</param>
/// <param name="Encoding">As it was read; null when unknown.</param>
internal sealed record FileChange(string Path, string? Before, string After, System.Text.Encoding? Encoding);
