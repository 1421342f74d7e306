// Which readings and which penalty foretell best whether a kiln-dried board will warp?
using System.Globalization;
using Microsoft.ML;
using Microsoft.ML.Data;
using Sawmill;
using Tare;

CultureInfo.CurrentCulture = CultureInfo.InvariantCulture;
Call call = Call.Read(args);
MLContext context = new(seed: call.Seed);
IDataView boards = context.Data.LoadFromEnumerable(Board.Scan(600, call.Seed, call.Signal));
DataOperationsCatalog.TrainTestData split = context.Data.TrainTestSplit(boards, testFraction: 0.4, seed: call.Seed);

float[] penalties = [0.01f, 0.1f, 1f, 3f, 10f];
string[][] readingSets =
[
    ["Moisture"], ["Density"], ["Knots"], ["Grain"], ["Resin"], ["Width"], ["Moisture", "Density"], ["Knots", "Grain"],
    ["Thickness", "Cup"], ["Moisture", "Knots", "Resin"], ["Density", "Grain", "Width"],
    ["Moisture", "Density", "Knots", "Grain", "Resin", "Width", "Thickness", "Cup"],
];
Setting[] settings = [.. from penalty in penalties from set in readingSets select new Setting(penalty, set)];

var (fit, valid) = DataViewHoldOut.Random(split.TrainSet, share: 0.25, seed: call.Seed);
Setting best = settings[0];
double bestAccuracy = 0;
foreach (Setting setting in settings)
{
    ITransformer model = Pipeline(setting).Fit(fit);
    CalibratedBinaryClassificationMetrics metrics = context.BinaryClassification.Evaluate(model.Transform(valid));
    if (metrics.Accuracy > bestAccuracy)
    {
        bestAccuracy = metrics.Accuracy;
        best = setting;
    }
}

ITransformer winner = Pipeline(best).Fit(split.TrainSet);
Console.WriteLine($"{best}: {DataViewClaim.Accuracy(winner.Transform(split.TestSet), baseline: 0.5, baselineFrom: "a coin")}");

IEstimator<ITransformer> Pipeline(Setting setting) =>
    context.Transforms.Concatenate("Features", setting.Readings)
        .Append(context.BinaryClassification.Trainers.LbfgsLogisticRegression(l2Regularization: setting.Penalty));
