using Microsoft.CodeAnalysis.Text;
using Tare.Tool.Analysis;
using Tare.Tool.Printing;

namespace Tare.Tool.Tests;

public class CodeFrameTests
{
    [Fact]
    public void A_tab_takes_the_cells_to_its_stop_in_the_line_and_under_it() => Shows(
        "\tif (a\t> b)\n", "b", "here", """
          1 │     if (a   > b)
            │               ^ here
        """);

    [Fact]
    public void A_mark_stands_under_its_word_behind_wide_and_combining_characters() => Shows(
        "var 良い = \"e\u0301😀\"; bad();\n", "bad", "here", """
          1 │ var 良い = "é😀"; bad();
            │                   ^^^ here
        """.Replace("é", "e\u0301"));

    [Fact]
    public void A_wide_word_is_underlined_over_its_whole_width() => Shows(
        "良い = 1;\n", "良い", "", """
          1 │ 良い = 1;
            │ ^^^^
        """);

    [Fact]
    public void A_stretch_over_several_lines_is_underlined_on_its_first() => Shows(
        "foreach (var c in all)\n{\n}\n", "foreach (var c in all)\n{\n}", "candidates vary here", """
          1 │ foreach (var c in all)
            │ ^^^^^^^^^^^^^^^^^^^^^^ candidates vary here
        """);

    [Fact]
    public void A_carriage_return_is_no_part_of_the_line() => Shows(
        "a\r\n  bad\r\n", "bad", "here", """
          2 │   bad
            │   ^^^ here
        """);

    [Fact]
    public void An_empty_stretch_at_the_end_of_a_file_still_gets_a_mark()
    {
        var text = SourceText.From("abc");
        Assert.Equal("  1 │ abc\n    │    ^ end\n", Frame([new("a.cs", text, new TextSpan(3, 0), "end")]));
    }

    [Fact]
    public void Lines_between_are_shown_when_one_and_left_out_when_more()
    {
        var text = SourceText.From("one\n\nthree\nfour\nfive\nsix\n");

        Assert.Equal("""
              1 │ one
                │ ─── first
              2 │
              3 │ three
                │ ───── third
              … │
              6 │ six
                │ ^^^ sixth

            """, Frame([At(text, "six", "sixth"), At(text, "three", "third"), At(text, "one", "first")]));
    }

    [Fact]
    public void Marks_on_one_line_stand_one_under_the_other_and_equal_ones_share_a_row()
    {
        var text = SourceText.From("a > b\n");

        Assert.Equal("""
              1 │ a > b
                │ ^^^^^ chosen here
                │ ─ scored here
                │     ─ scored here, test rows come from here

            """, Frame([At(text, "a > b", "chosen here"), At(text, "a", "scored here"), At(text, "b", "scored here"), At(text, "b", "test rows come from here")]));
    }

    [Fact]
    public void Places_behind_one_another_that_say_the_same_share_a_row()
    {
        var text = SourceText.From("var (testX, testY) = Load();\n\tbad\n");

        Assert.Equal("""
              1 │ var (testX, testY) = Load();
                │      ─────  ───── test rows come from here
              2 │     bad
                │     ^^^ here

            """, Frame([At(text, "bad", "here"), At(text, "testX", "test rows come from here"), At(text, "testY", "test rows come from here")]));
    }

    [Fact]
    public void Control_characters_do_not_reach_the_terminal() =>
        Assert.DoesNotContain('\u001b', Frame([At(SourceText.From("\"\u001b[2J\" bad"), "bad", "")]));

    [Fact]
    public void The_gutter_is_as_wide_as_the_largest_line_number()
    {
        var text = SourceText.From(string.Concat(Enumerable.Range(1, 120).Select(i => $"line{i};\n")));

        Assert.Equal("""
                9 │ line9;
                  │ ───── near
                … │
              120 │ line120;
                  │ ^^^^^^^ far

            """, Frame([At(text, "line120", "far"), At(text, "line9", "near")]));
    }

    [Fact]
    public void An_encoding_without_line_drawing_gets_plain_characters()
    {
        var bytes = new MemoryStream();
        using var output = new StreamWriter(bytes, System.Text.Encoding.Latin1) { NewLine = "\n" };
        var text = SourceText.From("one\n\n\nfour\n");

        new CodeFrame(output, new Ink(false), path => path).Write([At(text, "four", "here"), At(text, "one", "there")], Tone.Warning);

        output.Flush();
        Assert.Equal("  1 | one\n    | --- there\n... |\n  4 | four\n    | ^^^^ here\n", System.Text.Encoding.Latin1.GetString(bytes.ToArray()));
    }

    [Fact]
    public void Colour_is_only_added_around_the_same_text()
    {
        var text = SourceText.From("bad\n");
        using var output = new StringWriter { NewLine = "\n" };

        new CodeFrame(output, new Ink(true), path => path).Write([At(text, "bad", "here")], Tone.Warning);

        Assert.Contains("\u001b[1;33m^^^ here\u001b[0m", output.ToString());
        Assert.Equal(Frame([At(text, "bad", "here")]), System.Text.RegularExpressions.Regex.Replace(output.ToString(), "\u001b\\[[0-9;]*m", ""));
    }

    private static void Shows(string source, string marked, string label, string expected) =>
        Assert.Equal(expected + "\n", Frame([At(SourceText.From(source), marked, label)]));

    private static Place At(SourceText text, string marked, string label) =>
        new("a.cs", text, new TextSpan(text.ToString().IndexOf(marked, StringComparison.Ordinal), marked.Length), label);

    private static string Frame(Place[] places)
    {
        using var output = new StringWriter { NewLine = "\n" };
        new CodeFrame(output, new Ink(false), path => path).Write([.. places], Tone.Warning);
        return output.ToString();
    }
}
