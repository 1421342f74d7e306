namespace Tare;

/// <summary>A check for a unit test: changes the test rows in several ways, runs the choice again, and fails if the winner moves.</summary>
/// <remarks>
/// The choice must be deterministic, so fix its seeds. A choice that reads test rows can pass by chance when few candidates are close; more
/// candidates and more rounds make that rare. Other rows must stay the same from call to call.
/// </remarks>
public static class Invariance
{
    /// <summary>Checks that a choice does not depend on the test rows.</summary>
    /// <typeparam name="TRow">Type of a row's features.</typeparam>
    /// <typeparam name="TLabel">Type of a label.</typeparam>
    /// <typeparam name="TWinner">What the choice gives back; compared with its own equality.</typeparam>
    /// <param name="testX">Features of the test rows, at least 2.</param>
    /// <param name="testY">Their labels, parallel.</param>
    /// <param name="choose">Runs the whole choice with the test rows it is given and returns the winner (a setting, not a fitted model).</param>
    /// <param name="rounds">How often each kind of change is tried, at least 1.</param>
    /// <param name="seed">Seed of the changes.</param>
    /// <exception cref="InvarianceException">The winner moved, or differs between two runs on the same rows.</exception>
    /// <exception cref="ArgumentException">Too few rows, or unequal lengths.</exception>
    public static void WinnerIgnoresTestRows<TRow, TLabel, TWinner>(
        TRow[] testX, TLabel[] testY, Func<TRow[], TLabel[], TWinner> choose, int rounds = 5, int seed = 1)
    {
        Check.NotNull(testX, nameof(testX));
        Check.NotNull(testY, nameof(testY));
        Check.NotNull(choose, nameof(choose));
        Check.AtLeast((long)rounds, 1, nameof(rounds));
        Cut.Parallel(testX.Length, nameof(testX), testY.Length, nameof(testY));
        if (testX.Length < 2)
            throw new ArgumentException($"'testX' has {Check.Text(testX.Length)} rows; at least 2 are needed to change anything.", nameof(testX));
        TWinner winner = choose((TRow[])testX.Clone(), (TLabel[])testY.Clone());
        Compare(winner, choose((TRow[])testX.Clone(), (TLabel[])testY.Clone()), "nothing changed, so the choice is not deterministic: fix its seeds");
        SplitRandom random = new(seed);
        for (int round = 0; round < rounds; round++)
        {
            int[] order = Cut.Indices(testX.Length);
            random.Shuffle(order);
            Compare(winner, choose((TRow[])testX.Clone(), Pick(testY, order)), "the test labels were shuffled");
            random.Shuffle(order);
            Compare(winner, choose(Pick(testX, order), (TLabel[])testY.Clone()), "the test features were shuffled");
            int[] drawn = new int[testX.Length];
            for (int i = 0; i < drawn.Length; i++)
                drawn[i] = random.Below(testX.Length);
            Compare(winner, choose(Pick(testX, drawn), Pick(testY, drawn)), "the test rows were drawn anew with replacement");
            int[] few = new int[Math.Max(1, testX.Length / 2)];
            random.Shuffle(order);
            Array.Copy(order, few, few.Length);
            Compare(winner, choose(Pick(testX, few), Pick(testY, few)), "half of the test rows were left out");
        }
    }

    /// <summary>The same for rows that carry their labels.</summary>
    /// <typeparam name="TRow">Type of a row.</typeparam>
    /// <typeparam name="TWinner">What the choice gives back; compared with its own equality.</typeparam>
    /// <param name="testRows">The test rows, at least 2.</param>
    /// <param name="choose">Runs the whole choice with the test rows it is given and returns the winner.</param>
    /// <param name="rounds">How often each kind of change is tried, at least 1.</param>
    /// <param name="seed">Seed of the changes.</param>
    /// <exception cref="InvarianceException">The winner moved, or differs between two runs on the same rows.</exception>
    /// <exception cref="ArgumentException">Too few rows.</exception>
    public static void WinnerIgnoresTestRows<TRow, TWinner>(TRow[] testRows, Func<TRow[], TWinner> choose, int rounds = 5, int seed = 1)
    {
        Check.NotNull(testRows, nameof(testRows));
        Check.NotNull(choose, nameof(choose));
        WinnerIgnoresTestRows(testRows, testRows, (rows, _) => choose(rows), rounds, seed);
    }

    private static void Compare<TWinner>(TWinner winner, TWinner now, string change)
    {
        if (!EqualityComparer<TWinner>.Default.Equals(winner, now))
            throw new InvarianceException($"The winner moved from {winner} to {now} although only this happened: {change}.");
    }

    private static T[] Pick<T>(T[] rows, int[] places)
    {
        T[] picked = new T[places.Length];
        for (int i = 0; i < picked.Length; i++)
            picked[i] = rows[places[i]];
        return picked;
    }
}
