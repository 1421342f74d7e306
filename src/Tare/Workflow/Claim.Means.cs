namespace Tare;

/// <content>Claims from one real number a test row.</content>
public static partial class Claim
{
    private const string NearNormal = "independent rows and a nearly normal mean";

    /// <summary>A claim about a mean whose good direction is not known: Student's t interval, no pass or fail.</summary>
    /// <param name="perRow">One finite number a test row, such as a squared error; at least 2 rows. Read once.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the mean.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">Fewer than 2 rows, a value that is not finite, or an argument outside its domain.</exception>
    /// <remarks>Source: Student 1908, The probable error of a mean, Biometrika 6. Long-tailed values need many rows for it.</remarks>
    public static Verdict Mean(
        IEnumerable<double> perRow, long candidates = 1, long earlierLooks = 0, double level = 0.05, string metric = "mean") =>
        OfMean(perRow, null, null, Side.TwoSided, new Looks(candidates, earlierLooks, level), metric);

    /// <summary>A claim about a mean loss, lower is better: Student's t test against a fixed baseline, t interval.</summary>
    /// <param name="perRow">One finite loss a test row, such as an absolute error; at least 2 rows. Read once.</param>
    /// <param name="baseline">Mean loss to stay below, finite; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the loss.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">Fewer than 2 rows, a value that is not finite, or an argument outside its domain.</exception>
    /// <remarks>Source: Student 1908, Biometrika 6. When every row has the same value, the exact sign test takes its place.</remarks>
    public static Verdict Loss(
        IEnumerable<double> perRow, double? baseline = null, string? baselineFrom = null, long candidates = 1, long earlierLooks = 0,
        double level = 0.05, string metric = "loss") =>
        OfMean(perRow, baseline, baselineFrom, Side.Less, new Looks(candidates, earlierLooks, level), metric);

    /// <summary>A claim about a mean score, higher is better: Student's t test against a fixed baseline, t interval.</summary>
    /// <param name="perRow">One finite score a test row, such as a profit; at least 2 rows. Read once.</param>
    /// <param name="baseline">Mean score to exceed, finite; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the score.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">Fewer than 2 rows, a value that is not finite, or an argument outside its domain.</exception>
    /// <remarks>Source: Student 1908, Biometrika 6. When every row has the same value, the exact sign test takes its place.</remarks>
    public static Verdict Score(
        IEnumerable<double> perRow, double? baseline = null, string? baselineFrom = null, long candidates = 1, long earlierLooks = 0,
        double level = 0.05, string metric = "score") =>
        OfMean(perRow, baseline, baselineFrom, Side.Greater, new Looks(candidates, earlierLooks, level), metric);

    /// <summary>A claim about a mean loss against another model on the same rows, lower is better: paired t test, t interval of the difference.</summary>
    /// <param name="perRow">The winner's loss on each test row; at least 2 rows. Read once.</param>
    /// <param name="baselinePerRow">The baseline model's loss on the same rows, in the same order.</param>
    /// <param name="baselineFrom">Which model that is, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the loss.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">Fewer than 2 rows, unequal lengths, a value that is not finite, or an argument outside its domain.</exception>
    /// <remarks>Source: Student 1908, Biometrika 6. When every difference is the same, the exact sign test takes its place.</remarks>
    public static Verdict Loss(
        IEnumerable<double> perRow, IEnumerable<double> baselinePerRow, string? baselineFrom = null, long candidates = 1,
        long earlierLooks = 0, double level = 0.05, string metric = "loss") =>
        OfDifference(perRow, baselinePerRow, baselineFrom, Side.Less, new Looks(candidates, earlierLooks, level), metric);

    /// <summary>A claim about a mean score against another model on the same rows, higher is better: paired t test, t interval of the difference.</summary>
    /// <param name="perRow">The winner's score on each test row; at least 2 rows. Read once.</param>
    /// <param name="baselinePerRow">The baseline model's score on the same rows, in the same order.</param>
    /// <param name="baselineFrom">Which model that is, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the score.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">Fewer than 2 rows, unequal lengths, a value that is not finite, or an argument outside its domain.</exception>
    /// <remarks>Source: Student 1908, Biometrika 6. When every difference is the same, the exact sign test takes its place.</remarks>
    public static Verdict Score(
        IEnumerable<double> perRow, IEnumerable<double> baselinePerRow, string? baselineFrom = null, long candidates = 1,
        long earlierLooks = 0, double level = 0.05, string metric = "score") =>
        OfDifference(perRow, baselinePerRow, baselineFrom, Side.Greater, new Looks(candidates, earlierLooks, level), metric);

    private static Verdict OfMean(
        IEnumerable<double> perRow, double? baseline, string? baselineFrom, Side side, Looks looks, string metric)
    {
        Check.NotNull(metric, nameof(metric));
        CheckBaseline(baseline, baselineFrom);
        if (baseline is { } fixedValue)
            Check.Finite(fixedValue, nameof(baseline));
        Moments values = default;
        foreach (double value in Check.NotNull(perRow, nameof(perRow)))
        {
            Check.FiniteRow(value, values.Count, nameof(perRow));
            values.Add(value);
        }

        MeanTest test = MeanTest.Of(values, baseline ?? 0, baseline is null ? Side.TwoSided : side, looks.Level, nameof(perRow));
        Verdict verdict = new(metric, values.Mean, values.Count, looks)
        {
            Lower = test.Lower,
            Upper = test.Upper,
            IntervalMethod = "Student t",
            Assumption = NearNormal,
        };
        return baseline is null
            ? verdict
            : verdict with { Baseline = baseline, BaselineFrom = baselineFrom, Side = side, Test = test.Name, PValue = test.PValue };
    }

    private static Verdict OfDifference(
        IEnumerable<double> perRow, IEnumerable<double> baselinePerRow, string? baselineFrom, Side side, Looks looks, string metric)
    {
        Check.NotNull(metric, nameof(metric));
        Moments values = default, others = default, differences = default;
        foreach ((double value, double other) in InStep(perRow, nameof(perRow), baselinePerRow, nameof(baselinePerRow)))
        {
            Check.FiniteRow(value, values.Count, nameof(perRow));
            Check.FiniteRow(other, values.Count, nameof(baselinePerRow));
            values.Add(value);
            others.Add(other);
            differences.Add(value - other);
        }

        MeanTest test = MeanTest.Of(differences, 0, side, looks.Level, nameof(perRow));
        return new Verdict(metric, values.Mean, values.Count, looks)
        {
            Baseline = others.Mean,
            BaselineFrom = baselineFrom,
            Side = side,
            Test = test.Name == "t test" ? "paired t test" : test.Name,
            PValue = test.PValue,
            Lower = test.Lower,
            Upper = test.Upper,
            IntervalMethod = "Student t",
            IntervalOfDifference = true,
            Assumption = NearNormal,
        };
    }
}
