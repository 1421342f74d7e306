namespace Tare.Analyzers.Tests.Rules.Choice;

/// <summary>TARE108 where choice and claim stand in one method.</summary>
public class ChoosingScoreClaimedTests
{
    [Fact]
    public Task ValidationScoreOfTheWinner() => ModelProgram.Check("""
        double best = 0, chosen = 0;
        foreach (double strength in strengths)
        {
            double accuracy = Model.Fit(trainX, trainY, strength).Accuracy(validationX, validationY);
            if (accuracy > best)
            {
                best = accuracy;
                chosen = strength;
            }
        }

        Console.WriteLine($"strength {chosen}");
        Console.WriteLine($"accuracy {best:P1}"); // ! TARE108
        """);

    [Fact]
    public Task SilentWhenTheWinnerMeetsUntouchedRows() => ModelProgram.Check("""
        double best = 0, chosen = 0;
        foreach (double strength in strengths)
        {
            double accuracy = Model.Fit(trainX, trainY, strength).Accuracy(validationX, validationY);
            if (accuracy > best)
            {
                best = accuracy;
                chosen = strength;
            }
        }

        Console.WriteLine($"validation {best:P1}");
        Console.WriteLine($"test {Model.Fit(trainX, trainY, chosen).Accuracy(testX, testY):P1}");
        """);

    [Fact]
    public Task CrossValidationScoreOfTheWinner() => ModelProgram.Check("""
        double best = 0, chosen = 0;
        foreach (double strength in strengths)
        {
            double sum = 0;
            for (int fold = 0; fold < 5; fold++)
            {
                var fitX = trainX.Where((_, i) => i % 5 != fold).ToArray();
                var fitY = trainY.Where((_, i) => i % 5 != fold).ToArray();
                var restX = trainX.Where((_, i) => i % 5 == fold).ToArray();
                var restY = trainY.Where((_, i) => i % 5 == fold).ToArray();
                sum += Model.Fit(fitX, fitY, strength).Accuracy(restX, restY);
            }

            double mean = sum / 5;
            if (mean > best)
            {
                best = mean;
                chosen = strength;
            }
        }

        Console.WriteLine($"strength {chosen}, accuracy {best:P1}"); // ! TARE108
        """);

    [Fact]
    public Task ChoosingWithoutClaiming() => ModelProgram.Check("""
        double chosen = strengths.MaxBy(s => Model.Fit(trainX, trainY, s).Accuracy(validationX, validationY));
        Console.WriteLine($"strength {chosen}");
        """);
}
