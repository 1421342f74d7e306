namespace Tare.Tests;

/// <summary>Traces of the published algorithms with the noise given, and 50-digit values (see Reference/schema.csv).</summary>
public class ReuseTests
{
    [Fact]
    public void Thresholdout_follows_the_published_trace()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("thresholdout.csv"))
        {
            double[] train = row.Vector("train"), holdout = row.Vector("holdout"), answer = row.Vector("answer");
            // Some traces hold means above 1, which the algorithm does not allow; shifting both means changes no answer but by the shift.
            double shift = Math.Max(0, Math.Max(train.Max(), holdout.Max()) - 1);
            double[] eta = row.Vector("eta"), xi = row.Vector("xi"), gamma = row.Vector("gamma");
            if (row.Count("budget") < 1)
            {
                Assert.Throws<ArgumentOutOfRangeException>("budget", () => new ReusableHoldout(0.04, 0.01, 0, 1));
                continue;
            }

            // The scale tells which of the three noises is asked for; a trace without noise needs a scale all the same.
            double sigma = Math.Max(row.Number("sigma"), 1e-6);
            int query = -1;
            ReusableHoldout board = new(row.Number("threshold"), sigma, (int)row.Count("budget"), scale =>
                query < 0 ? row.Number("gamma0") : scale == 4 * sigma ? eta[query] : scale == sigma ? xi[query] : gamma[query]);
            for (query = 0; query < train.Length; query++)
            {
                double? got = board.Ask(train[query] - shift, holdout[query] - shift);
                if (double.IsNaN(answer[query]))
                    Assert.Null(got);
                else
                    Assert.Equal(answer[query], got!.Value + shift, 1e-12);
            }

            Assert.Equal(row.Count("budget_left"), board.BudgetLeft);
        }
    }

    [Fact]
    public void Laplace_quantiles_agree_with_reference()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("laplace_quantile.csv"))
            row.Agrees("quantile", Laplace.Quantile(row.Number("u"), row.Number("scale")));
    }

    [Fact]
    public void Ladder_follows_the_published_trace()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("ladder.csv"))
        {
            Ladder board = new(row.Number("eta"));
            double[] losses = row.Vector("losses"), released = row.Vector("released");
            for (int i = 0; i < losses.Length; i++)
                Assert.Equal(released[i], board.Submit(losses[i]), 1e-12);
        }
    }

    [Fact]
    public void Parameter_free_ladder_follows_the_published_trace()
    {
        foreach (ReferenceRow row in ReferenceTable.Read("ladder_parameter_free.csv"))
        {
            ParameterFreeLadder board = new((int)row.Count("n"));
            double[][] losses = row.Matrix("losses");
            double[] released = row.Vector("released");
            for (int i = 0; i < losses.Length; i++)
                Assert.Equal(released[i], board.Submit(losses[i]), 1e-12);
        }
    }

    [Fact]
    public void Seeded_noise_repeats()
    {
        double?[] Answers()
        {
            ReusableHoldout holdout = new(0.04, 0.01, 5, seed: 3);
            return [.. Enumerable.Range(0, 50).Select(i => holdout.Ask(0.5 + 0.003 * i, 0.5))];
        }

        double?[] answers = Answers();
        Assert.Equal(answers, Answers());
        Assert.Null(answers[^1]);
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentOutOfRangeException>("noise", () => new ReusableHoldout(0.04, 0, 1, 1));
        Assert.Throws<ArgumentOutOfRangeException>("threshold", () => new ReusableHoldout(double.NaN, 0.1, 1, 1));
        Assert.Throws<ArgumentOutOfRangeException>("holdoutValue", () => new ReusableHoldout(0.04, 0.1, 1, 1).Ask(0.5, 1.5));
        Assert.Throws<ArgumentOutOfRangeException>("step", () => new Ladder(0));
        Assert.Throws<ArgumentOutOfRangeException>("loss", () => new Ladder(0.1).Submit(double.NaN));
        Assert.Throws<ArgumentException>("losses", () => new ParameterFreeLadder(3).Submit([1, 0]));
        Assert.Throws<ArgumentOutOfRangeException>("rows", () => new ParameterFreeLadder(1));
    }
}
