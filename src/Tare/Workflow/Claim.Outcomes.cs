namespace Tare;

/// <content>Claims from one outcome (right or wrong) a test row.</content>
public static partial class Claim
{
    /// <summary>A claim about accuracy from one outcome a test row: exact binomial test and Clopper–Pearson interval.</summary>
    /// <param name="correct">For each test row, whether the winner gets it right; at least one row. Read once.</param>
    /// <param name="baseline">Accuracy to beat, 0 to 1; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="side">Which departure from the baseline counts.</param>
    /// <param name="metric">Name of the proportion.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">No rows, or an argument outside its domain.</exception>
    public static Verdict Accuracy(
        IEnumerable<bool> correct, double? baseline = null, string? baselineFrom = null, long candidates = 1, long earlierLooks = 0,
        double level = 0.05, Side side = Side.Greater, string metric = "accuracy")
    {
        long hits = 0, rows = 0;
        foreach (bool hit in Check.NotNull(correct, nameof(correct)))
        {
            rows++;
            hits += hit ? 1 : 0;
        }

        if (rows == 0)
            throw Check.Empty(nameof(correct));
        return Accuracy(hits, rows, baseline, baselineFrom, candidates, earlierLooks, level, side, metric);
    }

    /// <summary>A claim about accuracy against another model on the same rows: exact McNemar test, Newcombe interval of the difference.</summary>
    /// <param name="correct">For each test row, whether the winner gets it right; at least one row. Read once.</param>
    /// <param name="baselineCorrect">For the same rows in the same order, whether the baseline model gets it right.</param>
    /// <param name="baselineFrom">Which model that is, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="side">Which departure from the baseline counts.</param>
    /// <param name="metric">Name of the proportion.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">No rows, unequal lengths, or an argument outside its domain.</exception>
    /// <remarks>Sources: McNemar 1947, Psychometrika 12; Newcombe 1998, Statist. Med. 17.</remarks>
    public static Verdict Accuracy(
        IEnumerable<bool> correct, IEnumerable<bool> baselineCorrect, string? baselineFrom = null, long candidates = 1,
        long earlierLooks = 0, double level = 0.05, Side side = Side.Greater, string metric = "accuracy")
    {
        Check.NotNull(metric, nameof(metric));
        Looks looks = new(candidates, earlierLooks, level);
        long both = 0, first = 0, second = 0, neither = 0;
        foreach ((bool hit, bool other) in InStep(correct, nameof(correct), baselineCorrect, nameof(baselineCorrect)))
        {
            if (hit)
                _ = other ? both++ : first++;
            else
                _ = other ? second++ : neither++;
        }

        long rows = both + first + second + neither;
        if (rows == 0)
            throw Check.Empty(nameof(correct));
        Interval interval = PairedProportionInterval.AtLevel(both, first, second, neither, looks.Level, side);
        return new Verdict(metric, (double)(both + first) / rows, rows, looks)
        {
            Baseline = (double)(both + second) / rows,
            BaselineFrom = baselineFrom,
            Side = side,
            Test = "exact McNemar test",
            PValue = McNemarTest.Exact(first, second, side),
            Lower = interval.Lower,
            Upper = interval.Upper,
            IntervalMethod = interval.Method,
            IntervalOfDifference = true,
        };
    }

    /// <summary>A claim about accuracy from predictions and true labels of the same test rows.</summary>
    /// <typeparam name="T">Label type; labels are compared with their own equality.</typeparam>
    /// <param name="predicted">The winner's prediction for each test row; at least one row. Read once.</param>
    /// <param name="actual">The true labels, in the same order.</param>
    /// <param name="baseline">Accuracy to beat, 0 to 1; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="side">Which departure from the baseline counts.</param>
    /// <param name="metric">Name of the proportion.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">No rows, unequal lengths, or an argument outside its domain.</exception>
    public static Verdict Matches<T>(
        IEnumerable<T> predicted, IEnumerable<T> actual, double? baseline = null, string? baselineFrom = null, long candidates = 1,
        long earlierLooks = 0, double level = 0.05, Side side = Side.Greater, string metric = "accuracy")
    {
        EqualityComparer<T> equality = EqualityComparer<T>.Default;
        long hits = 0, rows = 0;
        foreach ((T guess, T truth) in InStep(predicted, nameof(predicted), actual, nameof(actual)))
        {
            rows++;
            hits += equality.Equals(guess, truth) ? 1 : 0;
        }

        if (rows == 0)
            throw Check.Empty(nameof(predicted));
        return Accuracy(hits, rows, baseline, baselineFrom, candidates, earlierLooks, level, side, metric);
    }

    // Both sequences together; one that ends first is an error, never a silent cut.
    private static IEnumerable<(T First, TOther Second)> InStep<T, TOther>(
        IEnumerable<T> first, string firstName, IEnumerable<TOther> second, string secondName)
    {
        Check.NotNull(first, firstName);
        Check.NotNull(second, secondName);
        return Walk();

        IEnumerable<(T, TOther)> Walk()
        {
            using IEnumerator<T> one = first.GetEnumerator();
            using IEnumerator<TOther> other = second.GetEnumerator();
            long rows = 0;
            while (true)
            {
                bool more = one.MoveNext(), moreOther = other.MoveNext();
                if (more != moreOther)
                    throw new ArgumentException($"'{(more ? secondName : firstName)}' ends after {Check.Text(rows)} rows and '{(more ? firstName : secondName)}' does not; they must be parallel.", secondName);
                if (!more)
                    yield break;
                rows++;
                yield return (one.Current, other.Current);
            }
        }
    }
}
