using System.Globalization;
using System.Text;

namespace Tare.Tool.Mending;

/// <summary>
/// Writes a change in the unified format, as `git apply` and `patch` read it. Format: GNU diffutils manual, "Detailed Description of Unified Format".
/// </summary>
internal static class UnifiedDiff
{
    private const int Context = 3;

    /// <param name="path">Relative, with forward slashes.</param>
    /// <param name="before">Null when the file is new.</param>
    /// <returns>Lines that end with \n; the lines of the file keep a \r of their own. Empty when nothing differs.</returns>
    public static string Of(string path, string? before, string after)
    {
        if (before == after)
        {
            return "";
        }

        var a = LinesOf(before ?? "");
        var b = LinesOf(after);
        var (removed, added) = LineDiff.Compare(a, b);
        var script = Script(a, b, removed, added);
        var diff = new StringBuilder();
        diff.Append("--- ").Append(before == null ? "/dev/null" : Quoted("a/" + path)).Append('\n');
        diff.Append("+++ ").Append(Quoted("b/" + path)).Append('\n');
        foreach (var (from, to) in Hunks(script))
        {
            AppendHunk(diff, script, from, to);
        }

        return diff.ToString();
    }

    /// <summary>The lines, each with its ending; the last may have none.</summary>
    private static List<string> LinesOf(string text)
    {
        var lines = new List<string>();
        var start = 0;
        while (start < text.Length)
        {
            var end = text.IndexOf('\n', start);
            end = end < 0 ? text.Length : end + 1;
            lines.Add(text[start..end]);
            start = end;
        }

        return lines;
    }

    private static List<Edit> Script(List<string> a, List<string> b, bool[] removed, bool[] added)
    {
        var script = new List<Edit>();
        var (i, j) = (0, 0);
        while (i < a.Count || j < b.Count)
        {
            if (i < a.Count && removed[i])
            {
                script.Add(new Edit('-', a[i], i++, j));
            }
            else if (j < b.Count && added[j])
            {
                script.Add(new Edit('+', b[j], i, j++));
            }
            else
            {
                script.Add(new Edit(' ', a[i], i++, j++));
            }
        }

        return script;
    }

    /// <summary>Ranges of the script: each edit with its context, joined where the contexts meet.</summary>
    private static IEnumerable<(int From, int To)> Hunks(List<Edit> script)
    {
        (int From, int To)? open = null;
        for (var i = 0; i < script.Count; i++)
        {
            if (script[i].Kind == ' ')
            {
                continue;
            }

            var (from, to) = (Math.Max(0, i - Context), Math.Min(script.Count, i + 1 + Context));
            if (open is { } hunk && from <= hunk.To)
            {
                open = (hunk.From, to);
                continue;
            }

            if (open != null)
            {
                yield return open.Value;
            }

            open = (from, to);
        }

        if (open != null)
        {
            yield return open.Value;
        }
    }

    private static void AppendHunk(StringBuilder diff, List<Edit> script, int from, int to)
    {
        var edits = script.GetRange(from, to - from);
        diff.Append("@@ -").Append(Range(edits[0].LineA, edits.Count(edit => edit.Kind != '+')))
            .Append(" +").Append(Range(edits[0].LineB, edits.Count(edit => edit.Kind != '-'))).Append(" @@\n");
        foreach (var edit in edits)
        {
            diff.Append(edit.Kind).Append(edit.Line);
            if (!edit.Line.EndsWith('\n'))
            {
                diff.Append("\n\\ No newline at end of file\n");
            }
        }
    }

    // A range of no lines names the line before it; a range of one leaves the count out.
    private static string Range(int first, int count) => string.Create(
        CultureInfo.InvariantCulture, $"{(count == 0 ? first : first + 1)}{(count == 1 ? "" : "," + count.ToString(CultureInfo.InvariantCulture))}");

    // A name with a quote, a backslash or a control character is quoted as git does.
    private static string Quoted(string path) => path.Any(c => c is '"' or '\\' || char.IsControl(c))
        ? "\"" + path.Replace("\\", "\\\\").Replace("\"", "\\\"").Replace("\t", "\\t").Replace("\n", "\\n") + "\""
        : path;

    /// <param name="Kind">' ', '-' or '+'.</param>
    /// <param name="LineA">Lines of the old file before this one.</param>
    /// <param name="LineB">Lines of the new file before this one.</param>
    private readonly record struct Edit(char Kind, string Line, int LineA, int LineB);
}
