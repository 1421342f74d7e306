using CsCheck;

namespace Tare.Tests;

public class MaxStatisticTests
{
    /// <summary>Full enumeration in R 4.2.2 (see Reference/schema.csv); counts must be exact.</summary>
    [Fact]
    public void All_patterns_agree_with_reference()
    {
        int seen = 0;
        foreach (ReferenceRow row in ReferenceTable.Read("westfall_young.csv").Where(r => r.Text("design") == "sign-flip"))
        {
            ScoreMatrix matrix = FromRows(row.Matrix("x"));
            Side side = row.Text("side") == "two" ? Side.TwoSided : Side.Greater;
            MaxStatisticResult got = MaxStatisticTest.SignFlip(matrix, side, patterns: 1 << 20, studentize: false);
            Assert.True(got.Exact);
            Assert.Equal(row.Count("total"), got.Patterns);
            Same(row, "statistics", got.Statistics, 1);
            Same(row, "raw_count", got.PValues, got.Patterns);
            Same(row, "single_step_count", got.SingleStep, got.Patterns);
            Same(row, "step_down_count", got.StepDown, got.Patterns);
            seen++;
        }

        Assert.True(seen > 3);
    }

    [Fact]
    public void Result_is_the_same_whatever_the_number_of_threads()
    {
        ScoreMatrix matrix = Noise(150, 70, 3);
        MaxStatisticResult one = MaxStatisticTest.SignFlip(matrix, patterns: 5000, threads: 1), many = MaxStatisticTest.SignFlip(matrix, patterns: 5000, threads: 4);
        Assert.Equal(one.StepDown, many.StepDown);
        Assert.Equal(one.SingleStep, many.SingleStep);
        Assert.Equal(one.PValues, many.PValues);
        Assert.NotEqual(one.PValues, MaxStatisticTest.SignFlip(matrix, patterns: 5000, seed: 2).PValues);
    }

    /// <summary>The plain double loop over rows, candidates and sign patterns.</summary>
    [Fact]
    public void Table_of_sums_agrees_with_the_plain_loop() =>
        Gen.Select(Gen.Int[1, 40], Gen.Int[1, 70], Gen.Int).Sample((rows, candidates, seed) =>
        {
            ScoreMatrix matrix = Noise(rows, candidates, seed);
            Random random = new(seed);
            const int patterns = 5;
            int groups = SignedSums.Groups(rows);
            byte[] signs = new byte[patterns * groups];
            random.NextBytes(signs);
            float[] answer = new float[patterns * candidates];
            new SignedSums(matrix, patterns).Fill(signs, patterns, answer);
            for (int r = 0; r < patterns; r++)
            {
                for (int j = 0; j < candidates; j++)
                {
                    double want = Enumerable.Range(0, rows).Sum(i => (signs[r * groups + i / 8] >> (i % 8) & 1) == 1 ? matrix[i, j] : -matrix[i, j]);
                    if (Math.Abs(want - answer[r * candidates + j]) > 1e-4)
                        return false;
                }
            }

            return true;
        });

    /// <summary>One candidate of 0/1 outcomes is McNemar's exact test: random patterns come near it, all patterns meet it.</summary>
    [Fact]
    public void One_candidate_is_McNemar()
    {
        double[][] few = [.. Enumerable.Range(0, 14).Select(i => new[] { i < 9 ? 1.0 : i < 12 ? -1 : 0 })];
        Assert.Equal(McNemarTest.Exact(9, 3, Side.Greater), MaxStatisticTest.SignFlip(FromRows(few), patterns: 1 << 14).StepDown[0], 1e-12);
        double[][] many = [.. Enumerable.Range(0, 200).Select(i => new[] { i < 60 ? 1.0 : i < 100 ? -1 : 0 })];
        double exact = McNemarTest.Exact(60, 40, Side.Greater), sampled = MaxStatisticTest.SignFlip(FromRows(many), patterns: 40_000).StepDown[0];
        Assert.Equal(exact, sampled, 4 * Math.Sqrt(exact * (1 - exact) / 40_000));
    }

    [Fact]
    public void Corrections_are_ordered() =>
        Gen.Select(Gen.Int[2, 30], Gen.Int[1, 12], Gen.Int).Sample((rows, candidates, seed) =>
        {
            MaxStatisticResult got = MaxStatisticTest.SignFlip(Noise(rows, candidates, seed), Side.TwoSided, 300, seed);
            for (int j = 0; j < candidates; j++)
                Assert.True(0 < got.PValues[j] && got.PValues[j] <= got.StepDown[j] && got.StepDown[j] <= got.SingleStep[j] && got.SingleStep[j] <= 1);
            Assert.Equal(got.SingleStep[got.Best], got.StepDown[got.Best]);
        });

    /// <summary>Equal candidates cost nothing: sixty copies of one have the p-value of one.</summary>
    [Fact]
    public void Copies_of_one_candidate_cost_nothing()
    {
        ScoreMatrix one = Noise(80, 1, 4), copies = new(80, 60);
        for (int i = 0; i < 80; i++)
        {
            for (int j = 0; j < 60; j++)
                copies[i, j] = one[i, 0];
        }

        Assert.Equal(MaxStatisticTest.SignFlip(one, patterns: 2000).StepDown[0], MaxStatisticTest.SignFlip(copies, patterns: 2000).SingleStep[7]);
    }

    /// <summary>
    /// Family-wise error by simulation, small size: no difference anywhere, 30 candidates on 60 rows, independent or sharing half their
    /// variance; the best one's corrected p falls to 0.1 in at most 10 % of runs plus three standard errors.
    /// </summary>
    [Theory]
    [InlineData(0.0)]
    [InlineData(0.5)]
    public void Family_wise_error_is_held(double shared)
    {
        const int runs = 400;
        int claims = 0;
        Parallel.For(0, runs, run =>
        {
            Random random = new(run + 1);
            ScoreMatrix matrix = new(60, 30);
            for (int i = 0; i < 60; i++)
            {
                double common = Gaussian(random) * Math.Sqrt(shared);
                for (int j = 0; j < 30; j++)
                    matrix[i, j] = common + Gaussian(random) * Math.Sqrt(1 - shared);
            }

            if (MaxStatisticTest.SignFlip(matrix, patterns: 499, seed: run, threads: 1) is { } got && got.StepDown[got.Best] <= 0.1)
                Interlocked.Increment(ref claims);
        });
        Assert.InRange(claims / (double)runs, 0.03, 0.1 + 3 * Math.Sqrt(0.1 * 0.9 / runs));
    }

    [Fact]
    public void Groups_turn_their_signs_together()
    {
        ScoreMatrix rows = FromRows([[1.0, 2], [3, 4], [5, 6]]);
        ScoreMatrix sums = rows.SumByGroup(new[] { "kiln 1", "kiln 2", "kiln 1" });
        Assert.Equal((2, 6.0, 8.0, 3.0, 4.0), (sums.Rows, sums[0, 0], sums[0, 1], sums[1, 0], sums[1, 1]));
    }

    [Fact]
    public void Stops_and_reports()
    {
        using CancellationTokenSource stop = new();
        stop.Cancel();
        Assert.ThrowsAny<OperationCanceledException>(() => MaxStatisticTest.SignFlip(Noise(50, 3, 1), cancel: stop.Token));
        double last = 0;
        MaxStatisticTest.SignFlip(Noise(50, 3, 1), patterns: 5000, threads: 1, progress: new Direct(v => last = v));
        Assert.Equal(1, last);
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentNullException>("differences", () => MaxStatisticTest.SignFlip(null!));
        Assert.Throws<ArgumentOutOfRangeException>("patterns", () => MaxStatisticTest.SignFlip(Noise(5, 2, 1), patterns: 0));
        Assert.Throws<ArgumentOutOfRangeException>("rows", () => new ScoreMatrix(0, 1));
        Assert.Throws<ArgumentOutOfRangeException>("rows", () => new ScoreMatrix(100_000, 100_000));
        Assert.Throws<ArgumentOutOfRangeException>("value", () => new ScoreMatrix(1, 1)[0, 0] = double.NaN);
        Assert.Throws<ArgumentOutOfRangeException>("candidate", () => new ScoreMatrix(1, 1)[0, 1]);
        Assert.Throws<ArgumentException>("candidates", () => ScoreMatrix.FromCandidates([[1.0, 2], [1.0]]));
        Assert.Throws<ArgumentException>("baseline", () => Noise(5, 2, 1).Minus([1, 2]));
        Assert.Throws<ArgumentException>("groups", () => Noise(5, 2, 1).SumByGroup(new[] { 1 }));
    }

    private static void Same(ReferenceRow row, string column, IReadOnlyList<double> got, double times)
    {
        double[] want = row.Vector(column);
        for (int j = 0; j < want.Length; j++)
            Assert.True(Math.Abs(want[j] - got[j] * times) < 1e-6, $"{row}\n{column}[{j}]: want {want[j]}, got {got[j] * times}");
    }

    private static ScoreMatrix FromRows(double[][] rows)
    {
        ScoreMatrix matrix = new(rows.Length, rows[0].Length);
        for (int i = 0; i < rows.Length; i++)
        {
            for (int j = 0; j < rows[i].Length; j++)
                matrix[i, j] = rows[i][j];
        }

        return matrix;
    }

    private static ScoreMatrix Noise(int rows, int candidates, int seed)
    {
        Random random = new(seed);
        return FromRows([.. Enumerable.Range(0, rows).Select(_ => Enumerable.Range(0, candidates).Select(_ => Gaussian(random)).ToArray())]);
    }

    private static double Gaussian(Random random) => Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());

    private sealed class Direct(Action<double> report) : IProgress<double>
    {
        public void Report(double value) => report(value);
    }
}
