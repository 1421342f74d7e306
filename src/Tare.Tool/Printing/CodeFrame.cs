using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using Microsoft.CodeAnalysis.Text;
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
            foreach (var row in RowsOf(line))
            {
                WriteRow(source, text.Lines[line.Key].Start, row, gutter, tone);
            }

            last = line.Key;
        }
    }

    private void WriteLine(string source, string number, int gutter) =>
        output.WriteLine(ink.Paint($"{number.PadLeft(gutter)} {_glyphs.Bar}", Tone.Muted) + Separated(DisplayWidth.Expand(source).TrimEnd()));

    /// <summary>
    /// The rows under a line: marks of one stretch share a row and join their labels; stretches behind one another that say the same
    /// (the features and the labels of the test rows) share one too.
    /// </summary>
    private static List<List<Underline>> RowsOf(IEnumerable<Mark> marks)
    {
        var rows = new List<List<Underline>>();
        foreach (var spot in marks.GroupBy(mark => mark.Place.Span))
        {
            var label = string.Join(", ", spot.Select(mark => mark.Place.Label).Where(label => label.Length > 0).Distinct());
            var underline = new Underline(spot.Key, spot.Any(mark => mark.IsOwn), label);
            if (!underline.IsOwn && rows.LastOrDefault() is [.., { IsOwn: false } before] row && before.Label == label && before.Span.End < underline.Span.Start)
            {
                row.Add(underline);
            }
            else
            {
                rows.Add([underline]);
            }
        }

        return rows;
    }

    private void WriteRow(string source, int lineStart, List<Underline> underlines, int gutter, Tone tone)
    {
        var row = new StringBuilder();
        var cell = 0;
        var length = source.TrimEnd().Length;
        foreach (var underline in underlines)
        {
            var start = Math.Min(underline.Span.Start - lineStart, source.Length);

            // A stretch over several lines is underlined on its first.
            var end = Math.Clamp(underline.Span.End - lineStart, start, Math.Max(start, length));
            var before = DisplayWidth.Of(source.AsSpan(0, start));
            var width = Math.Max(1, DisplayWidth.Of(source.AsSpan(start, end - start), before));
            row.Append(' ', before - cell).Append(underline.IsOwn ? '^' : _glyphs.Line, width);
            cell = before + width;
        }

        var marks = row.ToString().TrimStart();
        var label = underlines[0].Label.Length > 0 ? " " + underlines[0].Label : "";
        output.WriteLine(ink.Paint($"{new string(' ', gutter)} {_glyphs.Bar}", Tone.Muted)
            + new string(' ', 1 + row.Length - marks.Length)
            + ink.Paint(marks + label, underlines[0].IsOwn ? tone : Tone.Path));
    }

    private static string Separated(string source) => source.Length == 0 ? "" : " " + source;

    private static string Number(int line) => (line + 1).ToString(CultureInfo.InvariantCulture);

    private sealed record Mark(Place Place, bool IsOwn);

    private sealed record Underline(TextSpan Span, bool IsOwn, string Label);
}
