using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.Text;
using Tare.Analyzers.Tests.Infrastructure;
using Xunit.Abstractions;

namespace Tare.Analyzers.Tests.Robustness;

/// <summary>While somebody types, code is cut off anywhere: the analyzer must neither throw nor hang on it.</summary>
public class DamagedFilesTests(ITestOutputHelper output)
{
    // Damaged versions over all sources together, so that the test's time does not grow with the number of rules.
    private const int Versions = 900;
    private const int TokensBetweenCuts = 7;
    private static readonly TimeSpan Limit = TimeSpan.FromSeconds(20);

    [Fact]
    public async Task NoDamagedFileThrowsOrHangs()
    {
        var damaged = SampleSources.All.SelectMany((s, i) => Damage(s.Name, s.Text, seed: i)).ToArray();
        Assert.NotEmpty(damaged);
        // Every n-th of all, an odd step so that cuts and deletions are both drawn.
        int step = damaged.Length <= Versions ? 1 : damaged.Length / Versions | 1;
        var drawn = damaged.Where((_, i) => i % step == 0).ToArray();

        var project = new TestProgram("") { AllowErrors = true }.ToProject();
        var compilation = await project.GetCompilationAsync();
        var empty = compilation!.SyntaxTrees.First();
        await Parallel.ForEachAsync(drawn, async (version, _) =>
        {
            using var cancel = new CancellationTokenSource(Limit);
            var broken = compilation.ReplaceSyntaxTree(empty, empty.WithChangedText(SourceText.From(version.Text)));
            try
            {
                await Analysis.FindInCompilationAsync(broken, project.AnalyzerOptions, cancel.Token).WaitAsync(Limit + Limit, CancellationToken.None);
            }
            catch (Exception exception)
            {
                Assert.Fail($"{version.Name}: {exception}\n{version.Text}");
            }
        });
        output.WriteLine($"{drawn.Length} of {damaged.Length} damaged versions of {SampleSources.All.Length} programs");
    }

    private static IEnumerable<(string Name, string Text)> Damage(string name, string text, int seed)
    {
        var tokens = CSharpSyntaxTree.ParseText(text).GetRoot().DescendantTokens().Where(t => t.Span.Length > 0).ToArray();
        var random = new Random(seed);
        for (int i = 0; i < tokens.Length; i += TokensBetweenCuts)
        {
            yield return ($"{name} cut after token {i}", text[..tokens[i].Span.End]);
            int dropped = random.Next(tokens.Length);
            yield return ($"{name} without token {dropped}", text.Remove(tokens[dropped].SpanStart, tokens[dropped].Span.Length));
        }
    }
}
