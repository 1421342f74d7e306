using System.Collections.Immutable;
using System.Text;

namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>Reads the programs that documents show: blocks marked <c>csharp</c>.</summary>
internal static class Markdown
{
    /// <summary>A block, the line it starts on and the second-level heading above it.</summary>
    public sealed record Block(string Heading, int Line, string Text);

    /// <summary>The documents of all rules.</summary>
    public static ImmutableArray<string> RuleDocuments() =>
        [.. Directory.EnumerateFiles(Repository.At("src", "Tare.Analyzers", "Rules"), "TARE*.md", SearchOption.AllDirectories).Order(StringComparer.Ordinal)];

    /// <summary>The blocks marked <c>csharp</c> of a document.</summary>
    public static ImmutableArray<Block> Programs(string file)
    {
        var blocks = ImmutableArray.CreateBuilder<Block>();
        string heading = "";
        StringBuilder? inside = null;
        int start = 0;
        string[] lines = File.ReadAllLines(file);
        for (int i = 0; i < lines.Length; i++)
        {
            if (inside is not null)
            {
                if (lines[i].StartsWith("```", StringComparison.Ordinal))
                {
                    blocks.Add(new Block(heading, start, inside.ToString()));
                    inside = null;
                }
                else
                {
                    inside.Append(lines[i]).Append('\n');
                }
            }
            else if (lines[i].TrimEnd() == "```csharp")
            {
                inside = new StringBuilder();
                start = i + 2;
            }
            else if (lines[i].StartsWith("## ", StringComparison.Ordinal))
            {
                heading = lines[i][3..].Trim();
            }
        }

        Assert.True(inside is null, $"{Repository.Relative(file)} leaves a block open.");
        return blocks.ToImmutable();
    }
}
