using Microsoft.CodeAnalysis;
using Tare.Analyzers.Tests.Infrastructure;
using Tare.Analyzers.Tests.LabelledPrograms;
using Tare.CodeFixes.Choice;

namespace Tare.Analyzers.Tests.Rules.Choice.ChosenOnTestRows;

[Collection(ConsoleCollection.Name)]
public class ChosenOnTestRowsFixTests
{
    private const string Rule = "TARE101";

    /// <summary>Each form of choosing among six candidates.</summary>
    public static TheoryData<string> Choices => new(Forms.Keys);

    private static readonly Dictionary<string, string> Forms = new()
    {
        ["foreach, model and score kept"] =
            """
            int best = 0;
            double bestAccuracy = -1;
            Func<double[], int> bestModel = _ => 0;
            foreach (int k in new[] { 1, 3, 5, 7, 9, 11 })
            {
                var model = Mill.Fit(trainX, trainY, k);
                double accuracy = Mill.Accuracy(model, testX, testY);
                if (accuracy > bestAccuracy)
                {
                    bestAccuracy = accuracy;
                    best = k;
                    bestModel = model;
                }
            }
            Console.WriteLine("chosen=" + best);
            Console.WriteLine($"{bestAccuracy:P1}; the first board: {bestModel(trainX[0])}");
            """,
        ["for, only a text kept"] =
            """
            string best = "";
            double lowest = 2;
            for (int k = 1; k < 12; k += 2)
            {
                var loss = 1 - Mill.Accuracy(Mill.Fit(trainX, trainY, k), testX, testY);
                if (loss < lowest)
                {
                    lowest = loss;
                    best = k + " neighbours";
                }
            }
            Console.WriteLine("chosen=" + best);
            Console.WriteLine(lowest);
            """,
        ["while, left with continue"] =
            """
            int best = 0, k = -1;
            double highest = -1;
            while (k < 11)
            {
                k += 2;
                double accuracy = Mill.Accuracy(Mill.Fit(trainX, trainY, k), testX, testY);
                if (accuracy <= highest)
                    continue;
                (best, highest) = (k, accuracy);
            }
            Console.WriteLine("chosen=" + best);
            Console.WriteLine(highest);
            """,
        ["list ordered"] =
            """
            var results = new List<(int K, double Accuracy)>();
            foreach (int k in new[] { 1, 3, 5, 7, 9, 11 })
                results.Add((k, Mill.Accuracy(Mill.Fit(trainX, trainY, k), testX, testY)));
            var best = results.OrderByDescending(r => r.Accuracy).First();
            Console.WriteLine($"chosen={best.K}");
            Console.WriteLine(best.Accuracy);
            """,
        ["list sorted"] =
            """
            var results = new List<(int K, double Accuracy)>();
            foreach (int k in new[] { 1, 3, 5, 7, 9, 11 })
                results.Add((k, Mill.Accuracy(Mill.Fit(trainX, trainY, k), testX, testY)));
            results.Sort((a, b) => b.Accuracy.CompareTo(a.Accuracy));
            Console.WriteLine($"chosen={results[0].K}");
            Console.WriteLine(results[0].Accuracy);
            """,
        ["MaxBy over candidates"] =
            """
            int[] ks = [1, 3, 5, 7, 9, 11];
            int best = ks.MaxBy(k => Mill.Accuracy(Mill.Fit(trainX, trainY, k), testX, testY));
            Console.WriteLine($"chosen={best}");
            """,
        ["Select and deconstruction"] =
            """
            int[] ks = [1, 3, 5, 7, 9, 11];
            var (best, accuracy) = ks.Select(k => (k, Mill.Accuracy(Mill.Fit(trainX, trainY, k), testX, testY))).MaxBy(r => r.Item2);
            Console.WriteLine($"chosen={best}");
            Console.WriteLine(accuracy);
            """,
        ["query"] =
            """
            int[] ks = [1, 3, 5, 7, 9, 11];
            var top = (from k in ks
                       let model = Mill.Fit(trainX, trainY, k)
                       let accuracy = Mill.Accuracy(model, testX, testY)
                       orderby accuracy descending
                       select new { K = k, Model = model, Accuracy = accuracy }).First();
            Console.WriteLine("chosen=" + top.K);
            Console.WriteLine($"{top.Accuracy}; the first board: {top.Model(trainX[0])}");
            """,
        ["dictionary"] =
            """
            var scores = new Dictionary<int, double>();
            foreach (int k in new[] { 1, 3, 5, 7, 9, 11 })
                scores[k] = Mill.Accuracy(Mill.Fit(trainX, trainY, k), testX, testY);
            var best = scores.MaxBy(p => p.Value);
            Console.WriteLine("chosen=" + best.Key);
            Console.WriteLine(best.Value);
            """,
        ["index of the highest"] =
            """
            int[] ks = [1, 3, 5, 7, 9, 11];
            double[] scores = new double[ks.Length];
            for (int i = 0; i < ks.Length; i++)
                scores[i] = Mill.Accuracy(Mill.Fit(trainX, trainY, ks[i]), testX, testY);
            double top = scores.Max();
            int at = Array.IndexOf(scores, top);
            Console.WriteLine("chosen=" + ks[at]);
            Console.WriteLine(top);
            """,
        ["local function that captures the rows"] =
            """
            double Evaluate(int k)
            {
                var model = Mill.Fit(trainX, trainY, k);
                return Mill.Accuracy(model, testX, testY);
            }

            int best = 0;
            double bestAccuracy = -1;
            foreach (int k in new[] { 1, 3, 5, 7, 9, 11 })
            {
                double accuracy = Evaluate(k);
                if (accuracy > bestAccuracy)
                    (best, bestAccuracy) = (k, accuracy);
            }
            Console.WriteLine("chosen=" + best);
            Console.WriteLine(bestAccuracy);
            """,
        ["helper that chooses"] =
            """
            int best = Choose([1, 3, 5, 7, 9, 11], trainX, trainY, testX, testY);
            Console.WriteLine("chosen=" + best);

            static int Choose(int[] ks, double[][] x, int[] y, double[][] otherX, int[] otherY)
            {
                int best = 0;
                double highest = -1;
                foreach (int k in ks)
                {
                    double accuracy = Mill.Accuracy(Mill.Fit(x, y, k), otherX, otherY);
                    if (accuracy > highest)
                        (best, highest) = (k, accuracy);
                }
                return best;
            }
            """,
    };

    [Theory]
    [MemberData(nameof(Choices))]
    public async Task Test_rows_no_longer_choose(string form) => await MendTests.CheckAsync(KilnProgram.Of(Forms[form]).ToProject());

    [Theory]
    [MemberData(nameof(Choices))]
    public async Task Every_candidate_is_fitted_once_and_the_winner_once_more(string form)
    {
        var project = KilnProgram.Of(Forms[form]).ToProject();
        Assert.Contains("counts=6 fits, 6 test scores", await (await CompiledProgram.CompileAsync(project)).RunAsync("0"));
        Assert.Contains("counts=7 fits, 1 test scores", await (await MendedAsync(project)).RunAsync("0"));
    }

    [Theory]
    [MemberData(nameof(Choices))]
    public async Task Held_out_rows_choose(string form)
    {
        var mended = await MendedAsync(KilnProgram.Of(Forms[form]).ToProject());
        var winners = new HashSet<string>();
        for (int late = 1; late <= 8; late++)
            winners.Add(Chosen(await mended.RunAsync("0", $"{late}")));
        Assert.True(winners.Count > 1, "The winner is the same whatever the held-out labels are.");
    }

    [Theory]
    [MemberData(nameof(Choices))]
    public async Task Planted_best_candidate_is_found(string form)
    {
        string winner = Chosen(await (await MendedAsync(KilnProgram.Of(Forms[form]).ToProject())).RunAsync("0", "0", "planted"));
        Assert.Equal("1", winner.Split(' ')[0]);
    }

    [Theory]
    [InlineData("smallAccuracy > largeAccuracy ? \"small\" : \"large\"")]
    [InlineData("largeAccuracy >= smallAccuracy ? \"large\" : \"small\"")]
    public async Task Better_of_two_is_fitted_and_scored_once_more(string choice)
    {
        var project = KilnProgram.Of(
            $"""
            double smallAccuracy = Mill.Accuracy(Mill.Fit(trainX, trainY, 1), testX, testY);
            double largeAccuracy = Mill.Accuracy(Mill.Fit(trainX, trainY, 9), testX, testY);
            var name = {choice};
            Console.WriteLine("chosen=" + name);
            Console.WriteLine(Math.Max(smallAccuracy, largeAccuracy));
            """).ToProject();
        await MendTests.CheckAsync(project);
        var mended = await MendedAsync(project);
        Assert.Contains("counts=3 fits, 1 test scores", await mended.RunAsync("0"));
        Assert.Equal("small", Chosen(await mended.RunAsync("0", "0", "planted")));
    }

    [Fact]
    public async Task Validation_rows_in_scope_choose()
    {
        var project = KilnProgram.Of(
            """
            double[][] validX = Mill.Boards(40, 5, false);
            int[] validY = Mill.Warped(40, 6, false);
            int best = 0;
            double bestAccuracy = -1;
            Console.WriteLine(validX.Length + validY.Length);
            foreach (int k in new[] { 1, 3, 5, 7, 9, 11 })
            {
                double accuracy = Mill.Accuracy(Mill.Fit(trainX, trainY, k), testX, testY);
                if (accuracy > bestAccuracy)
                    (best, bestAccuracy) = (k, accuracy);
            }
            Console.WriteLine("chosen=" + best);
            Console.WriteLine(bestAccuracy);
            """).ToProject();
        await MendTests.CheckAsync(project);
        string text = await Fixes.TextAsync(await Fixes.ApplyFirstAsync(project, Rule));
        Assert.Contains("double accuracy = Mill.Accuracy(Mill.Fit(trainX, trainY, k), validX, validY);", text);
        Assert.Contains("double testAccuracy = Mill.Accuracy(Mill.Fit(trainX, trainY, best), testX, testY);", text);
        Assert.DoesNotContain("HoldOut", text);
    }

    [Fact]
    public async Task Comments_layout_and_names_stay()
    {
        var project = KilnProgram.Of(
            """
            // the best so far
            int best = 0;
            double bestAccuracy = -1;

            // odd numbers only, so that no vote is tied
            foreach (int k in new[] { 1, 3, 5 })
            {
                var model = Mill.Fit(trainX, trainY, k); // a vote of the nearest
                double accuracy = Mill.Accuracy(model, testX, testY);
                if (accuracy > bestAccuracy)
                {
                    bestAccuracy = accuracy;
                    best = k; // remember
                }
            }

            // tell
            Console.WriteLine($"chosen={best}, {bestAccuracy:F3}");
            """).ToProject();
        string text = await Fixes.TextAsync(await Fixes.ApplyFirstAsync(project, Rule));
        Assert.Contains(
            """
            // the best so far
            int best = 0;
            double bestAccuracy = -1;

            var (fitX, fitY, validX, validY) = HoldOut.Tail(trainX, trainY, share: 0.25);
            // odd numbers only, so that no vote is tied
            foreach (int k in new[] { 1, 3, 5 })
            {
                var model = Mill.Fit(fitX, fitY, k); // a vote of the nearest
                double accuracy = Mill.Accuracy(model, validX, validY);
                if (accuracy > bestAccuracy)
                {
                    bestAccuracy = accuracy;
                    best = k; // remember
                }
            }

            var winner = Mill.Fit(trainX, trainY, best);
            double testAccuracy = Mill.Accuracy(winner, testX, testY);
            // tell
            Console.WriteLine($"chosen={best}, {testAccuracy:F3}");
            """,
            text);
    }

    [Fact]
    public async Task Base_library_is_enough()
    {
        var project = (KilnProgram.Of(Forms["list ordered"]) with { Libraries = Libraries.None }).ToProject();
        await MendTests.CheckAsync(project);
        string text = await Fixes.TextAsync(await Fixes.ApplyFirstAsync(project, Rule));
        Assert.Contains("var fitX = trainX[..fitCount];", text);
        Assert.DoesNotContain("using Tare;", text);
    }

    [Fact]
    public async Task All_choices_of_a_document_are_fixed_at_once()
    {
        const string two =
            """
            public static class Studies
            {
                public static int First(double[][] trainX, int[] trainY, double[][] testX, int[] testY)
                {
                    int best = 0;
                    double bestAccuracy = -1;
                    for (int k = 1; k < 9; k += 2)
                    {
                        double accuracy = Accuracy(trainX, trainY, k, testX, testY);
                        if (accuracy > bestAccuracy)
                        {
                            bestAccuracy = accuracy;
                            best = k;
                        }
                    }
                    Console.WriteLine(bestAccuracy);
                    return best;
                }

                public static int Second(double[][] trainX, int[] trainY, double[][] testX, int[] testY)
                {
                    int best = 0;
                    double lowest = 2;
                    foreach (int k in new[] { 1, 3, 5 })
                    {
                        double loss = 1 - Accuracy(trainX, trainY, k, testX, testY);
                        if (loss < lowest)
                            (best, lowest) = (k, loss);
                    }
                    return best;
                }

                private static double Accuracy(double[][] x, int[] y, int k, double[][] otherX, int[] otherY) =>
                    otherX.Select((b, i) => x.Take(k).Average(r => r[0]) > b[0] == y[0] + otherY[i] > 1 ? 1.0 : 0.0).Average();
            }
            """;
        var project = (new TestProgram(two) with { Libraries = Libraries.Tare }).ToProject();
        Assert.Equal(2, (await Analysis.FindAsync(project)).Count(d => d.Id == Rule));
        var mended = await Fixes.ApplyToAllAsync(project, Rule);
        Assert.DoesNotContain(await Analysis.FindAsync(mended), d => d.Id == Rule);
        string text = await Fixes.TextAsync(mended);
        Assert.Equal(2, text.Split("HoldOut.Tail(trainX, trainY, share: 0.25)").Length - 1);
        Assert.Equal(1, text.Split("using Tare;").Length - 1);
    }

    [Fact]
    public async Task Key_has_no_identifier_and_title_has()
    {
        var project = KilnProgram.Of(Forms["list ordered"]).ToProject();
        var finding = (await Analysis.FindAsync(project)).First(d => d.Id == Rule);
        var action = Assert.Single(await Fixes.OfferedAsync(project, finding), a => a.EquivalenceKey == ChosenOnTestRowsFix.EquivalenceKey);
        Assert.Equal("Choose on rows held out of 'trainX'", action.Title);
    }

    /// <summary>A search that goes on from the best so far has no turn that could run again by itself.</summary>
    [Fact]
    public async Task Nothing_is_offered_where_the_turn_depends_on_the_best_so_far()
    {
        var project = KilnProgram.Of(
            """
            int best = 1;
            double bestAccuracy = -1;
            Func<double[], int> bestModel = _ => 0;
            for (int step = 0; step < 5; step++)
            {
                var corrected = trainY.Select((y, i) => y == bestModel(trainX[i]) ? y : 1 - y).ToArray();
                var model = Mill.Fit(trainX, corrected, 2 * step + 1);
                double accuracy = Mill.Accuracy(model, testX, testY);
                if (accuracy > bestAccuracy)
                {
                    bestAccuracy = accuracy;
                    bestModel = model;
                    best = step;
                }
            }
            Console.WriteLine("chosen=" + best);
            """).ToProject();
        foreach (var finding in (await Analysis.FindAsync(project)).Where(d => d.Id == Rule))
            Assert.DoesNotContain(await Fixes.OfferedAsync(project, finding), a => a.EquivalenceKey == ChosenOnTestRowsFix.EquivalenceKey);
    }

    private static async Task<CompiledProgram> MendedAsync(Project project) => await CompiledProgram.CompileAsync(await Fixes.ApplyFirstAsync(project, Rule));

    private static string Chosen(string output) => output.Split('\n').First(l => l.StartsWith("chosen=", StringComparison.Ordinal))["chosen=".Length..].Trim();
}
