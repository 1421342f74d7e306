namespace Tare;

/// <summary>Turns a winner's score on test rows into a claim: a value with its interval, and a pass or fail against a baseline.</summary>
/// <remarks>
/// <para>Three ways in. From counts: <c>Claim.Accuracy(hits, rows, baseline: 0.5)</c>. From a proportion of so many rows:
/// <c>Claim.Accuracy(accuracy, rows)</c>. From one outcome a test row: <c>Claim.Accuracy(correct)</c>, <c>Claim.Matches(predicted, actual)</c>,
/// <c>Claim.Loss(errors)</c>, <c>Claim.Score(gains)</c>, <c>Claim.Mean(values)</c>.</para>
/// <para>Without a baseline there is an interval and no pass or fail. With one, <c>Passed</c> says whether the p-value is at most the
/// level divided by the number of comparisons on these test rows (Bonferroni: right whatever the dependence among candidates).</para>
/// <para><c>candidates</c>: how many candidates this program compares on these test rows; 1 after a choice on validation rows, K when the
/// winner was chosen on the test rows. <c>earlierLooks</c>: how many scores on these test rows were seen before, by older versions of
/// the program too. Both are added up. Draw new test rows, and earlier looks are 0 again.</para>
/// <para>All forms assume independent rows. Rows in groups (several boards of one kiln load) or in time order break them.</para>
/// <para>Every claim prints itself in one plain line, so it can stand where a raw number stood. Where a model's mistakes can hurt
/// someone, a passed test replaces neither the rules of the field nor licensed judgement.</para>
/// </remarks>
public static partial class Claim
{
    /// <summary>A claim about a proportion from counts: exact binomial test and Clopper–Pearson interval.</summary>
    /// <param name="hits">Test rows the winner gets right, 0 to <paramref name="rows"/>.</param>
    /// <param name="rows">Test rows, at least 1.</param>
    /// <param name="baseline">Proportion to beat, 0 to 1, such as the share of the commonest label; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="side">Which departure from the baseline counts; use <see cref="Side.Less"/> for error counts.</param>
    /// <param name="metric">Name of the proportion.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain; the message names it and its value.</exception>
    /// <remarks>Source: Clopper and Pearson 1934, Biometrika 26; Dunn 1961, JASA 56.</remarks>
    public static Verdict Accuracy(
        long hits, long rows, double? baseline = null, string? baselineFrom = null, long candidates = 1, long earlierLooks = 0,
        double level = 0.05, Side side = Side.Greater, string metric = "accuracy")
    {
        Check.HitsOf(hits, rows, nameof(hits), nameof(rows));
        Check.NotNull(metric, nameof(metric));
        Looks looks = new(candidates, earlierLooks, level);
        CheckBaseline(baseline, baselineFrom);
        double value = (double)hits / rows;
        if (baseline is not { } fixedValue)
        {
            Interval both = ProportionInterval.ClopperPearsonAtLevel(hits, rows, looks.Level, Side.TwoSided);
            return new Verdict(metric, value, rows, looks) { Lower = both.Lower, Upper = both.Upper, IntervalMethod = "Clopper-Pearson" };
        }

        Check.Probability(fixedValue, nameof(baseline));
        Interval interval = ProportionInterval.ClopperPearsonAtLevel(hits, rows, looks.Level, side);
        return new Verdict(metric, value, rows, looks)
        {
            Baseline = baseline,
            BaselineFrom = baselineFrom,
            Side = side,
            Test = "exact binomial test",
            PValue = BinomialTest.PValue(hits, rows, fixedValue, side),
            Lower = interval.Lower,
            Upper = interval.Upper,
            IntervalMethod = "Clopper-Pearson",
        };
    }

    /// <summary>The same from a proportion, which must be a whole number of hits over <paramref name="rows"/>.</summary>
    /// <param name="accuracy">Share of test rows the winner gets right, 0 to 1 (not percent).</param>
    /// <param name="rows">Test rows, at least 1; <paramref name="accuracy"/> times it is a whole number to within 1e-9.</param>
    /// <param name="baseline">Proportion to beat, 0 to 1; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="side">Which departure from the baseline counts.</param>
    /// <param name="metric">Name of the proportion.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain, or the proportion is no count of these rows (a mean of means, a weighted or rounded value).</exception>
    public static Verdict Accuracy(
        double accuracy, long rows, double? baseline = null, string? baselineFrom = null, long candidates = 1, long earlierLooks = 0,
        double level = 0.05, Side side = Side.Greater, string metric = "accuracy")
    {
        Check.Probability(accuracy, nameof(accuracy));
        Check.AtLeast(rows, 1, nameof(rows));
        double hits = accuracy * rows, whole = Math.Round(hits);
        // Above a million rows the proportion's own rounding is what limits it.
        if (Math.Abs(hits - whole) > Math.Max(1e-9, hits * 1e-15))
            throw NoCount(accuracy, rows);
        return Accuracy((long)whole, rows, baseline, baselineFrom, candidates, earlierLooks, level, side, metric);
    }

    /// <summary>The same from a proportion in single precision.</summary>
    /// <param name="accuracy">Share of test rows the winner gets right, 0 to 1 (not percent).</param>
    /// <param name="rows">Test rows, 1 to a million; <paramref name="accuracy"/> times it is a whole number within single precision.</param>
    /// <param name="baseline">Proportion to beat, 0 to 1; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="side">Which departure from the baseline counts.</param>
    /// <param name="metric">Name of the proportion.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain, or the proportion is no count of these rows.</exception>
    public static Verdict Accuracy(
        float accuracy, long rows, double? baseline = null, string? baselineFrom = null, long candidates = 1, long earlierLooks = 0,
        double level = 0.05, Side side = Side.Greater, string metric = "accuracy")
    {
        Check.Probability(accuracy, nameof(accuracy));
        Check.AtLeast(rows, 1, nameof(rows));
        double hits = (double)accuracy * rows, whole = Math.Round(hits);
        if (rows > 1_000_000 || Math.Abs(hits - whole) > hits * 2.4e-7)
            throw NoCount(accuracy, rows);
        return Accuracy((long)whole, rows, baseline, baselineFrom, candidates, earlierLooks, level, side, metric);
    }

    /// <summary>A claim from a p-value of one's own test.</summary>
    /// <param name="pValue">The winner's p-value on the test rows, 0 to 1, not corrected.</param>
    /// <param name="rows">Test rows, at least 1.</param>
    /// <param name="test">Name of the test.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of what is claimed.</param>
    /// <returns>The claim, without an interval.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain; the message names it and its value.</exception>
    public static Verdict PValue(
        double pValue, long rows, string test, long candidates = 1, long earlierLooks = 0, double level = 0.05, string metric = "p-value")
    {
        Check.Probability(pValue, nameof(pValue));
        Check.AtLeast(rows, 1, nameof(rows));
        Check.NotNull(test, nameof(test));
        Check.NotNull(metric, nameof(metric));
        return new Verdict(metric, pValue, rows, new Looks(candidates, earlierLooks, level))
        {
            Test = test,
            PValue = pValue,
            Assumption = "what the test assumes",
        };
    }

    private static void CheckBaseline(double? baseline, string? baselineFrom)
    {
        if (baseline is null && baselineFrom is not null)
            throw new ArgumentException($"'baselineFrom' = \"{baselineFrom}\" names where a baseline comes from, but there is none.", nameof(baselineFrom));
    }

    private static ArgumentException NoCount(double accuracy, long rows) => new(
        $"'accuracy' = {Check.Text(accuracy)} is no whole number of hits in {Check.Text(rows)} rows; give the count or one outcome a row.",
        nameof(accuracy));
}
