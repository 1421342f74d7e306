namespace Tare.Tests;

/// <summary>Reference values: R 4.2.2 (see Reference/schema.csv).</summary>
public class ScoreTests
{
    [Fact]
    public void Confusion_measures_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("confusion.csv"))
        {
            ConfusionCounts got = new(row.Count("tp"), row.Count("fp"), row.Count("fn"), row.Count("tn"));
            row.Agrees("accuracy", got.Accuracy);
            Same("balanced_accuracy", got.BalancedAccuracy);
            Same("sensitivity", got.Sensitivity);
            Same("specificity", got.Specificity);
            Same("precision", got.Precision);
            Same("f1", got.F1);
            Same("mcc", got.MatthewsCorrelation);
            Same("kappa", got.Kappa);

            void Same(string column, double? value)
            {
                if (value is { } number)
                    row.AgreesAbsolutely(column, number);
                else
                    Assert.Equal("NaN", row.Text(column));
            }
        }
    }

    [Fact]
    public void Probability_scores_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("brier_logloss.csv"))
        {
            bool[] y = [.. row.Vector("y").Select(v => v == 1)];
            double[] p = row.Vector("p");
            row.Agrees("brier", ProbabilityScore.Brier(y, p));
            Assert.Equal(row.Number("log_loss"), ProbabilityScore.LogLoss(y, p, clip: 0), 1e-12);
            row.Agrees("log_loss_clipped", ProbabilityScore.LogLoss(y, p, row.Number("eps")));
        }
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("falsePositives", () => new ConfusionCounts(1, -1, 0, 0));
        Assert.Throws<ArgumentException>("truePositives", () => new ConfusionCounts(0, 0, 0, 0));
        Assert.Throws<ArgumentException>("outcomes", () => ProbabilityScore.Brier([], []));
        Assert.Throws<ArgumentException>("probabilities", () => ProbabilityScore.Brier([true], [0.1, 0.2]));
        Assert.Throws<ArgumentOutOfRangeException>("probabilities", () => ProbabilityScore.Brier([true], [double.NaN]));
        Assert.Throws<ArgumentOutOfRangeException>("clip", () => ProbabilityScore.LogLoss([true], [0.1], 0.5));
    }
}
