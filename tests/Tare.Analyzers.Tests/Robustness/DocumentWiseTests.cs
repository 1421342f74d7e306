using Microsoft.CodeAnalysis;
using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Robustness;

/// <summary>An editor asks for one document at a time: the findings must be those of the whole compilation.</summary>
public class DocumentWiseTests
{
    private const string Helpers =
        """
        internal sealed record Setting(int Depth, double Rate);

        internal sealed class Stump(double cut)
        {
            public bool Predict(double[] row) => row[0] > cut;

            public static Stump Fit(double[][] rows, bool[] labels, Setting setting) =>
                new(rows.Where((_, i) => labels[i]).Average(r => r[0]) * setting.Rate + setting.Depth);
        }

        internal static class Metric
        {
            public static double Accuracy(Stump stump, double[][] rows, bool[] labels) =>
                rows.Where((r, i) => stump.Predict(r) == labels[i]).Count() / (double)rows.Length;
        }
        """;

    private const string Chooser =
        """
        internal static class Chooser
        {
            public static (Setting Setting, double Score) Best(double[][] trainX, bool[] trainY, double[][] testX, bool[] testY, Setting[] settings)
            {
                Setting best = settings[0];
                double bestScore = double.NegativeInfinity;
                foreach (var setting in settings)
                {
                    double score = Metric.Accuracy(Stump.Fit(trainX, trainY, setting), testX, testY);
                    if (score > bestScore)
                    {
                        bestScore = score;
                        best = setting;
                    }
                }

                Console.WriteLine($"best accuracy {bestScore:P1}");
                return (best, bestScore);
            }
        }
        """;

    private const string Caller =
        """
        internal static class Program
        {
            private static void Main()
            {
                var random = new Random(3);
                var rows = Enumerable.Range(0, 120).Select(_ => new[] { random.NextDouble() }).ToArray();
                var labels = rows.Select(r => r[0] + 0.3 * random.NextDouble() > 0.6).ToArray();
                var (setting, score) = Chooser.Best(rows[..80], labels[..80], rows[80..], labels[80..], [new(0, 0.5), new(0, 0.7), new(1, 0.9)]);
                Console.WriteLine($"{setting}: {score:P1}");
            }
        }
        """;

    public static TheoryData<string> LabelledPrograms => Cases.Exist ? [.. Cases.Files()] : [];

    [Fact]
    public async Task SeveralDocuments()
    {
        var project = new TestProgram([("Helpers.cs", Helpers), ("Chooser.cs", Chooser), ("Program.cs", Caller)]).ToProject();
        await AssertSameAsync(project);
        Assert.NotEmpty(await Analysis.FindAsync(project));
    }

    // Sources of other tests side by side in one compilation: clashing names make errors, which change nothing here.
    [Fact]
    public async Task SourcesOfAllTests()
    {
        foreach (var part in SampleSources.All.Chunk(5))
        {
            var program = new TestProgram([.. part.Select((s, i) => ($"Part{i}.cs", s.Text))]) { AllowErrors = true };
            await AssertSameAsync(program.ToProject());
        }
    }

    [CasesTheory]
    [MemberData(nameof(LabelledPrograms))]
    public async Task Labelled(string file) => await AssertSameAsync(Cases.Program(file).ToProject());

    private static async Task AssertSameAsync(Project project)
    {
        var whole = await Analysis.FindAsync(project, allowErrors: true);
        var byDocument = await Analysis.FindByDocumentAsync(project);
        Assert.Equal(whole.Select(Describe), byDocument.Select(Describe));
    }

    private static string Describe(Diagnostic d) =>
        $"{d} {string.Join(" ", d.AdditionalLocations)} {string.Join(" ", d.Properties.OrderBy(p => p.Key, StringComparer.Ordinal).Select(p => $"{p.Key}={p.Value}"))}";
}
