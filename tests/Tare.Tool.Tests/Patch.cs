using System.Globalization;
using System.Text.RegularExpressions;

namespace Tare.Tool.Tests;

/// <summary>Applies a unified diff of one file, and fails where its context or its counts are wrong.</summary>
internal static partial class Patch
{
    public static string Apply(string before, string diff)
    {
        var old = Regex.Matches(before, "[^\n]*\n|[^\n]+\\z").Select(match => match.Value).ToArray();
        var result = new List<string>();
        var taken = 0;
        var lines = diff.Split('\n').SkipLast(1).Skip(2).ToArray();
        for (var i = 0; i < lines.Length;)
        {
            var head = Head().Match(lines[i++]);
            Assert.True(head.Success, "a hunk begins with @@");
            var (countA, countB) = (Count(head.Groups[2]), Count(head.Groups[4]));
            var start = Number(head.Groups[1].Value) - (countA == 0 ? 0 : 1);
            result.AddRange(old[taken..start]);
            taken = start;
            Assert.Equal(Number(head.Groups[3].Value) - (countB == 0 ? 0 : 1), result.Count);
            while (i < lines.Length && !lines[i].StartsWith("@@", StringComparison.Ordinal))
            {
                var line = lines[i++];
                var ended = i >= lines.Length || !lines[i].StartsWith('\\');
                i += ended ? 0 : 1;
                var text = line[1..] + (ended ? "\n" : "");
                if (line[0] != '+')
                {
                    Assert.Equal(old[taken++], text);
                    countA--;
                }

                if (line[0] != '-')
                {
                    result.Add(text);
                    countB--;
                }
            }

            Assert.Equal((0, 0), (countA, countB));
        }

        result.AddRange(old[taken..]);
        return string.Concat(result);
    }

    private static int Count(Group group) => group.Success ? Number(group.Value) : 1;

    private static int Number(string text) => int.Parse(text, CultureInfo.InvariantCulture);

    [GeneratedRegex(@"\A@@ -(\d+)(?:,(\d+))? \+(\d+)(?:,(\d+))? @@\z")]
    private static partial Regex Head();
}
