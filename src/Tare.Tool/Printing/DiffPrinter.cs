namespace Tare.Tool.Printing;

/// <summary>Writes a unified diff, byte for byte when it is redirected.</summary>
internal static class DiffPrinter
{
    public static void Write(TextWriter output, Ink ink, string diff)
    {
        var lines = diff.Split('\n');
        for (var i = 0; i < lines.Length - 1; i++)
        {
            // Never the platform's line ending: a \r more would be part of the line.
            output.Write(ink.Paint(lines[i], ToneOf(lines[i], i)));
            output.Write('\n');
        }
    }

    private static Tone ToneOf(string line, int index) => line switch
    {
        _ when index < 2 => Tone.Strong,
        ['@', ..] => Tone.Path,
        ['-', ..] => Tone.Removed,
        ['+', ..] => Tone.Added,
        _ => Tone.Plain,
    };
}
