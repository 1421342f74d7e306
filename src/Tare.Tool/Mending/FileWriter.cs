using System.Text;

namespace Tare.Tool.Mending;

/// <summary>Writes changed files, all or none.</summary>
internal static class FileWriter
{
    /// <exception cref="ToolException">A file changed since it was read, or cannot be written; then none is changed.</exception>
    public static void WriteAll(IReadOnlyCollection<FileChange> changes)
    {
        var ready = new List<(string Temporary, string Target)>();
        try
        {
            foreach (var change in changes)
            {
                // A link stays a link; its target is what is edited.
                var target = (change.Before == null ? null : new FileInfo(change.Path).ResolveLinkTarget(returnFinalTarget: true)?.FullName) ?? change.Path;
                var bytes = BytesOf(change, target);
                Directory.CreateDirectory(Path.GetDirectoryName(target)!);
                var temporary = Path.Combine(Path.GetDirectoryName(target)!, $".{Path.GetFileName(target)}.{Guid.NewGuid():N}.tmp");
                ready.Add((temporary, target));
                File.WriteAllBytes(temporary, bytes);
                if (!OperatingSystem.IsWindows() && File.Exists(target))
                {
                    File.SetUnixFileMode(temporary, File.GetUnixFileMode(target));
                }
            }

            foreach (var (temporary, target) in ready)
            {
                File.Move(temporary, target, overwrite: true);
            }
        }
        catch (Exception problem) when (problem is IOException or UnauthorizedAccessException)
        {
            throw new ToolException($"the files cannot be written: {problem.Message}");
        }
        finally
        {
            foreach (var (temporary, _) in ready)
            {
                File.Delete(temporary);
            }
        }
    }

    private static byte[] BytesOf(FileChange change, string target)
    {
        var name = Path.GetFileName(change.Path);
        if (change.Before == null)
        {
            return !File.Exists(target) ? Encoding.UTF8.GetBytes(change.After) : throw new ToolException($"{name} exists already; nothing was written.");
        }

        var old = File.ReadAllBytes(target);
        var (mark, encoding) = MarkOf(old) is { } marked ? marked : ([], WithoutMark(change.Encoding));
        var text = encoding.GetString(old.AsSpan(mark.Length));
        if (text != change.Before)
        {
            throw new ToolException($"{name} changed while it was read; run the command again.");
        }

        // Bytes that are no text in this encoding would come back as question marks.
        if (!old.AsSpan(mark.Length).SequenceEqual(encoding.GetBytes(text)))
        {
            throw new ToolException($"{name} holds bytes that are no text; save it as UTF-8 first.");
        }

        var bytes = encoding.GetBytes(change.After);
        return encoding.GetString(bytes) == change.After
            ? [.. mark, .. bytes]
            : throw new ToolException($"the fix needs characters that the encoding of {name} lacks; save the file as UTF-8 first.");
    }

    private static (byte[] Mark, Encoding Encoding)? MarkOf(byte[] bytes)
    {
        // UTF-32 before UTF-16: the little-endian marks begin alike.
        foreach (var encoding in new Encoding[] { new UTF8Encoding(true), new UTF32Encoding(false, true), new UTF32Encoding(true, true), new UnicodeEncoding(false, true), new UnicodeEncoding(true, true) })
        {
            if (bytes.AsSpan().StartsWith(encoding.Preamble))
            {
                return (encoding.Preamble.ToArray(), encoding);
            }
        }

        return null;
    }

    private static Encoding WithoutMark(Encoding? encoding) => encoding is null or UTF8Encoding ? new UTF8Encoding(false) : encoding;
}
