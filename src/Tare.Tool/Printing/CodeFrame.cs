using System.Collections.Immutable;
using System.Globalization;
using Tare.Tool.Analysis;

namespace Tare.Tool.Printing;

/// <summary>Shows the places of a finding in their source: numbered lines, underlined, each mark with its label.</summary>
internal sealed class CodeFrame(TextWriter output, Ink ink, Func<string, string> displayPath)
{
    private readonly Glyphs _glyphs = Glyphs.For(output.Encoding);

    /// <param name="places">The finding's own place first.</param>
    /// <param name="tone">Of the finding's own mark.</param>
    public void Write(ImmutableArray<Place> places, Tone tone)
    {
        var files = places.Select((place, i) => new Mark(place, i == 0)).GroupBy(mark => mark.Place.Path).ToArray();
        var gutter = places.Max(place => Number(place.Lines.Start.Line).Length) + 2;
        foreach (var file in files)
        {
            if (files.Length > 1)
            {
                output.WriteLine($"{new string(' ', gutter)} {ink.Paint(_glyphs.File, Tone.Muted)} {ink.Paint(displayPath(file.Key), Tone.Path)}");
            }

            WriteFile([.. file.OrderBy(mark => mark.Place.Span.Start).ThenByDescending(mark => mark.Place.Span.End)], gutter, tone);
        }
    }

    private void WriteFile(ImmutableArray<Mark> marks, int gutter, Tone tone)
    {
        var text = marks[0].Place.Text;
        var last = -1;
        foreach (var line in marks.GroupBy(mark => mark.Place.Lines.Start.Line))
        {
            // One line between is shown; more are left out.
            if (last >= 0 && line.Key == last + 2)
            {
                WriteLine(text.Lines[line.Key - 1].ToString(), Number(line.Key - 1), gutter);
            }
            else if (last >= 0 && line.Key > last + 2)
            {
                output.WriteLine(ink.Paint($"{_glyphs.Gap.PadLeft(gutter)} {_glyphs.Bar}", Tone.Muted));
            }

            var source = text.Lines[line.Key].ToString();
            WriteLine(source, Number(line.Key), gutter);
            foreach (var spot in line.GroupBy(mark => mark.Place.Span))
            {
                WriteMark(source, text.Lines[line.Key].Start, [.. spot], gutter, tone);
            }

            last = line.Key;
        }
    }

    private void WriteLine(string source, string number, int gutter) =>
        output.WriteLine(ink.Paint($"{number.PadLeft(gutter)} {_glyphs.Bar}", Tone.Muted) + Separated(DisplayWidth.Expand(source).TrimEnd()));

    private void WriteMark(string source, int lineStart, ImmutableArray<Mark> marks, int gutter, Tone tone)
    {
        var span = marks[0].Place.Span;
        var start = Math.Min(span.Start - lineStart, source.Length);

        // A stretch over several lines is underlined on its first.
        var end = Math.Clamp(span.End - lineStart, start, source.TrimEnd().Length < start ? source.Length : source.TrimEnd().Length);
        var before = DisplayWidth.Of(source.AsSpan(0, start));
        var width = Math.Max(1, DisplayWidth.Of(source.AsSpan(start, end - start), before));
        var own = marks.Any(mark => mark.IsOwn);
        var labels = string.Join(", ", marks.Select(mark => mark.Place.Label).Where(label => label.Length > 0).Distinct());
        var underline = new string(own ? '^' : _glyphs.Line, width);
        var mark = ink.Paint(labels.Length > 0 ? $"{underline} {labels}" : underline, own ? tone : Tone.Path);
        output.WriteLine($"{ink.Paint($"{new string(' ', gutter)} {_glyphs.Bar}", Tone.Muted)} {new string(' ', before)}{mark}");
    }

    private static string Separated(string source) => source.Length == 0 ? "" : " " + source;

    private static string Number(int line) => (line + 1).ToString(CultureInfo.InvariantCulture);

    private sealed record Mark(Place Place, bool IsOwn);
}
