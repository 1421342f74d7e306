using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Rules.Choice;

/// <summary>The fix of TARE108 is that of TARE102, over the rows that chose.</summary>
public class ChoosingScoreClaimedFixTests
{
    private const string Rule = "TARE108";

    [Fact]
    public async Task ClaimCountsTheRowsThatChose()
    {
        string mended = await Mended.AllAsync(Of("""
            double best = 0, chosen = 0;
            foreach (double strength in new[] { 0.5, 1, 1.5, 2 })
            {
                double accuracy = Model.Fit(trainX, trainY, strength).Accuracy(validationX, validationY);
                if (accuracy > best)
                {
                    best = accuracy;
                    chosen = strength;
                }
            }

            Console.WriteLine($"{chosen}: {best:P1}"); // interim
            """), Rule);
        Assert.Contains("Console.WriteLine($\"{chosen}: {Claim.Accuracy(best, validationX.Length, earlierLooks: 4)}\"); // interim", mended);
    }

    [Fact]
    public Task NotOfferedForALoss() => Mended.OffersNothingAsync(Nearest.Of("""
        var best = new[] { 1, 3, 5 }.Select(s => (s, Loss: NearestBoards.Fit(trainX, trainY, s).Loss(validationX, validationY))).MinBy(r => r.Loss);
        Console.WriteLine(best.Loss);
        """), Rule);

    private static TestProgram Of(string statements) => ModelProgram.Of(statements) with { Libraries = Libraries.Tare };
}
