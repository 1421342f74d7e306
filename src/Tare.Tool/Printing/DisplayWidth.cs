using System.Globalization;
using System.Text;

namespace Tare.Tool.Printing;

/// <summary>How many cells of a terminal text takes.</summary>
internal static class DisplayWidth
{
    /// <summary>Cells from one tab stop to the next.</summary>
    public const int Tab = 4;

    // Blocks that Unicode Standard Annex 11 calls wide, and emoji: first and last scalar value.
    private static readonly (int First, int Last)[] Wide =
    [
        (0x1100, 0x115F), (0x2E80, 0x303E), (0x3041, 0x33FF), (0x3400, 0x4DBF), (0x4E00, 0x9FFF), (0xA000, 0xA4CF), (0xAC00, 0xD7A3),
        (0xF900, 0xFAFF), (0xFE30, 0xFE6F), (0xFF00, 0xFF60), (0xFFE0, 0xFFE6), (0x1F300, 0x1F64F), (0x1F680, 0x1F6FF), (0x1F900, 0x1F9FF), (0x20000, 0x3FFFD),
    ];

    /// <summary>Cells of <paramref name="text"/> when it starts in cell <paramref name="start"/> (a tab runs to the next stop).</summary>
    public static int Of(ReadOnlySpan<char> text, int start = 0)
    {
        var cell = start;
        foreach (var rune in text.EnumerateRunes())
        {
            cell += WidthOf(rune, cell);
        }

        return cell - start;
    }

    /// <summary>The text with tabs as blanks, and control characters, which would move the cursor, as one mark each.</summary>
    public static string Expand(string text)
    {
        var line = new StringBuilder(text.Length);
        var cell = 0;
        foreach (var rune in text.EnumerateRunes())
        {
            var width = WidthOf(rune, cell);
            line.Append(rune.Value == '\t' ? new string(' ', width) : Rune.IsControl(rune) ? "\u00b7" : rune.ToString());
            cell += width;
        }

        return line.ToString();
    }

    private static int WidthOf(Rune rune, int cell)
    {
        if (rune.Value == '\t')
        {
            return Tab - (cell % Tab);
        }

        if (Rune.GetUnicodeCategory(rune) is UnicodeCategory.NonSpacingMark or UnicodeCategory.EnclosingMark or UnicodeCategory.Format)
        {
            return 0;
        }

        return Wide.Any(block => rune.Value >= block.First && rune.Value <= block.Last) ? 2 : 1;
    }
}
