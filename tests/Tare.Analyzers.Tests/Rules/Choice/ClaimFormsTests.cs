using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Rules.Choice;

/// <summary>TARE101, TARE102 and TARE108 over the forms of loops and queries, with the numbers they must state.</summary>
public class ClaimFormsTests
{
    // 1 - 0.95^K and 0.05 / K rounded down; common values for level 0.05 (1 - 0.95^3 = 0.142625, ^4 = 0.185494, ^10 = 0.401263).
    [Theory]
    [InlineData("foreach (int k in new[] { 1, 3, 5 }) { BODY }", "3", "14.3 %", "0.0166")]
    [InlineData("int[] grid = [1, 3, 5, 9]; foreach (int k in grid) { BODY }", "4", "18.5 %", "0.0125")]
    [InlineData("for (int k = 1; k <= 19; k += 2) { BODY }", "10", "40.1 %", "0.005")]
    [InlineData("for (int k = 10; k > 0; k--) { BODY }", "10", "40.1 %", "0.005")]
    [InlineData("int k = 1; while (k < 11) { BODY k++; }", "10", "40.1 %", "0.005")]
    [InlineData("int k = 1; do { BODY k += 2; } while (k < 20);", "10", "40.1 %", "0.005")]
    [InlineData("foreach (int k in Enumerable.Range(1, 10)) { BODY }", "10", "40.1 %", "0.005")]
    [InlineData("for (int a = 1; a <= 5; a++) for (int b = 0; b < 2; b++) { int k = a + b; BODY }", "10", "40.1 %", "0.005")]
    public async Task MessagesCountTheCandidates(string loop, string size, string odds, string level)
    {
        string body = """
            double accuracy = NearestBoards.Fit(trainX, trainY, k).Accuracy(testX, testY);
            if (accuracy > best) { best = accuracy; chosen = k; }
            """;
        var found = await Analysis.FindAsync(Nearest.Of($$"""
            double best = 0; int chosen = 0;
            {{loop.Replace("BODY", body, StringComparison.Ordinal)}}
            Console.WriteLine($"{chosen}: {best}");
            """));
        foreach (string rule in new[] { "TARE101", "TARE102" })
        {
            var finding = Assert.Single(found, d => d.Id == rule);
            string message = finding.GetMessage(System.Globalization.CultureInfo.InvariantCulture);
            Assert.Contains($" {size} ", message);
            Assert.Contains($"probability {odds} when they are independent", message);
            Assert.Contains($"p <= {level} of each", message);
            Assert.Contains("'testX'", message);
            Assert.Equal(size, finding.Properties["tare.k"]);
        }
    }

    [Fact]
    public Task LambdasQueriesAndParallelLoops() => Labelled.Check(Nearest.Of("""
        int[] grid = [1, 3, 5, 9];
        var one = grid.Select(k => (k, Accuracy: NearestBoards.Fit(trainX, trainY, k).Accuracy(testX, testY))).OrderByDescending(r => r.Accuracy).First(); // ! TARE101
        Console.WriteLine(one.Accuracy); // ! TARE102
        var two = (from k in grid let accuracy = NearestBoards.Fit(trainX, trainY, k).Accuracy(testX, testY) orderby accuracy descending select (k, accuracy)).First(); // ! TARE101
        Console.WriteLine(two.accuracy); // ! TARE102
        var accuracies = new double[grid.Length];
        Parallel.For(0, grid.Length, i => accuracies[i] = NearestBoards.Fit(trainX, trainY, grid[i]).Accuracy(testX, testY));
        int at = Array.IndexOf(accuracies, accuracies.Max()); // ! TARE101
        Console.WriteLine(accuracies[at]); // ! TARE102
        """));

    [Fact]
    public Task StraightLine() => Labelled.Check(Nearest.Of("""
        double few = NearestBoards.Fit(trainX, trainY, 3).Accuracy(testX, testY);
        double many = NearestBoards.Fit(trainX, trainY, 15).Accuracy(testX, testY);
        int chosen = few > many ? 3 : 15; // ! TARE101
        Console.WriteLine(chosen);
        """));

    [Fact]
    public Task ChoosingScoreOfValidationRows() => Labelled.Check(Nearest.Of("""
        double best = 0; int chosen = 0;
        for (int k = 1; k < 20; k += 2)
        {
            double accuracy = NearestBoards.Fit(trainX, trainY, k).Accuracy(validationX, validationY);
            if (accuracy > best) { best = accuracy; chosen = k; }
        }

        Console.WriteLine($"{chosen}: {best}"); // ! TARE108
        """));

    [Fact]
    public Task WinnerJudgedOnUntouchedRows() => Labelled.Check(Nearest.Of("""
        double best = 0; int chosen = 0;
        for (int k = 1; k < 20; k += 2)
        {
            double accuracy = NearestBoards.Fit(trainX, trainY, k).Accuracy(validationX, validationY);
            if (accuracy > best) { best = accuracy; chosen = k; }
        }

        Console.WriteLine($"{chosen}: {best} while choosing, {NearestBoards.Fit(trainX, trainY, chosen).Accuracy(testX, testY)} on test boards");
        """));

    [Fact]
    public async Task ClaimOfTheLibraryIsNoRawScore() => await Labelled.Check(Nearest.Of("""
        double best = new[] { 1, 3, 5 }.Max(k => NearestBoards.Fit(trainX, trainY, k).Accuracy(testX, testY));
        Console.WriteLine(Tare.Claim.Accuracy(best, testX.Length, earlierLooks: 3));
        Tare.Verdict verdict = Tare.Claim.Accuracy(best, testX.Length, candidates: 3);
        Console.WriteLine($"{verdict.Value} on {verdict.Rows} boards");
        """));

    [Fact]
    public async Task HelperInAnotherDocument()
    {
        var program = Nearest.Of("Search.Report(trainX, trainY, testX, testY);");
        program = program with
        {
            Documents = program.Documents.Add(("Search.cs", """
                internal static class Search
                {
                    public static void Report(double[][] trainX, bool[] trainY, double[][] testX, bool[] testY)
                    {
                        double best = 0;
                        int chosen = 0;
                        foreach (int k in new[] { 1, 3, 5 })
                        {
                            double accuracy = NearestBoards.Fit(trainX, trainY, k).Accuracy(testX, testY);
                            if (accuracy > best) // ! TARE101
                            {
                                best = accuracy;
                                chosen = k;
                            }
                        }

                        Console.WriteLine($"{chosen}: {best}"); // ! TARE102
                    }
                }
                """)),
        };
        await Labelled.Check(program);
    }

    [Fact]
    public async Task GeneratedCodeIsNotReported()
    {
        var program = Nearest.Of("double best = new[] { 1, 3 }.Max(k => NearestBoards.Fit(trainX, trainY, k).Accuracy(testX, testY)); Console.WriteLine(best);");
        Assert.NotEmpty(await Analysis.FindAsync(program));
        program = program with { Documents = program.Documents.SetItem(0, ("Program.g.cs", "// <auto-generated/>\n" + program.Documents[0].Text)) };
        Assert.Empty(await Analysis.FindAsync(program));
    }

    [Fact]
    public async Task UnfinishedCodeDoesNoHarm()
    {
        string text = Nearest.Of("""
            double best = 0; int chosen = 0;
            foreach (int k in new[] { 1, 3, 5 })
            {
                double accuracy = NearestBoards.Fit(trainX, trainY, k).Accuracy(testX, testY);
                if (accuracy > best) { best = accuracy; chosen = k; }
            }

            Console.WriteLine($"{chosen}: {best:P1}");
            """).Documents[0].Text;
        for (int length = 0; length < text.Length; length += 17)
        {
            var program = new TestProgram([("Program.cs", text[..length]), ("Nearest.cs", Nearest.Model)]) { Libraries = Libraries.Tare, AllowErrors = true };
            var project = program.ToProject();
            foreach (var finding in await Analysis.FindAsync(project, allowErrors: true))
                await Fixes.OfferedAsync(project, finding);
        }
    }
}
