using CsCheck;

namespace Tare.Tests;

public class SplitTests
{
    private static readonly Gen<(int Count, double Share, int Seed)> Cuts = Gen.Select(Gen.Int[2, 200], Gen.Double[0.01, 0.99], Gen.Int);

    [Fact]
    public void Parts_hold_every_row_once_in_the_old_order() => Cuts.Sample(t =>
    {
        int[] rows = [.. Enumerable.Range(0, t.Count)];
        HeldOut<int[]>[] splits =
        [
            HoldOut.Random(rows, t.Share, t.Seed), HoldOut.Tail(rows, t.Share),
            HoldOut.ByGroup(rows, r => r / 2 * 2 == t.Count - 1 ? -1 : r % Math.Max(2, t.Count / 3), t.Share, t.Seed),
        ];
        foreach ((int[] training, int[] validation) in splits)
        {
            Assert.NotEmpty(training);
            Assert.NotEmpty(validation);
            Assert.Equal(training.Order(), training);
            Assert.Equal(validation.Order(), validation);
            Assert.Equal(rows, training.Concat(validation).Order());
        }
    });

    [Fact]
    public void Share_is_met_to_the_row() => Cuts.Sample(t =>
    {
        int want = Math.Clamp((int)Math.Round(t.Count * t.Share, MidpointRounding.AwayFromZero), 1, t.Count - 1);
        int[] rows = [.. Enumerable.Range(0, t.Count)];
        return HoldOut.Random(rows, t.Share, t.Seed).Validation.Length == want && HoldOut.Tail(rows, t.Share).Validation.Length == want;
    });

    [Fact]
    public void One_seed_is_one_split_and_is_pinned()
    {
        int[] rows = [.. Enumerable.Range(0, 20)];
        Assert.Equal(HoldOut.Random(rows, 0.25, seed: 7).Validation, HoldOut.Random(rows, 0.25, seed: 7).Validation);
        // Pinned, so that a change of the generator does not slip in and move everyone's splits.
        Assert.Equal(PinnedSeedOne, HoldOut.Random(rows, 0.25, seed: 1).Validation);
        Assert.NotEqual(PinnedSeedOne, HoldOut.Random(rows, 0.25, seed: 2).Validation);
    }

    private static readonly int[] PinnedSeedOne = [4, 6, 13, 17, 19];

    /// <summary>Each row is held out equally often: chi-square over 4000 seeds, bound from the chi-square table at 0.001, 19 df (43.82).</summary>
    [Fact]
    public void Random_is_fair()
    {
        int[] rows = [.. Enumerable.Range(0, 20)];
        double[] counts = new double[20];
        for (int seed = 0; seed < 4000; seed++)
        {
            foreach (int row in HoldOut.Random(rows, 0.25, seed).Validation)
                counts[row]++;
        }

        // Drawing without replacement shrinks the variance by 15/19 against a multinomial law; the bound stays safe.
        Assert.True(counts.Sum(c => (c - 1000) * (c - 1000) / 1000) < 43.82);
    }

    [Fact]
    public void Features_and_labels_stay_together() => Cuts.Sample(t =>
    {
        double[][] x = [.. Enumerable.Range(0, t.Count).Select(i => new[] { (double)i })];
        int[] y = [.. Enumerable.Range(0, t.Count)];
        int[] groups = [.. y.Select(i => i % 2)];
        HeldOut<double[][], int[]>[] splits =
        [
            HoldOut.Random(x, y, t.Share, t.Seed), HoldOut.Tail(x, y, t.Share), HoldOut.ByGroup(x, y, groups, t.Share, t.Seed),
        ];
        foreach ((double[][] trainX, int[] trainY, double[][] validX, int[] validY) in splits)
        {
            Assert.Equal(trainY, trainX.Select(r => (int)r[0]));
            Assert.Equal(validY, validX.Select(r => (int)r[0]));
            Assert.Equal(t.Count, trainY.Length + validY.Length);
        }
    });

    [Fact]
    public void Tail_takes_the_last_rows() =>
        Assert.Equal([7, 8, 9], HoldOut.Tail(Enumerable.Range(0, 10).ToArray(), 0.3).Validation);

    [Fact]
    public void Strata_keep_their_shares() =>
        Gen.Select(Gen.Int[0, 3].Array[20, 300], Gen.Double[0.1, 0.9], Gen.Int).Sample((labels, share, seed) =>
        {
            HeldOut<int[]> split = HoldOut.Stratified(labels, l => l, share, seed);
            foreach (IGrouping<int, int> stratum in labels.GroupBy(l => l))
            {
                int held = split.Validation.Count(l => l == stratum.Key);
                Assert.InRange(held, Math.Floor(stratum.Count() * share), Math.Floor(stratum.Count() * share) + 1);
            }
        });

    [Fact]
    public void Groups_are_never_parted() =>
        Gen.Select(Gen.Int[0, 30].Array[2, 300].Where(g => g.Distinct().Count() > 1), Gen.Double[0.1, 0.9], Gen.Int).Sample((groups, share, seed) =>
        {
            (int[] training, int[] validation) = HoldOut.ByGroup(groups, g => g, share, seed);
            return training.Length > 0 && validation.Length > 0 && !training.Intersect(validation).Any();
        });

    [Fact]
    public void Containers_come_back_as_they_went_in()
    {
        List<string> list = ["a", "b", "c", "d"];
        List<int> labels = [1, 2, 3, 4];
        List<string> training = HoldOut.Tail(list).Training;
        List<int> labelsLeft = HoldOut.Tail(list, labels).TrainingY;
        string[] fromSequence = HoldOut.Tail((IReadOnlyList<string>)list).Training;
        (string[] mixed, int[] _, _, _) = HoldOut.Random(list, labels.ToArray());
        Assert.Equal(["a", "b", "c"], training);
        Assert.Equal([1, 2, 3], labelsLeft);
        Assert.Equal(training, fromSequence);
        Assert.Equal(3, mixed.Length);
    }

    [Fact]
    public void Three_parts_share_nothing_and_meet_their_shares()
    {
        int[] rows = [.. Enumerable.Range(0, 100)];
        string[] labels = [.. rows.Select(r => r % 4 == 0 ? "warps" : "stays flat")];
        Parts<int[], string[]>[] all =
        [
            ThreeWay.Random(rows, labels, seed: 3), ThreeWay.Tail(rows, labels), ThreeWay.Stratified(rows, labels, seed: 3),
            ThreeWay.ByGroup(rows, labels, rows.Select(r => r / 5).ToArray(), seed: 3),
        ];
        foreach (Parts<int[], string[]> parts in all)
        {
            Assert.Equal(rows, parts.TrainingX.Concat(parts.ValidationX).Concat(parts.TestX).Order());
            Assert.Equal((60, 20, 20), (parts.TrainingX.Length, parts.ValidationX.Length, parts.TestX.Length));
            Assert.Equal(parts.TestX.Select(r => labels[r]), parts.TestY);
            Assert.Equal(parts.ValidationX.Select(r => labels[r]), parts.ValidationY);
        }

        Assert.Equal(Enumerable.Range(80, 20), all[1].TestX);
        Assert.Equal(Enumerable.Range(60, 20), all[1].ValidationX);
        Assert.Equal(5, all[2].TestY.Count(l => l == "warps"));
        Assert.Empty(all[3].TestX.Select(r => r / 5).Intersect(all[3].TrainingX.Select(r => r / 5)));
    }

    [Fact]
    public void Judging_rows_can_be_cut_in_two()
    {
        (int[] validation, int[] test) = ChooseAndJudge.Tail(Enumerable.Range(0, 10).ToArray());
        Assert.Equal(Enumerable.Range(0, 5), validation);
        Assert.Equal(Enumerable.Range(5, 5), test);
    }

    [Fact]
    public void Bad_input_is_named()
    {
        int[] rows = [1, 2, 3];
        Assert.Throws<ArgumentNullException>("rows", () => HoldOut.Random((int[])null!));
        Assert.Throws<ArgumentException>("rows", () => HoldOut.Random(new[] { 1 }));
        Assert.Throws<ArgumentOutOfRangeException>("share", () => HoldOut.Tail(rows, 0));
        Assert.Throws<ArgumentOutOfRangeException>("share", () => HoldOut.Tail(rows, double.NaN));
        Assert.Throws<ArgumentException>("y", () => HoldOut.Random(rows, new[] { 1, 2 }));
        Assert.Throws<ArgumentException>("groups", () => HoldOut.ByGroup(rows, rows, new[] { 1, 1, 1 }));
        Assert.Throws<ArgumentException>("groups", () => HoldOut.ByGroup(rows, rows, new[] { 1, 2 }));
        Assert.Throws<ArgumentException>("rows", () => HoldOut.Stratified(rows, r => r));
        Assert.Throws<ArgumentOutOfRangeException>("validationShare", () => ThreeWay.Random(rows, 0.6, 0.4));
    }
}
