using Microsoft.CodeAnalysis;
using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Conventions;

/// <summary>The checks themselves must be able to fail.</summary>
[Collection(ConsoleCollection.Name)]
public class InfrastructureTests
{
    private const string Text = "int a = 1; // ! TARE101\nint b = 2; // ! TARE101, TARE102\nint c = 3; // ? TARE106\nint d = 4;\n";

    [Fact]
    public void LabelsAreReadWithRuleLineAndKind()
    {
        var labels = Label.In("p.cs", Text);
        Assert.Equal(
            [new("TARE101", "p.cs", 1, true), new("TARE101", "p.cs", 2, true), new("TARE102", "p.cs", 2, true), new Label("TARE106", "p.cs", 3, false)],
            labels.AsEnumerable());
    }

    [Fact]
    public void ScoreTellsHitsMissesAndFalseReportsApart()
    {
        Finding[] found =
        [
            new("TARE101", "p.cs", 1, ""), // as labelled
            new("TARE102", "p.cs", 2, ""), // as labelled; 101 there is missed
            new("TARE106", "p.cs", 3, ""), // allowed
            new("TARE101", "p.cs", 4, ""), // no label
            new("TARE101", "p.cs", 3, ""), // another rule's label
            new("TARE301", "p.cs", 4, ""), // not judged
        ];
        var score = Score.Of(Label.In("p.cs", Text), found, rule => rule != "TARE301");
        Assert.Equal([("TARE101", 1), ("TARE102", 2)], score.Hits.Select(f => (f.Rule, f.Line)));
        Assert.Equal([("TARE101", 2)], score.Misses.Select(l => (l.Rule, l.Line)));
        Assert.Equal([("TARE101", 4), ("TARE101", 3)], score.FalseReports.Select(f => (f.Rule, f.Line)));
    }

    [Fact]
    public async Task ProgramsRunWithTheirArgument()
    {
        var program = await CompiledProgram.CompileAsync(new TestProgram("Console.WriteLine($\"chosen={args[0]}{args.Length}\");").ToProject());
        Assert.Equal("51", await program.ChosenAsync(5));
    }

    [Fact]
    public async Task ProgramsThatDoNotCompileAreRefused() =>
        await Assert.ThrowsAnyAsync<Xunit.Sdk.XunitException>(() => Analysis.FindAsync("int x = \"\";"));

    [Theory]
    [InlineData(Libraries.ThirdParty, "using Microsoft.ML; using MathNet.Numerics; using TorchSharp; using Xunit; using Microsoft.Extensions.AI.Evaluation; using Microsoft.Data.Analysis;", 0)]
    [InlineData(Libraries.MathNet, "using Microsoft.ML;", 1)]
    [InlineData(Libraries.None, "using MathNet.Numerics;", 1)]
    public async Task LibrariesAreThoseAskedFor(Libraries libraries, string usings, int errors)
    {
        var compilation = await new TestProgram(usings + "\nclass C;") { Libraries = libraries }.ToProject().GetCompilationAsync();
        Assert.Equal(errors, compilation!.GetDiagnostics().Count(d => d.Severity == DiagnosticSeverity.Error));
    }

    [Fact]
    public async Task SettingsReachTheAnalyzer()
    {
        var project = new TestProgram("class C;") { EditorConfig = "tare.evidence = known", GlobalConfig = "tare.family_level = 0.01" }.ToProject();
        var options = project.AnalyzerOptions.AnalyzerConfigOptionsProvider;
        var tree = await project.Documents.First().GetSyntaxTreeAsync();
        Assert.True(options.GetOptions(tree!).TryGetValue("tare.evidence", out string? evidence));
        Assert.Equal("known", evidence);
        Assert.True(options.GlobalOptions.TryGetValue("tare.family_level", out string? level) || options.GetOptions(tree!).TryGetValue("tare.family_level", out level));
        Assert.Equal("0.01", level);
    }
}
