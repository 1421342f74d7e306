namespace Tare.Analyzers.Tests.Rules.Choice;

/// <summary>TARE101 where fit, score and choice stand in one method, in the forms that people write.</summary>
public class ChosenOnTestRowsTests
{
    [Fact]
    public Task ForEachWithIf() => ModelProgram.Check("""
        double best = 0, chosen = 0;
        foreach (double strength in strengths)
        {
            double accuracy = Model.Fit(trainX, trainY, strength).Accuracy(testX, testY);
            if (accuracy > best) // ! TARE101
            {
                best = accuracy;
                chosen = strength;
            }
        }

        Console.WriteLine(chosen);
        """);

    [Fact]
    public Task LowerIsBetter() => ModelProgram.Check("""
        double lowest = double.PositiveInfinity;
        Model? winner = null;
        for (double strength = 0.5; strength <= 2; strength += 0.25)
        {
            var model = Model.Fit(trainX, trainY, strength);
            double loss = model.Loss(testX, testY);
            if (lowest <= loss) // ! TARE101
                continue;
            lowest = loss;
            winner = model;
        }

        Console.WriteLine(winner!.Predict(new[] { 0.4 }));
        """);

    [Fact]
    public Task While() => ModelProgram.Check("""
        int i = 0, chosen = 0;
        double best = -1;
        while (i < strengths.Length)
        {
            double share = Model.Fit(trainX, trainY, strengths[i]).Accuracy(testX, testY);
            if (share > best) // ! TARE101
            {
                best = share;
                chosen = i;
            }

            i++;
        }

        Console.WriteLine(strengths[chosen]);
        """);

    [Fact]
    public Task ScoreComputedRowByRow() => ModelProgram.Check("""
        double chosen = 0;
        int most = -1;
        foreach (var strength in strengths)
        {
            var model = Model.Fit(trainX, trainY, strength);
            int right = 0;
            for (int i = 0; i < testX.Length; i++)
            {
                if (model.Predict(testX[i]) == testY[i])
                    right++;
            }

            if (right > most) // ! TARE101
                (most, chosen) = (right, strength);
        }

        Console.WriteLine(chosen);
        """);

    [Fact]
    public Task NestedLoops() => ModelProgram.Check("""
        double best = 0;
        (int Depth, double Rate) chosen = default;
        for (int depth = 1; depth <= 4; depth++)
        {
            foreach (double rate in new[] { 0.1, 0.3, 1.0 })
            {
                double accuracy = Model.Fit(trainX, trainY, depth * rate).Accuracy(testX, testY);
                if (accuracy > best) // ! TARE101
                {
                    best = accuracy;
                    chosen = (depth, rate);
                }
            }
        }

        Console.WriteLine(chosen);
        """);

    [Fact]
    public Task Conditional() => ModelProgram.Check("""
        var small = Model.Fit(trainX, trainY, 0.5);
        var large = Model.Fit(trainX, trainY, 2);
        double smallShare = small.Accuracy(testX, testY), largeShare = large.Accuracy(testX, testY);
        var winner = smallShare > largeShare ? small : large; // ! TARE101
        Console.WriteLine(winner.Predict(new[] { 0.4 }));
        """);

    [Fact]
    public Task MaxBy() => ModelProgram.Check("""
        double chosen = strengths.MaxBy(s => Model.Fit(trainX, trainY, s).Accuracy(testX, testY)); // ! TARE101
        Console.WriteLine(chosen);
        """);

    [Fact]
    public Task MinByOverModels() => ModelProgram.Check("""
        var models = strengths.Select(s => Model.Fit(trainX, trainY, s)).ToList();
        var winner = models.MinBy(m => m.Loss(testX, testY)); // ! TARE101
        Console.WriteLine(winner!.Predict(new[] { 0.4 }));
        """);

    [Fact]
    public Task OrderByThenFirst() => ModelProgram.Check("""
        var winner = settings
            .Select(s => (Setting: s, Share: Model.Fit(trainX, trainY, s.Rate).Accuracy(testX, testY)))
            .OrderByDescending(r => r.Share) // ! TARE101
            .First();
        Console.WriteLine(winner.Setting);
        """);

    [Fact]
    public Task QuerySyntax() => ModelProgram.Check("""
        var winner = (from s in settings
                      let model = Model.Fit(trainX, trainY, s.Rate)
                      orderby model.Accuracy(testX, testY) descending // ! TARE101
                      select s).First();
        Console.WriteLine(winner);
        """);

    [Fact]
    public Task SortThenFirstElement() => ModelProgram.Check("""
        var results = new List<(double Share, Setting Setting)>();
        foreach (var setting in settings)
            results.Add((Model.Fit(trainX, trainY, setting.Rate).Accuracy(testX, testY), setting));
        results.Sort((a, b) => b.Share.CompareTo(a.Share)); // ! TARE101
        Console.WriteLine(results[0].Setting);
        """);

    [Fact]
    public Task Aggregate() => ModelProgram.Check("""
        var scored = settings.Select(s => (Setting: s, Share: Model.Fit(trainX, trainY, s.Rate).Accuracy(testX, testY)));
        var winner = scored.Aggregate((a, b) => a.Share >= b.Share ? a : b); // ! TARE101
        Console.WriteLine(winner.Setting);
        """);

    [Fact]
    public Task MaxAndIndexOf() => ModelProgram.Check("""
        double[] shares = settings.Select(s => Model.Fit(trainX, trainY, s.Rate).Accuracy(testX, testY)).ToArray();
        int at = Array.IndexOf(shares, shares.Max()); // ! TARE101
        Console.WriteLine(settings[at]);
        """);

    [Fact]
    public Task ParallelFor() => ModelProgram.Check("""
        var shares = new double[settings.Length];
        Parallel.For(0, settings.Length, i => shares[i] = Model.Fit(trainX, trainY, settings[i].Rate).Accuracy(testX, testY));
        int best = 0;
        for (int i = 1; i < shares.Length; i++)
        {
            if (shares[i] > shares[best]) // ! TARE101
                best = i;
        }

        Console.WriteLine(settings[best]);
        """);

    [Fact]
    public Task ParallelQuery() => ModelProgram.Check("""
        var winner = settings.AsParallel()
            .Select(s => new { Setting = s, Share = Model.Fit(trainX, trainY, s.Rate).Accuracy(testX, testY) })
            .ToList()
            .MaxBy(r => r.Share); // ! TARE101
        Console.WriteLine(winner!.Setting);
        """);

    [Fact]
    public Task SlicesWithoutRoleNames() => ModelProgram.Check("""
        var rows = File.ReadLines("boards.csv").Select(l => l.Split(',').Select(double.Parse).ToArray()).ToArray();
        var warped = rows.Select(r => r[1] > 0).ToArray();
        int cut = rows.Length * 3 / 4;
        var (a, b) = (rows[..cut], rows[cut..]);
        var (la, lb) = (warped[..cut], warped[cut..]);
        double best = 0, chosen = 0;
        foreach (double strength in strengths)
        {
            double share = Model.Fit(a, la, strength).Accuracy(b, lb);
            if (share > best) // ! TARE101
            {
                best = share;
                chosen = strength;
            }
        }

        Console.WriteLine(chosen);
        """);

    [Fact]
    public Task ListsOfRecords() => ModelProgram.Check("""
        double chosen = 0;
        double best = 0;
        foreach (double strength in strengths)
        {
            double share = Model.Fit(trainBoards, strength).Accuracy(testBoards);
            bool better = share > best; // ? TARE101
            if (better) // ? TARE101
            {
                best = share;
                chosen = strength;
            }
        }

        Console.WriteLine(chosen);
        """);

    [Fact]
    public async Task MessageNamesScoreRowsAndNumbers()
    {
        var found = await Infrastructure.Analysis.FindAsync(ModelProgram.Of("""
            double bestAcc = 0, chosen = 0;
            foreach (double strength in new[] { 0.5, 0.75, 1, 1.25, 1.5 })
            {
                double acc = Model.Fit(trainX, trainY, strength).Accuracy(testX, testY);
                if (acc > bestAcc)
                {
                    bestAcc = acc;
                    chosen = strength;
                }
            }

            Console.WriteLine(chosen);
            """));
        string message = Assert.Single(found, d => d.Id == "TARE101").GetMessage(System.Globalization.CultureInfo.InvariantCulture);
        Assert.Contains("'testX'", message);
        Assert.Contains("5 scores", message);
        // 1 - 0.95^5 and 0.05 / 5, the usual Bonferroni values.
        Assert.Contains("22.6 %", message);
        Assert.Contains("0.01", message);
    }

    [Fact]
    public Task ValidationRowsMayChoose() => ModelProgram.Check("""
        double best = 0, chosen = 0;
        foreach (double strength in strengths)
        {
            double share = Model.Fit(trainX, trainY, strength).Accuracy(validationX, validationY);
            if (share > best)
            {
                best = share;
                chosen = strength;
            }
        }

        Console.WriteLine(Model.Fit(trainX, trainY, chosen).Accuracy(testX, testY));
        """);

    [Fact]
    public Task GateAgainstAConstant() => ModelProgram.Check("""
        var model = Model.Fit(trainX, trainY, 1);
        double share = model.Accuracy(testX, testY);
        if (share < 0.8)
            throw new InvalidOperationException("not good enough");
        Console.WriteLine(share);
        """);

    [Fact]
    public Task ChosenByTrainingScore() => ModelProgram.Check("""
        double best = 0, chosen = 0;
        foreach (double strength in strengths)
        {
            double share = Model.Fit(trainX, trainY, strength).Accuracy(trainX, trainY);
            if (share > best)
            {
                best = share;
                chosen = strength;
            }
        }

        Console.WriteLine(Model.Fit(trainX, trainY, chosen).Accuracy(testX, testY));
        """);

    [Fact]
    public Task WorstTestRow() => ModelProgram.Check("""
        var model = Model.Fit(trainX, trainY, 1);
        double farthest = 0;
        int worst = 0;
        for (int i = 0; i < testX.Length; i++)
        {
            double distance = model.Predict(testX[i]) == testY[i] ? 0 : Math.Abs(testX[i][0]);
            if (distance > farthest)
            {
                farthest = distance;
                worst = i;
            }
        }

        Console.WriteLine(worst);
        """);

    [Fact]
    public Task AveragedRepeats() => ModelProgram.Check("""
        var shares = new List<double>();
        for (int repeat = 0; repeat < 20; repeat++)
        {
            var random = new Random(repeat);
            int[] order = Enumerable.Range(0, trainX.Length).OrderBy(_ => random.Next()).ToArray();
            var fit = order[..^50];
            var rest = order[^50..];
            var model = Model.Fit(fit.Select(i => trainX[i]).ToArray(), fit.Select(i => trainY[i]).ToArray(), 1);
            shares.Add(model.Accuracy(rest.Select(i => trainX[i]).ToArray(), rest.Select(i => trainY[i]).ToArray()));
        }

        Console.WriteLine(shares.Average());
        """);

    [Fact]
    public Task LengthsAreNoScores() => ModelProgram.Check("""
        int longest = 0;
        foreach (var part in new[] { trainX, validationX, testX })
        {
            if (part.Length > longest)
                longest = part.Length;
        }

        Console.WriteLine(longest);
        """);

    [Fact]
    public Task WordsThatOnlyContainTest() => ModelProgram.Check("""
        double[] latest = { 1, 2 }, contest = { 3, 4 };
        double best = 0;
        foreach (double weight in strengths)
        {
            double total = latest.Zip(contest, (a, b) => a * weight - b).Sum();
            if (total > best)
                best = total;
        }

        Console.WriteLine(best);
        """);
}
