using Microsoft.CodeAnalysis;
using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Rules.Threshold;

/// <summary>The fix of TARE201, with the base library alone and with the runtime library.</summary>
public class LevelNotCorrectedFixTests
{
    private const string Rule = "TARE201";

    internal const string Permutation =
        """
        internal static class Permutation
        {
            public static double PValue(double[] reading, bool[] warped)
            {
                var random = new Random(1);
                bool[] shuffled = [.. warped];
                double seen = Gap(reading, warped);
                int asFar = 1;
                for (int i = 0; i < 999; i++)
                {
                    random.Shuffle(shuffled);
                    if (Gap(reading, shuffled) >= seen)
                        asFar++;
                }

                return asFar / 1000.0;
            }

            private static double Gap(double[] reading, bool[] group) =>
                Math.Abs(reading.Where((_, i) => group[i]).Average() - reading.Where((_, i) => !group[i]).Average());
        }
        """;

    [Theory]
    [InlineData("pValue < 0.05", "pValue < 0.05 / readings.Length", "pValue < Thresholds.Bonferroni(0.05, readings.Length)")]
    [InlineData("pValue <= Alpha", "pValue <= Alpha / readings.Length", "pValue <= Thresholds.Bonferroni(Alpha, readings.Length)")]
    [InlineData("0.05 > pValue", "0.05 / readings.Length > pValue", "Thresholds.Bonferroni(0.05, readings.Length) > pValue")]
    [InlineData("!(pValue >= alpha)", "!(pValue >= alpha / readings.Length)", "!(pValue >= Thresholds.Bonferroni(alpha, readings.Length))")]
    [InlineData("pValue < 1 - 0.95", "pValue < (1 - 0.95) / readings.Length", "pValue < Thresholds.Bonferroni(1 - 0.95, readings.Length)")]
    [InlineData("pValue is < 0.05", "pValue < 0.05 / readings.Length", "pValue < Thresholds.Bonferroni(0.05, readings.Length)")]
    [InlineData("pValue is not (> 0.05)", "!(pValue > 0.05 / readings.Length)", "!(pValue > Thresholds.Bonferroni(0.05, readings.Length))")]
    [InlineData("(float)pValue < 0.05f", "(float)pValue < 0.05f / readings.Length", "(float)pValue < 0.05f / readings.Length")]
    [InlineData("(decimal)pValue < 0.05m", "(decimal)pValue < 0.05m / readings.Length", "(decimal)pValue < 0.05m / readings.Length")]
    [InlineData("pValue < /* as last year */ 0.05", "pValue < /* as last year */ 0.05 / readings.Length", "pValue < /* as last year */ Thresholds.Bonferroni(0.05, readings.Length)")]
    public async Task LevelIsDividedByTheCount(string condition, string withoutLibrary, string withLibrary)
    {
        string statements = $$"""
                for (int i = 0; i < readings.Length; i++)
                {
                    double pValue = Permutation.PValue(readings[i], warped); // one a reading
                    if ({{condition}})
                        Console.WriteLine(i);
                }
            """;
        string plain = Program(statements);
        Assert.Equal(plain.Replace(condition, withoutLibrary, StringComparison.Ordinal), await Mended.AllAsync(Of(plain, Libraries.None), Rule));

        string expected = plain.Replace(condition, withLibrary, StringComparison.Ordinal);
        if (withLibrary.Contains("Thresholds", StringComparison.Ordinal))
            expected = "using Tare;\n\n" + expected;
        Assert.Equal(expected, await Mended.AllAsync(Of(plain, Libraries.Tare), Rule));
    }

    [Theory]
    [InlineData("return readings.Any(r => Permutation.PValue(r, warped) < 0.05);", "0.05 / readings.Length")]
    [InlineData("return readings.Select(r => Permutation.PValue(r, warped)).Min() < 0.05;", "0.05 / readings.Length")]
    [InlineData("return readings.Count(r => Permutation.PValue(r, warped) < 0.05) > 0;", "0.05 / readings.Length")]
    [InlineData("return Enumerable.Range(0, readings.Length).Where(i => Permutation.PValue(readings[i], warped) < 0.05).Any();", "0.05 / readings.Length")]
    [InlineData("return (from r in readings where Permutation.PValue(r, warped) < 0.05 select r).Any();", "0.05 / readings.Length")]
    [InlineData("bool found = false; Parallel.ForEach(readings, r => { if (Permutation.PValue(r, warped) < 0.05) found = true; }); return found;", "0.05 / readings.Length")]
    [InlineData("var found = new List<int>(); for (int k = 0; k < 12; k++) { if (Permutation.PValue(readings[k], warped) < 0.05) found.Add(k); } return found.Count > 0;", "0.05 / 12")]
    public async Task EveryWayOfGoingThroughTheTests(string statement, string level)
    {
        string program = Program(statement, "bool");
        Assert.Equal(program.Replace("< 0.05", "< " + level, StringComparison.Ordinal), await Mended.AllAsync(Of(program, Libraries.None), Rule));
    }

    [Fact]
    public async Task NestedGridsCountAsTheirProduct()
    {
        string program = Program("""
            int[] lags = [1, 2, 3];
            foreach (double[] reading in readings)
            {
                foreach (int lag in lags)
                {
                    double p = Permutation.PValue(reading[lag..], warped[lag..]);
                    if (p < 0.05)
                        Console.WriteLine(lag);
                }
            }
            """);
        Assert.Contains("if (p < 0.05 / (readings.Length * lags.Length))", await Mended.AllAsync(Of(program, Libraries.None), Rule));
        Assert.Contains("if (p < Thresholds.Bonferroni(0.05, readings.Length * lags.Length))", await Mended.AllAsync(Of(program, Libraries.Tare), Rule));
    }

    [Fact]
    public async Task LevelInAField()
    {
        string program = """
            internal sealed class Screening(double[][] readings, bool[] warped)
            {
                private readonly double _level = 0.01;

                public IEnumerable<int> Found()
                {
                    for (int i = 0; i < readings.Length; i++)
                    {
                        if (Permutation.PValue(readings[i], warped) < _level)
                            yield return i;
                    }
                }
            }
            """;
        Assert.Contains("< _level / readings.Length)", await Mended.AllAsync(Of(program, Libraries.None), Rule));
    }

    [Fact]
    public async Task UsingComesInOnceAndInOrder()
    {
        string program = "// Which readings tell warping boards apart?\nusing System.Globalization;\nusing Zones;\n\n" + Program("""
            foreach (double[] reading in readings)
            {
                if (Permutation.PValue(reading, warped) < 0.05)
                    Console.WriteLine(reading.Length);
            }

            bool any = readings.Any(r => Permutation.PValue(r, warped) < 0.01);
            Console.WriteLine(any);
            """) + "\nnamespace Zones { }\n";
        string mended = await Mended.AllAsync(Of(program, Libraries.Tare), Rule);
        Assert.StartsWith("// Which readings tell warping boards apart?\nusing System.Globalization;\nusing Tare;\nusing Zones;\n\n", mended);
        Assert.Equal(1, mended.Split("using Tare;").Length - 1);
    }

    [Fact]
    public async Task OwnTypeOfTheSameNameIsLeftAlone()
    {
        string program = Program("""
            foreach (double[] reading in readings)
            {
                if (Permutation.PValue(reading, warped) < 0.05)
                    Console.WriteLine(reading.Length);
            }
            """) + "\ninternal static class Thresholds { }\n";
        string mended = await Mended.AllAsync(Of(program, Libraries.Tare), Rule);
        Assert.Contains("< Tare.Thresholds.Bonferroni(0.05, readings.Length))", mended);
        Assert.DoesNotContain("using Tare;", mended);
    }

    [Fact]
    public async Task WindowsLineEndsStay()
    {
        string program = Program("foreach (double[] reading in readings)\n{\n    if (Permutation.PValue(reading, warped) < 0.05)\n        Console.WriteLine(reading.Length);\n}").Replace("\r\n", "\n", StringComparison.Ordinal).Replace("\n", "\r\n", StringComparison.Ordinal);
        string mended = await Mended.AllAsync(Of(program, Libraries.Tare), Rule);
        Assert.Equal(mended.Split('\n').Length, mended.Split("\r\n").Length);
    }

    [Theory]
    [InlineData(Libraries.None, "< 1 - Math.Pow(1 - 0.05, 1.0 / readings.Length))")]
    [InlineData(Libraries.Tare, "< Thresholds.Sidak(0.05, readings.Length))")]
    public async Task SidakWhereTheProjectAsksForIt(Libraries libraries, string expected)
    {
        var project = Of(Program("foreach (double[] r in readings) { if (Permutation.PValue(r, warped) < 0.05) Console.WriteLine(r.Length); }"), libraries).ToProject();
        var found = Assert.Single(await Analysis.FindAsync(project));
        var asked = Diagnostic.Create(
            found.Descriptor, found.Location, found.AdditionalLocations, found.Properties.SetItem("tare.correction", "sidak"), found.GetMessage());
        var mended = await Fixes.ApplyAsync(project, Assert.Single(await Fixes.OfferedAsync(project, asked)));
        Assert.Contains(expected, await Fixes.TextAsync(mended));
        Assert.Empty(await Analysis.FindAsync(mended));
    }

    [Fact]
    public async Task LinkedDocumentUsesOnlyWhatEveryTargetHas()
    {
        string program = Program("foreach (double[] r in readings) { if (Permutation.PValue(r, warped) < 0.05) Console.WriteLine(r.Length); }");
        var project = Of(program, Libraries.Tare).ToProject();
        // the same files again, in a target without the runtime library
        var other = project.Solution.AddProject("Other", "Other", LanguageNames.CSharp).WithMetadataReferences(LibraryReferences.Of(Libraries.None))
            .WithCompilationOptions(project.CompilationOptions!).WithParseOptions(project.ParseOptions!);
        foreach (var document in project.Documents)
            other = other.AddDocument(document.Name, await document.GetTextAsync(), filePath: document.FilePath).Project;
        project = other.Solution.GetProject(project.Id)!;
        var finding = Assert.Single(await Analysis.FindAsync(project));
        var mended = await Fixes.ApplyAsync(project, Assert.Single(await Fixes.OfferedAsync(project, finding)));
        Assert.Contains("< 0.05 / readings.Length)", await Fixes.TextAsync(mended));
    }

    [Theory]
    // going through the sequence again would run the tests again
    [InlineData("foreach (double[] r in streamed) { if (Permutation.PValue(r, warped) < 0.05) Console.WriteLine(r.Length); }")]
    // the list shrinks while it is gone through
    [InlineData("for (int i = 0; i < left.Count; i++) { if (Permutation.PValue(left[i], warped) > 0.05) left.RemoveAt(i--); }")]
    // an arm of a switch takes constants only
    [InlineData("foreach (double[] r in readings) Console.WriteLine(Permutation.PValue(r, warped) switch { < 0.05 => \"tells\", _ => \"silent\" });")]
    public Task NotOfferedWhereUnsound(string statement) => Mended.OffersNothingAsync(Of(Program(statement), Libraries.Tare), Rule);

    private static TestProgram Of(string program, Libraries libraries) => new([("Program.cs", program), ("Permutation.cs", Permutation)]) { Libraries = libraries };

    private static string Program(string statements, string returns = "void") =>
        $$"""
        internal static class Screening
        {
            private const double Alpha = 0.05;

            private static {{returns}} Run(double[][] readings, bool[] warped, double alpha, IEnumerable<double[]> streamed, List<double[]> left)
            {
        {{statements}}
            }
        }
        """;
}
