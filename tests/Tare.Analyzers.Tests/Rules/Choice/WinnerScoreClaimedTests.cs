namespace Tare.Analyzers.Tests.Rules.Choice;

/// <summary>TARE102 where choice and claim stand in one method.</summary>
public class WinnerScoreClaimedTests
{
    [Fact]
    public Task BestScorePrinted() => ModelProgram.Check("""
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

        Console.WriteLine($"strength {chosen}");
        Console.WriteLine($"accuracy {best:P1}"); // ! TARE102
        """);

    [Fact]
    public Task BareMaximumIsAClaimAndNoChoice() => ModelProgram.Check("""
        double best = strengths.Max(s => Model.Fit(trainX, trainY, s).Accuracy(testX, testY));
        Console.WriteLine("best accuracy " + best); // ! TARE102
        """);

    [Fact]
    public Task WrittenToAFile() => ModelProgram.Check("""
        var winner = settings
            .Select(s => (Setting: s, Share: Model.Fit(trainX, trainY, s.Rate).Accuracy(testX, testY)))
            .MaxBy(r => r.Share); // ! TARE101
        File.WriteAllText("setting.txt", winner.Setting.ToString());
        File.WriteAllText("report.txt", $"accuracy {winner.Share}"); // ! TARE102
        """);

    [Fact]
    public Task ScoreOfTheWinnersIndex() => ModelProgram.Check("""
        var shares = settings.Select(s => Model.Fit(trainX, trainY, s.Rate).Accuracy(testX, testY)).ToArray();
        int at = Array.IndexOf(shares, shares.Max()); // ! TARE101
        Console.WriteLine(settings[at]);
        Console.WriteLine(shares[at]); // ! TARE102
        """);

    [Fact]
    public Task ScoredAgainOnTheRowsThatChose() => ModelProgram.Check("""
        double chosen = strengths.MaxBy(s => Model.Fit(trainX, trainY, s).Accuracy(testX, testY)); // ! TARE101
        var winner = Model.Fit(trainX, trainY, chosen);
        Console.WriteLine(winner.Accuracy(testX, testY)); // ! TARE102
        """);

    [Fact]
    public Task ProgressInsideTheLoopIsNoClaim() => ModelProgram.Check("""
        double best = 0, chosen = 0;
        foreach (double strength in strengths)
        {
            double accuracy = Model.Fit(trainX, trainY, strength).Accuracy(testX, testY);
            if (accuracy > best) // ! TARE101
            {
                best = accuracy;
                chosen = strength;
                Console.WriteLine($"{strength}: {accuracy}");
            }
        }

        Console.WriteLine($"strength {chosen}");
        """);

    [Fact]
    public Task OneScoreOfOneModelIsRight() => ModelProgram.Check("""
        var model = Model.Fit(trainX, trainY, 1);
        Console.WriteLine($"accuracy {model.Accuracy(testX, testY):P1}");
        """);

    [Fact]
    public Task RowsAndSettingsAreNoClaims() => ModelProgram.Check("""
        double chosen = strengths.MaxBy(s => Model.Fit(trainX, trainY, s).Accuracy(testX, testY)); // ! TARE101
        Console.WriteLine($"strength {chosen} on {testX.Length} rows of {testX[0].Length} readings");
        """);
}
