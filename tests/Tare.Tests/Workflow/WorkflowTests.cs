namespace Tare.Tests;

public class WorkflowTests
{
    [Fact]
    public void Sealed_rows_open_once()
    {
        SealedTestRows<int[]> rows = Seal.TestRows(new[] { 1, 2, 3 });
        Assert.False(rows.Opened);
        Assert.Equal([1, 2, 3], rows.Open());
        Assert.True(rows.Opened);
        Assert.Throws<InvalidOperationException>(() => rows.Open());
        var (testX, testY) = Seal.TestRows(new[] { 1.0 }, new[] { true }).Open();
        Assert.Equal((1.0, true), (testX[0], testY[0]));
        Assert.Throws<ArgumentNullException>("rows", () => Seal.TestRows((int[])null!));
    }

    [Fact]
    public void Only_one_thread_opens()
    {
        for (int round = 0; round < 50; round++)
        {
            SealedTestRows<int[]> rows = Seal.TestRows(new[] { 1 });
            int opened = 0;
            Parallel.For(0, 8, _ =>
            {
                try
                {
                    rows.Open();
                    Interlocked.Increment(ref opened);
                }
                catch (InvalidOperationException)
                {
                    // The others.
                }
            });
            Assert.Equal(1, opened);
        }
    }

    [Fact]
    public void Choice_is_the_same_whatever_the_number_of_threads()
    {
        int[] candidates = [.. Enumerable.Range(0, 200)];
        Chosen<int> one = Choose.Highest(candidates, c => c % 50), many = Choose.Highest(candidates, c => c % 50, threads: 4);
        Assert.Equal(49, one.Winner);
        Assert.Equal((one.Winner, one.Index, one.Score), (many.Winner, many.Index, many.Score));
        Assert.Equal(one.Scores, many.Scores);
        Assert.Equal(0, Choose.Lowest(candidates, c => c % 50).Winner);
        Assert.Equal("chose candidate 50 of 200 with validation score 49 (flattered by the choice)", one.ToString());
    }

    [Fact]
    public void Choice_reports_and_stops()
    {
        List<int> seen = [];
        using CancellationTokenSource stop = new();
        Assert.Throws<OperationCanceledException>(() => Choose.Highest(new[] { 1, 2, 3 }, c =>
        {
            if (c == 2)
                stop.Cancel();
            return c;
        }, progress: new Direct(seen.Add), cancel: stop.Token));
        Assert.Equal([1, 2], seen);
    }

    /// <summary>A choice that reads the test rows is caught, one that does not passes.</summary>
    [Fact]
    public void Leaking_choice_is_caught()
    {
        Random random = new(5);
        double[] testX = [.. Enumerable.Range(0, 60).Select(_ => random.NextDouble())];
        bool[] testY = [.. testX.Select(x => random.NextDouble() < 0.5)];
        double[] cuts = [.. Enumerable.Range(1, 40).Select(i => i / 41.0)];
        Func<double[], bool[], double> leaking = (x, y) => Choose.Highest(cuts, cut => x.Zip(y, (v, l) => v > cut == l).Count(hit => hit)).Winner;
        InvarianceException error = Assert.Throws<InvarianceException>(() => Invariance.WinnerIgnoresTestRows(testX, testY, leaking));
        Assert.Contains("although only this happened", error.Message);
        Invariance.WinnerIgnoresTestRows(testX, testY, (_, _) => Choose.Highest(cuts, cut => -Math.Abs(cut - 0.3)).Winner);
        int runs = 0;
        Assert.Throws<InvarianceException>(() => Invariance.WinnerIgnoresTestRows(testX, _ => runs++));
    }

    [Fact]
    public void Roles_are_declared_on_parts_of_splits()
    {
        Assert.NotNull(Attribute.GetCustomAttribute(typeof(HeldOut<int[]>).GetProperty("Validation")!, typeof(ValidationRowsAttribute)));
        Assert.NotNull(Attribute.GetCustomAttribute(typeof(HeldOut<int[], int[]>).GetProperty("TrainingY")!, typeof(TrainingRowsAttribute)));
        Assert.NotNull(Attribute.GetCustomAttribute(typeof(Parts<int[]>).GetProperty("Test")!, typeof(TestRowsAttribute)));
        Assert.NotNull(Attribute.GetCustomAttribute(typeof(ChooseJudge<int[], int[]>).GetProperty("TestX")!, typeof(TestRowsAttribute)));
    }

    [Fact]
    public void Bad_input_is_named()
    {
        Assert.Throws<ArgumentException>("candidates", () => Choose.Highest(Array.Empty<int>(), c => c));
        Assert.Throws<ArgumentException>("score", () => Choose.Lowest(new[] { 1 }, _ => double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>("threads", () => Choose.Lowest(new[] { 1 }, _ => 1, threads: 0));
        Assert.Throws<ArgumentException>("testY", () => Invariance.WinnerIgnoresTestRows(new[] { 1, 2 }, new[] { 1 }, (_, _) => 1));
    }

    private sealed class Direct(Action<int> report) : IProgress<int>
    {
        public void Report(int value) => report(value);
    }
}
