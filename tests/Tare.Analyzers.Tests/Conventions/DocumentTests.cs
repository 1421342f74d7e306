using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Conventions;

/// <summary>
/// Every block marked <c>csharp</c> in the README and the rule documents is a whole program that compiles.
/// In a rule's document those under "Wrong" are reported with the rule and those under "Right" with nothing.
/// </summary>
public class DocumentTests
{
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
    public async Task ReadmeProgramsCompile()
    {
        var blocks = Markdown.Programs(Repository.At("README.md"));
        Assert.NotEmpty(blocks);
        foreach (var block in blocks)
            await CheckAsync("README.md", block, id: null);
    }

    // The README marks its wrong and right programs with labels.
    private static async Task CheckAsync(string document, Markdown.Block block, string? id)
    {
        string place = $"{document}({block.Line})";
        var program = new TestProgram(block.Text) { Libraries = Libraries.All };
        try
        {
            if (block.Text.Contains("// !", StringComparison.Ordinal))
                await Labelled.Check(program);
            var findings = await Analysis.FindAsync(program);
            if (block.Heading == "Wrong" && id is not null)
                Assert.Contains(findings, d => d.Id == id);
            else if (!block.Text.Contains("// !", StringComparison.Ordinal))
                Assert.Empty(findings);
        }
        catch (Exception exception)
        {
            Assert.Fail($"{place}: {exception.Message}");
        }
    }
}
