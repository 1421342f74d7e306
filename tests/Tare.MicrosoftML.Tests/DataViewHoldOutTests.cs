using Microsoft.ML;
using Microsoft.ML.Data;

namespace Tare.MicrosoftML.Tests;

public class DataViewHoldOutTests
{
    private sealed class Board
    {
        public float Number { get; set; }

        public bool Label { get; set; }

        public string Kiln { get; set; } = "";
    }

    private static readonly MLContext Context = new(seed: 1);

    private static IDataView Boards(int count) => Context.Data.LoadFromEnumerable(
        Enumerable.Range(0, count).Select(i => new Board { Number = i, Label = i % 4 == 0, Kiln = "kiln " + i % 7 }).ToArray());

    private static float[] Numbers(IDataView data) => [.. data.GetColumn<float>("Number")];

    [Fact]
    public void Parts_hold_every_row_once_in_the_old_order()
    {
        IDataView data = Boards(101);
        HeldOut<IDataView>[] splits =
        [
            DataViewHoldOut.Random(data, 0.3, 5), DataViewHoldOut.Tail(data, 0.3), DataViewHoldOut.Stratified(data, "Label", 0.3, 5),
            DataViewHoldOut.ByGroup(data, "Kiln", 0.3, 5),
        ];
        foreach ((IDataView training, IDataView validation) in splits)
        {
            float[] fit = Numbers(training), choose = Numbers(validation);
            Assert.Equal(fit.Order(), fit);
            Assert.Equal(choose.Order(), choose);
            Assert.Equal(Enumerable.Range(0, 101).Select(i => (float)i), fit.Concat(choose).Order());
            Assert.Equal(choose.Length, validation.GetRowCount());
            Assert.Equal(choose, Numbers(validation));
        }

        Assert.Equal(30, splits[0].Validation.GetRowCount());
        Assert.Equal(71, Numbers(splits[1].Validation)[0]);
    }

    [Fact]
    public void Same_rows_as_the_plain_split_of_the_same_seed() =>
        Assert.Equal(
            HoldOut.Random(Enumerable.Range(0, 60).ToArray(), 0.25, 9).Validation.Select(i => (float)i),
            Numbers(DataViewHoldOut.Random(Boards(60), 0.25, 9).Validation));

    [Fact]
    public void Groups_are_never_parted()
    {
        HeldOut<IDataView> split = DataViewHoldOut.ByGroup(Boards(101), "Kiln", 0.3, 2);
        Assert.Empty(split.Training.GetColumn<string>("Kiln").Intersect(split.Validation.GetColumn<string>("Kiln")));
    }

    [Fact]
    public void Parts_can_be_trained_on_and_scored()
    {
        HeldOut<IDataView> split = DataViewHoldOut.Random(Boards(400), 0.25);
        IEstimator<ITransformer> pipeline = Context.Transforms.Concatenate("Features", "Number")
            .Append(Context.BinaryClassification.Trainers.LbfgsLogisticRegression());
        IDataView scored = pipeline.Fit(split.Training).Transform(split.Validation);
        double accuracy = Context.BinaryClassification.Evaluate(scored).Accuracy;
        Verdict verdict = DataViewClaim.Accuracy(scored, baseline: 0.75, baselineFrom: "commonest label", earlierLooks: 3);
        Assert.Equal(accuracy, verdict.Value, 1e-12);
        Assert.Equal(100, verdict.Rows);
        Assert.Equal(4, verdict.Compared);
        Assert.Equal(verdict, Claim.Accuracy(accuracy, 100, baseline: 0.75, baselineFrom: "commonest label", earlierLooks: 3));
    }

    [Fact]
    public void Errors_are_claimed_from_label_and_score()
    {
        IDataView scored = Context.Data.LoadFromEnumerable(new[] { (1f, 2f), (2f, 2.5f), (3f, 1f) }.Select(p => new Scored { Label = p.Item1, Score = p.Item2 }));
        Assert.Equal((1 + 0.5 + 2) / 3, DataViewClaim.AbsoluteError(scored).Value, 1e-7);
        Assert.Equal((1 + 0.25 + 4) / 3, DataViewClaim.SquaredError(scored, baseline: 9).Value, 1e-7);
    }

    [Fact]
    public void Bad_input_is_named()
    {
        IDataView data = Boards(10);
        Assert.Throws<ArgumentNullException>("data", () => DataViewHoldOut.Random(null!));
        Assert.Throws<ArgumentException>("data", () => DataViewHoldOut.Tail(Boards(1)));
        Assert.Throws<ArgumentOutOfRangeException>("share", () => DataViewHoldOut.Random(data, 1.5));
        ArgumentException missing = Assert.Throws<ArgumentException>("groupColumn", () => DataViewHoldOut.ByGroup(data, "Load"));
        Assert.Contains("Kiln", missing.Message);
        Assert.Throws<ArgumentException>("predictedLabelColumn", () => DataViewClaim.Accuracy(data, "Label", "Number"));
        Assert.Throws<ArgumentException>("scoreColumn", () => DataViewClaim.AbsoluteError(data, "Number", "Kiln"));
    }

    private sealed class Scored
    {
        public float Label { get; set; }

        public float Score { get; set; }
    }
}
