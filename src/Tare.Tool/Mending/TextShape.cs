namespace Tare.Tool.Mending;

/// <summary>Keeps what an editor would keep: the line endings of a file and whether its last line is ended.</summary>
internal static class TextShape
{
    /// <summary>
    /// <paramref name="after"/> with the line endings of <paramref name="before"/>. A file that mixes them is left as the fix made it:
    /// the lines the fix did not touch keep theirs.
    /// </summary>
    public static string Keep(string before, string after)
    {
        var ending = EndingOf(before);
        if (ending != null)
        {
            after = after.ReplaceLineEndings("\n");
            after = ending == "\n" ? after : after.Replace("\n", ending, StringComparison.Ordinal);
        }

        var hadEnd = before.EndsWith('\n');
        if (hadEnd && !after.EndsWith('\n'))
        {
            return after + (ending ?? "\n");
        }

        return !hadEnd && before.Length > 0 ? after.TrimEnd('\r', '\n') : after;
    }

    /// <summary>The one ending that all lines have; null when there is none or more than one.</summary>
    private static string? EndingOf(string text)
    {
        var windows = 0;
        var unix = 0;
        for (var i = 0; i < text.Length; i++)
        {
            switch (text[i])
            {
                case '\n' when i > 0 && text[i - 1] == '\r':
                    windows++;
                    break;
                case '\n':
                    unix++;
                    break;
                case '\r' when i + 1 == text.Length || text[i + 1] != '\n':
                case '\f' or '\u0085' or '\u2028' or '\u2029':
                    // An ending that the replacement would flatten; the file is left alone.
                    return null;
            }
        }

        return (windows, unix) switch
        {
            ( > 0, 0) => "\r\n",
            (0, > 0) => "\n",
            _ => null,
        };
    }
}
