// Which way of comparing boards foretells best whether a kiln-dried board will warp?
using System.Globalization;
using Sawmill;
using Tare;

CultureInfo.CurrentCulture = CultureInfo.InvariantCulture;
Call call = Call.Read(args);
(double[][] readings, bool[] warped) = Boards.Scan(500, call.Seed, call.Signal);
double[][] trainX = readings[..300], testX = readings[300..];
bool[] trainY = warped[..300], testY = warped[300..];

int[] neighbours = [1, 3, 5, 9, 15];
int[][] readingSets = [[0], [1], [2], [3], [0, 1], [2, 3], [4, 5], [6, 7], [0, 2, 4], [1, 3, 5], [4, 5, 6, 7], [0, 1, 2, 3, 4, 5, 6, 7]];
Setting[] settings = [.. from count in neighbours from set in readingSets select new Setting(count, set)];

var (fitX, fitY, validX, validY) = HoldOut.Tail(trainX, trainY, share: 0.25);
Setting best = settings[0];
double bestAccuracy = 0;
foreach (Setting setting in settings)
{
    NearestBoards model = NearestBoards.Fit(fitX, fitY, setting);
    double accuracy = model.Accuracy(validX, validY);
    if (accuracy > bestAccuracy)
    {
        bestAccuracy = accuracy;
        best = setting;
    }
}

NearestBoards winner = NearestBoards.Fit(trainX, trainY, best);
double testAccuracy = winner.Accuracy(testX, testY);
Console.WriteLine($"{best}: {Claim.Accuracy(testAccuracy, testX.Length, baseline: 0.5, baselineFrom: "a coin")}");
