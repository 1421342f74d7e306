using System.Collections.Immutable;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>Every program that the tests and the rule documents hold, to be damaged, nested and analysed document by document.</summary>
internal static class SampleSources
{
    private const int LeastLines = 6;

    /// <summary>Name and text of each program, in a fixed order.</summary>
    public static ImmutableArray<(string Name, string Text)> All { get; } = [.. FromTests(), .. FromDocuments()];

    // A rule's tests hold their programs as string literals: those of several lines are programs.
    private static IEnumerable<(string, string)> FromTests()
    {
        foreach (string file in Directory.EnumerateFiles(Repository.At("tests", "Tare.Analyzers.Tests"), "*.cs", SearchOption.AllDirectories).Order(StringComparer.Ordinal))
        {
            string path = Repository.Relative(file);
            if (path.Contains("/bin/") || path.Contains("/obj/"))
                continue;
            var root = CSharpSyntaxTree.ParseText(File.ReadAllText(file), new CSharpParseOptions(LanguageVersion.Preview)).GetRoot();
            int number = 0;
            foreach (var literal in root.DescendantNodes().OfType<LiteralExpressionSyntax>())
            {
                if (literal.Token.Value is string text && text.Count(c => c == '\n') >= LeastLines && text.Contains(';'))
                    yield return ($"{path}#{++number}", text);
            }
        }
    }

    private static IEnumerable<(string, string)> FromDocuments()
    {
        foreach (string file in Markdown.RuleDocuments())
        {
            foreach (var block in Markdown.Programs(file))
                yield return ($"{Repository.Relative(file)}({block.Line})", block.Text);
        }
    }
}
