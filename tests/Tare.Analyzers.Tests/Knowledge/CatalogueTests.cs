using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using Microsoft.CodeAnalysis.Text;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Tests.Knowledge;

public class CatalogueTests
{
    [Theory]
    [InlineData("new Microsoft.ML.MLContext().Data.TrainTestSplit(null)", nameof(CatalogueEffect.Splits))]
    [InlineData("((Microsoft.ML.Trainers.SdcaRegressionTrainer)null).Fit(null)", nameof(CatalogueEffect.Fits))]
    [InlineData("((Microsoft.ML.Data.TransformerChain<Microsoft.ML.ITransformer>)null).Transform(null)", nameof(CatalogueEffect.Transforms))]
    [InlineData("((TorchSharp.Modules.Linear)null).forward(null)", nameof(CatalogueEffect.Transforms))]
    [InlineData("((TorchSharp.Modules.MSELoss)null).forward(null, null)", nameof(CatalogueEffect.Scores))]
    [InlineData("((MathNet.Numerics.Distributions.Normal)null).CumulativeDistribution(1)", nameof(CatalogueEffect.Tail))]
    [InlineData("new System.IO.StringWriter().Write(1.5)", nameof(CatalogueEffect.Reports))]
    [InlineData("1.5.ToString()", nameof(CatalogueEffect.Carries))]
    [InlineData("1.5.ToString(\"F2\")", nameof(CatalogueEffect.Carries))]
    [InlineData("\"a\".Trim()", nameof(CatalogueEffect.Carries))]
    [InlineData("\"a\".Split(' ')", nameof(CatalogueEffect.Transforms))]
    [InlineData("new System.Random(1).Next()", nameof(CatalogueEffect.Nothing))]
    [InlineData("new System.Random(1)", nameof(CatalogueEffect.Nothing))]
    [InlineData("new System.Random(1).Shuffle(new int[3])", nameof(CatalogueEffect.Shuffles))]
    [InlineData("new System.Collections.Generic.List<int>().Count", nameof(CatalogueEffect.Nothing))]
    [InlineData("new int[3].Length", nameof(CatalogueEffect.Nothing))]
    [InlineData("System.Text.Json.JsonSerializer.Serialize(1.5)", nameof(CatalogueEffect.Carries))]
    [InlineData("System.Text.Json.JsonSerializer.Serialize(System.IO.Stream.Null, 1.5)", nameof(CatalogueEffect.Reports))]
    public void A_use_of_a_member_is_recognised(string expression, string effect)
    {
        Assert.True(Catalogue.Embedded.TryGet(Used(expression), out var entry));
        Assert.Equal(effect, entry.Effect.ToString());
    }

    [Theory]
    [InlineData("new System.Collections.Generic.List<int>().Contains(1)")]
    [InlineData("System.Linq.Enumerable.Max(new int[3])")]
    [InlineData("System.Math.Abs(1.5)")]
    [InlineData("new Other.Console().WriteLine(1.5)")]
    [InlineData("new Other.Console().Fit(null)")]
    public void A_member_of_another_type_with_the_same_name_is_not(string expression) =>
        Assert.False(Catalogue.Embedded.TryGet(Used(expression), out _));

    [Fact]
    public void An_override_is_found_and_its_parameters_keep_their_places()
    {
        var method = Method("class Kiln : TorchSharp.torch.nn.Module<TorchSharp.torch.Tensor, TorchSharp.torch.Tensor> { public Kiln() : base(\"k\") {} public override TorchSharp.torch.Tensor forward(TorchSharp.torch.Tensor boards) => boards; }", "Kiln", "forward");
        Assert.True(Catalogue.Embedded.TryGet(method, out var entry, out var declared));
        Assert.Equal(CatalogueEffect.Transforms, entry.Effect);
        var parameter = ((IMethodSymbol)declared).Parameters[0];
        Assert.Equal("input", parameter.Name);
        Assert.True(entry.Names(CatalogueKey.Rows, parameter.Name));
        Assert.True(entry.NamesThis(CatalogueKey.Model));
    }

    [Theory]
    [InlineData("public Microsoft.ML.IDataView Transform(Microsoft.ML.IDataView rows) => rows;", "Transform", true)]
    [InlineData("Microsoft.ML.IDataView Microsoft.ML.ITransformer.Transform(Microsoft.ML.IDataView rows) => rows;", "Microsoft.ML.ITransformer.Transform", true)]
    [InlineData("public int Transform(string rows) => 0;", "Transform", false)]
    public void An_implementation_is_found(string member, string name, bool expected)
    {
        var method = Method($"abstract class Kiln : Microsoft.ML.ITransformer {{ {member} }}", "Kiln", name);
        Assert.Equal(expected, Catalogue.Embedded.TryGet(method, out var entry));
        if (expected)
            Assert.Equal(CatalogueEffect.Transforms, entry!.Effect);
    }

    [Fact]
    public void A_member_before_all_overloads_before_its_type()
    {
        var catalogue = Catalogue.Of(Read("T:Kiln = nothing\nM:Kiln.Dry(*) = carries\nM:Kiln.Dry(System.Int32) = scores rows:i"));
        const string Source = "class Kiln { public void Dry(int i) {} public void Dry<T>(string s) {} public void Dry() {} public int Load { get; set; } void Dryer() {} }";
        var type = KnowledgeCompilation.Create(Source).GetTypeByMetadataName("Kiln")!;
        var effects = type.GetMembers("Dry").Select(m => catalogue.TryGet(m, out var e) ? e.Effect : default);
        Assert.Equal([CatalogueEffect.Scores, CatalogueEffect.Carries, CatalogueEffect.Carries], effects);
        Assert.True(catalogue.TryGet(type.GetMembers("Dryer")[0], out var other) && other.Effect == CatalogueEffect.Nothing);
        Assert.True(catalogue.TryGet(type.GetMembers("get_Load")[0], out other) && other.Effect == CatalogueEffect.Nothing);
        Assert.True(catalogue.TryGet(type, out other) && other.IsType);
    }

    [Fact]
    public void The_users_lines_win()
    {
        var user = Catalogue.Over(Catalogue.Embedded, Read("M:System.Console.WriteLine(*) = nothing"));
        var write = Used("System.Console.WriteLine(1.5)");
        Assert.True(user.TryGet(write, out var entry) && entry.Effect == CatalogueEffect.Nothing);
        Assert.True(user.TryGet(Used("System.Console.Write(1.5)"), out entry) && entry.Effect == CatalogueEffect.Reports);
        Assert.True(Catalogue.Embedded.TryGet(write, out entry) && entry.Effect == CatalogueEffect.Reports);
        Assert.Same(Catalogue.Embedded, Catalogue.Over(Catalogue.Embedded, []));
    }

    [Fact]
    public void Words_are_what_a_reader_sees()
    {
        var catalogue = Catalogue.Of(Read("M:A.Kiln`1.#ctor(*) = loads\nM:A.Kiln`1.Dry(*) = carries\nT:A.Board`2 = nothing"));
        Assert.Equal(["Kiln", "Dry", "Board"], catalogue.Words);
        Assert.Equal(["Dry"], catalogue.WordsOf(CatalogueEffect.Carries));
        Assert.Contains("TrainTestSplit", Catalogue.Embedded.WordsOf(CatalogueEffect.Splits));
    }

    [Fact]
    public void Nothing_in_a_catalogue_can_hold_a_compilation()
    {
        var fields = new[] { typeof(Catalogue), typeof(CatalogueEntry) }
            .SelectMany(t => t.GetFields(System.Reflection.BindingFlags.Instance | System.Reflection.BindingFlags.NonPublic));
        Assert.DoesNotContain(fields, f => typeof(ISymbol).IsAssignableFrom(f.FieldType) || typeof(Compilation).IsAssignableFrom(f.FieldType));
    }

    private static ISymbol Used(string expression)
    {
        var compilation = KnowledgeCompilation.Create("namespace Other { class Console { public void WriteLine(double d) {} public void Fit(object o) {} } } class P { void M() { _ = " + expression + "; } }");
        var model = compilation.GetSemanticModel(compilation.SyntaxTrees[0]);
        var syntax = compilation.SyntaxTrees[0].GetRoot().DescendantNodes().OfType<AssignmentExpressionSyntax>().Single().Right;
        var operation = model.GetOperation(syntax);
        while (operation is IConversionOperation conversion)
            operation = conversion.Operand;
        var symbol = operation switch
        {
            IInvocationOperation call => call.TargetMethod,
            IPropertyReferenceOperation property => property.Property,
            IObjectCreationOperation creation => creation.Constructor,
            _ => model.GetSymbolInfo(syntax).Symbol ?? model.GetSymbolInfo(syntax).CandidateSymbols.SingleOrDefault(),
        };
        Assert.NotNull(symbol);
        return symbol;
    }

    private static ISymbol Method(string source, string type, string name) =>
        KnowledgeCompilation.Create(source).GetTypeByMetadataName(type)!.GetMembers(name).Single();

    private static System.Collections.Immutable.ImmutableArray<CatalogueEntry> Read(string text)
    {
        var read = CatalogueReader.Read(SourceText.From(text));
        Assert.Empty(read.Errors);
        return read.Entries;
    }
}
