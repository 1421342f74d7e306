using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Conventions;

/// <summary>
/// Every block marked <c>csharp</c> in the README and the rule documents is a whole program that compiles.
/// In a rule's document those under "Wrong" are reported with the rule and those under "Right" with nothing;
/// those of the README are reported where their comments say so.
/// </summary>
public class DocumentTests
{
    // The README leaves out what its reader has already.
    private const string ReadersOwnCode =
        """
        internal static class Boards
        {
            public static (double[][] Readings, bool[] Warped) Load(string path)
            {
                var cells = File.ReadLines(path).Select(l => l.Split(',')).ToArray();
                return (cells.Select(c => c[1..].Select(double.Parse).ToArray()).ToArray(), cells.Select(c => c[0] == "1").ToArray());
            }
        }

        internal sealed class Model
        {
            private readonly double[][] _rows;
            private readonly bool[] _labels;
            private readonly int _k;

            private Model(double[][] rows, bool[] labels, int k) => (_rows, _labels, _k) = (rows, labels, k);

            public static Model Fit(double[][] rows, bool[] labels, int k) => new(rows, labels, k);

            public int Hits(double[][] rows, bool[] labels) => rows.Where((row, i) => Predict(row) == labels[i]).Count();

            public double Accuracy(double[][] rows, bool[] labels) => Hits(rows, labels) / (double)rows.Length;

            private bool Predict(double[] row) =>
                _rows.Select((r, i) => (Distance: r.Zip(row, (a, b) => (a - b) * (a - b)).Sum(), Label: _labels[i]))
                    .OrderBy(n => n.Distance).Take(_k).Count(n => n.Label) * 2 > _k;
        }
        """;

    public static TheoryData<string> RuleDocuments => [.. Markdown.RuleDocuments().Select(Repository.Relative)];

    [Theory]
    [MemberData(nameof(RuleDocuments))]
    public async Task RuleDocumentsShowWhatIsReportedAndWhatIsNot(string document)
    {
        string id = Path.GetFileNameWithoutExtension(document);
        var blocks = Markdown.Programs(Repository.At(document));
        Assert.Contains(blocks, b => b.Heading == "Wrong");
        Assert.Contains(blocks, b => b.Heading == "Right");
        foreach (var block in blocks)
            await CheckAsync(document, block, id);
    }

    [Fact]
    public async Task ReadmeProgramsAreReportedWhereTheySay()
    {
        var blocks = Markdown.Programs(Repository.At("README.md"));
        Assert.NotEmpty(blocks);
        foreach (var block in blocks)
        {
            // A reader sees "// TARE101"; the check reads it as the marker of a labelled program.
            string labelled = block.Text.Replace("// TARE", "// ! TARE", StringComparison.Ordinal);
            await AtAsync("README.md", block, () => Labelled.Check(new TestProgram([("Program.cs", labelled), ("Boards.cs", ReadersOwnCode)]) { Libraries = Libraries.All }));
        }
    }

    private static Task CheckAsync(string document, Markdown.Block block, string id) => AtAsync(document, block, async () =>
    {
        var findings = await Analysis.FindAsync(new TestProgram(block.Text) { Libraries = Libraries.All });
        if (block.Heading == "Wrong")
            Assert.Contains(findings, d => d.Id == id);
        else
            Assert.Empty(findings);
    });

    private static async Task AtAsync(string document, Markdown.Block block, Func<Task> check)
    {
        try
        {
            await check();
        }
        catch (Exception exception)
        {
            Assert.Fail($"{document}({block.Line}): {exception.Message}");
        }
    }
}
