using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Rules.Choice;

/// <summary>The fix of TARE102: the runtime library's claim in place of the raw score.</summary>
[Collection(ConsoleCollection.Name)]
public class WinnerScoreClaimedFixTests
{
    private const string Rule = "TARE102";
    private const string Claimed = "Claim.Accuracy(best, testX.Length, earlierLooks: grid.Length)";

    private const string Loop = """
        double[] grid = [0.5, 0.75, 1, 1.25];
        double best = 0, chosen = 0;
        foreach (double strength in grid)
        {
            double accuracy = Model.Fit(trainX, trainY, strength).Accuracy(testX, testY);
            if (accuracy > best)
            {
                best = accuracy;
                chosen = strength;
            }
        }

        """;

    [Theory]
    [InlineData("""Console.WriteLine($"{chosen}: {best:P1} of {testX.Length}");""", """Console.WriteLine($"{chosen}: {CLAIM} of {testX.Length}");""")]
    [InlineData("""Console.WriteLine($"{best,8:F3} accuracy"); // for the office""", """Console.WriteLine($"{CLAIM} accuracy"); // for the office""")]
    [InlineData("""Console.WriteLine($"accuracy {best * 100:F1} % of boards");""", """Console.WriteLine($"accuracy {CLAIM} of boards");""")]
    [InlineData("""Console.WriteLine($"accuracy {Math.Round(best, 3)}");""", """Console.WriteLine($"accuracy {CLAIM}");""")]
    [InlineData("""Console.WriteLine("accuracy " + best.ToString("F3") + " at " + chosen);""", """Console.WriteLine("accuracy " + CLAIM + " at " + chosen);""")]
    [InlineData("""Console.WriteLine("accuracy {0:F3} at {1:F2}", best, chosen);""", """Console.WriteLine("accuracy {0} at {1:F2}", CLAIM, chosen);""")]
    [InlineData("""Console.WriteLine(best);""", """Console.WriteLine(CLAIM);""")]
    [InlineData("""Console.Out.WriteLine(best.ToString("P1"));""", """Console.Out.WriteLine(CLAIM);""")]
    [InlineData("""File.WriteAllText("accuracy.txt", best.ToString());""", """File.WriteAllText("accuracy.txt", CLAIM.ToString());""")]
    [InlineData("""string line = $"accuracy {best:F3}"; Console.WriteLine(line);""", """string line = $"accuracy {CLAIM}"; Console.WriteLine(line);""")]
    [InlineData("""Console.WriteLine(string.Format("accuracy {0:F3}", /* of the winner */ best));""", """Console.WriteLine(string.Format("accuracy {0}", /* of the winner */ CLAIM));""")]
    public async Task ClaimTakesThePlaceOfTheNumber(string before, string after)
    {
        var program = Of(Loop + before);
        string text = program.Documents[0].Text;
        string expected = "using Tare;\n\n" + text.Replace(before, after.Replace("CLAIM", Claimed, StringComparison.Ordinal), StringComparison.Ordinal);
        Assert.Equal(expected, await Mended.AllAsync(program, Rule));
    }

    [Theory]
    [InlineData("""
        int[] grid = [1, 3, 5, 9];
        var results = new List<(int Strength, double Accuracy)>();
        foreach (int s in grid) results.Add((s, NearestBoards.Fit(trainX, trainY, s).Accuracy(testX, testY)));
        var best = results.OrderByDescending(r => r.Accuracy).First();
        Console.WriteLine($"{best.Strength}: {best.Accuracy:F3}");
        """, "{best.Strength}: {Claim.Accuracy(best.Accuracy, testX.Length, earlierLooks: grid.Length)}")]
    [InlineData("""
        Setting[] tried = [new(1, 0.5), new(2, 0.5), new(3, 1.5)];
        var winner = tried.Select(s => new { s.Depth, Share = NearestBoards.Fit(trainX, trainY, s.Depth).Accuracy(testX, testY) }).MaxBy(r => r.Share)!;
        Console.WriteLine($"{winner.Depth}: {winner.Share:P0}");
        """, "{winner.Depth}: {Claim.Accuracy(winner.Share, testX.Length, earlierLooks: tried.Length)}")]
    [InlineData("""
        double best = new[] { 1, 3, 5 }.Max(s => NearestBoards.Fit(trainX, trainY, s).Accuracy(testX, testY));
        Console.WriteLine($"best of 3: {best:F2}");
        """, "best of 3: {Claim.Accuracy(best, testX.Length, earlierLooks: 3)}")]
    [InlineData("""
        double lowest = 1;
        for (int k = 1; k <= 24; k++)
        {
            var model = Model.Fit(trainBoards, k / 24.0);
            int wrong = 0;
            foreach (var board in testBoards)
            {
                if (model.Predict(board.Readings) != board.Warped)
                    wrong++;
            }

            lowest = Math.Min(lowest, wrong / (double)testBoards.Count);
        }

        Console.WriteLine($"error {lowest:F3}");
        """, "error {Claim.Accuracy(lowest, testBoards.Count, earlierLooks: 24, metric: \"error rate\")}")]
    public async Task TheShareIsTracedToTheRowsItCounts(string statements, string expected) =>
        Assert.Contains(expected, await Mended.AllAsync(Nearest.Of(statements), Rule));

    [Theory]
    // a mean of losses is no count of rows
    [InlineData("var best = new[] { 1, 3, 5 }.Select(s => (s, Loss: NearestBoards.Fit(trainX, trainY, s).Loss(testX, testY))).MinBy(r => r.Loss); Console.WriteLine(best.Loss);")]
    // percent would be taken for a share
    [InlineData("double best = new[] { 1, 3, 5 }.Max(s => 100 * NearestBoards.Fit(trainX, trainY, s).Accuracy(testX, testY)); Console.WriteLine(best);")]
    // a mean of two shares is no share of one set of rows
    [InlineData("double best = new[] { 1, 3, 5 }.Max(s => (NearestBoards.Fit(trainX, trainY, s).Accuracy(testX, testY) + NearestBoards.Fit(trainX, trainY, s + 2).Accuracy(testX, testY)) / 2); Console.WriteLine(best);")]
    public Task NotOfferedForWhatCannotBeCounted(string statements) => Mended.OffersNothingAsync(Nearest.Of(statements), Rule);

    [Fact]
    public Task NotOfferedWithoutTheLibrary() => Mended.OffersNothingAsync(Of(Loop + "Console.WriteLine(best);") with { Libraries = Libraries.None }, Rule);

    [Fact]
    public async Task OwnTypeOfTheSameNameIsLeftAlone()
    {
        var program = Of(Loop + "Console.WriteLine($\"{best:F3}\");");
        program = program with { Documents = program.Documents.Add(("Claim.cs", "internal sealed record Claim(string Customer, int Board);")) };
        string mended = await Mended.AllAsync(program, Rule);
        Assert.Contains("{Tare." + Claimed + "}", mended);
        Assert.DoesNotContain("using Tare;", mended);
    }

    [Fact]
    public async Task SeveralDocumentsAreMendedAtOnce()
    {
        var program = Of(Loop + "Console.WriteLine(best);");
        program = program with { Documents = program.Documents.Add(("Other.cs", program.Documents[0].Text.Replace("class Program", "class Other", StringComparison.Ordinal))) };
        Assert.Contains(Claimed, await Mended.AllAsync(program, Rule));
        Assert.Contains(Claimed, await Mended.AllAsync(program, Rule, "Other.cs"));
    }

    [Fact]
    public async Task MendedProgramRunsAndPrintsTheClaim()
    {
        var program = new TestProgram("""
            bool[] warped = [.. Enumerable.Range(0, 40).Select(i => i % 2 == 0)];
            bool[] testWarped = warped[20..];
            double best = 0;
            int chosen = 0;
            foreach (int step in new[] { 2, 3, 5 })
            {
                int right = 0;
                for (int i = 0; i < testWarped.Length; i++)
                {
                    if ((i % step == 0) == testWarped[i])
                        right++;
                }

                double accuracy = right / (double)testWarped.Length;
                if (accuracy > best)
                {
                    best = accuracy;
                    chosen = step;
                }
            }

            Console.WriteLine($"{chosen}: {best:P1}");
            """)
        { Libraries = Libraries.All };
        var mended = await Fixes.ApplyFirstAsync(program.ToProject(), Rule);
        string printed = await (await CompiledProgram.CompileAsync(mended)).RunAsync();
        Assert.Contains("on 20 rows", printed);
        Assert.Contains("3", printed);
    }

    private static TestProgram Of(string statements) => ModelProgram.Of(statements) with { Libraries = Libraries.Tare };
}
