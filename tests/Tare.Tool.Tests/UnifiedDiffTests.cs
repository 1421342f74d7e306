using CsCheck;
using Tare.Tool.Mending;

namespace Tare.Tool.Tests;

public class UnifiedDiffTests
{
    [Fact]
    public void One_changed_line_has_three_lines_of_context() => Assert.Equal(
        "--- a/x.cs\n+++ b/x.cs\n@@ -2,7 +2,7 @@\n 2\n 3\n 4\n-5\n+five\n 6\n 7\n 8\n",
        UnifiedDiff.Of("x.cs", "1\n2\n3\n4\n5\n6\n7\n8\n9\n", "1\n2\n3\n4\nfive\n6\n7\n8\n9\n"));

    [Fact]
    public void Changes_far_apart_are_hunks_of_their_own_and_near_ones_share_one()
    {
        var lines = Enumerable.Range(1, 30).Select(i => $"{i}\n").ToArray();
        var near = (string[])lines.Clone();
        (near[9], near[16]) = ("a\n", "b\n");
        var far = (string[])lines.Clone();
        (far[9], far[17]) = ("a\n", "b\n");

        Assert.Equal(1, Hunks(UnifiedDiff.Of("x", string.Concat(lines), string.Concat(near))));
        Assert.Equal(2, Hunks(UnifiedDiff.Of("x", string.Concat(lines), string.Concat(far))));
    }

    [Fact]
    public void A_missing_end_of_the_last_line_is_told() => Assert.Equal(
        "--- a/x\n+++ b/x\n@@ -1,2 +1,2 @@\n 1\n-2\n\\ No newline at end of file\n+two\n\\ No newline at end of file\n",
        UnifiedDiff.Of("x", "1\n2", "1\ntwo"));

    [Fact]
    public void A_new_file_comes_from_nowhere() => Assert.Equal(
        "--- /dev/null\n+++ b/x\n@@ -0,0 +1,2 @@\n+1\n+2\n", UnifiedDiff.Of("x", null, "1\n2\n"));

    [Fact]
    public void Equal_texts_have_no_diff() => Assert.Equal("", UnifiedDiff.Of("x", "1\n", "1\n"));

    [Fact]
    public void Applying_a_diff_gives_the_new_text() => Gen.Select(Text, Text).Sample((before, after) =>
        Assert.Equal(after, Patch.Apply(before, UnifiedDiff.Of("x", before, after))));

    // Against the textbook table of longest common subsequences (Wagner and Fischer, JACM 21 (1974), 168-173).
    [Fact]
    public void The_edit_is_the_shortest() => Gen.Select(Lines, Lines).Sample((a, b) =>
    {
        var (removed, added) = LineDiff.Compare(a, b);
        var common = CommonLength(a, b);
        Assert.Equal(a.Length - common, removed.Count(line => line));
        Assert.Equal(b.Length - common, added.Count(line => line));
        Assert.Equal(a.Where((_, i) => !removed[i]), b.Where((_, i) => !added[i]));
    });

    [Fact]
    public void Too_many_edits_still_give_a_correct_diff()
    {
        var before = string.Concat(Enumerable.Range(0, 3000).Select(i => $"a{i}\n")) + "same\n";
        var after = string.Concat(Enumerable.Range(0, 3000).Select(i => $"b{i}\n")) + "same\n";

        Assert.Equal(after, Patch.Apply(before, UnifiedDiff.Of("x", before, after)));
    }

    private static readonly Gen<string[]> Lines = OneOf("a\n", "b\n", "c\n").Array[0, 12];

    private static readonly Gen<string> Text =
        Gen.Select(OneOf("a\n", "b\r\n", "c\n", "\n").Array[0, 30], OneOf("", "", "tail")).Select((lines, tail) => string.Concat(lines) + tail);

    private static Gen<string> OneOf(params string[] texts) => Gen.Int[0, texts.Length - 1].Select(i => texts[i]);

    private static int Hunks(string diff) => diff.Split('\n').Count(line => line.StartsWith("@@", StringComparison.Ordinal));

    private static int CommonLength(string[] a, string[] b)
    {
        var table = new int[a.Length + 1, b.Length + 1];
        for (var i = 1; i <= a.Length; i++)
        {
            for (var j = 1; j <= b.Length; j++)
            {
                table[i, j] = a[i - 1] == b[j - 1] ? table[i - 1, j - 1] + 1 : Math.Max(table[i - 1, j], table[i, j - 1]);
            }
        }

        return table[a.Length, b.Length];
    }
}
