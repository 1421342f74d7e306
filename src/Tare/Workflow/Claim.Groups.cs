namespace Tare;

/// <content>Claims where rows come in groups, such as the boards of one kiln load: groups are independent, rows inside a group are not.</content>
public static partial class Claim
{
    private const string ManyGroups = "independent groups, and many of them";

    /// <summary>A claim about accuracy over grouped rows: cluster-robust t test and interval with the group as the unit.</summary>
    /// <typeparam name="TKey">Type of a group key.</typeparam>
    /// <param name="correct">For each test row, whether the winner gets it right. Read once.</param>
    /// <param name="groups">Group key of each row, parallel; at least 2 groups. Approximate: with fewer than about 30 groups it passes a little too often.</param>
    /// <param name="baseline">Accuracy to beat, 0 to 1; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the proportion.</param>
    /// <returns>The claim, whose unit is the group.</returns>
    /// <exception cref="ArgumentException">Unequal lengths, fewer than 2 groups, or an argument outside its domain.</exception>
    /// <remarks>Source: Liang and Zeger 1986, Longitudinal data analysis using generalized linear models, Biometrika 73, for the variance.</remarks>
    public static Verdict AccuracyByGroup<TKey>(
        IEnumerable<bool> correct, IEnumerable<TKey> groups, double? baseline = null, string? baselineFrom = null, long candidates = 1,
        long earlierLooks = 0, double level = 0.05, string metric = "accuracy")
    {
        if (baseline is { } fixedValue)
            Check.Probability(fixedValue, nameof(baseline));
        Check.NotNull(correct, nameof(correct));
        return OfGroups(Numbers(), nameof(correct), groups, baseline, baselineFrom, Side.Greater, new Looks(candidates, earlierLooks, level), metric);

        IEnumerable<double> Numbers()
        {
            foreach (bool hit in correct)
                yield return hit ? 1 : 0;
        }
    }

    /// <summary>A claim about a mean loss over grouped rows, lower is better: cluster-robust t test and interval with the group as the unit.</summary>
    /// <typeparam name="TKey">Type of a group key.</typeparam>
    /// <param name="perRow">One finite loss a test row. Read once. Against another model, give the differences and the baseline 0.</param>
    /// <param name="groups">Group key of each row, parallel; at least 2 groups.</param>
    /// <param name="baseline">Mean loss to stay below, finite; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the loss.</param>
    /// <returns>The claim, whose unit is the group.</returns>
    /// <exception cref="ArgumentException">Unequal lengths, fewer than 2 groups, a value that is not finite, or an argument outside its domain.</exception>
    /// <remarks>Source: Liang and Zeger 1986, Biometrika 73, for the variance.</remarks>
    public static Verdict LossByGroup<TKey>(
        IEnumerable<double> perRow, IEnumerable<TKey> groups, double? baseline = null, string? baselineFrom = null, long candidates = 1,
        long earlierLooks = 0, double level = 0.05, string metric = "loss") =>
        OfGroups(perRow, nameof(perRow), groups, baseline, baselineFrom, Side.Less, new Looks(candidates, earlierLooks, level), metric);

    /// <summary>A claim about a mean score over grouped rows, higher is better: cluster-robust t test and interval with the group as the unit.</summary>
    /// <typeparam name="TKey">Type of a group key.</typeparam>
    /// <param name="perRow">One finite score a test row. Read once. Against another model, give the differences and the baseline 0.</param>
    /// <param name="groups">Group key of each row, parallel; at least 2 groups.</param>
    /// <param name="baseline">Mean score to exceed, finite; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the score.</param>
    /// <returns>The claim, whose unit is the group.</returns>
    /// <exception cref="ArgumentException">Unequal lengths, fewer than 2 groups, a value that is not finite, or an argument outside its domain.</exception>
    /// <remarks>Source: Liang and Zeger 1986, Biometrika 73, for the variance.</remarks>
    public static Verdict ScoreByGroup<TKey>(
        IEnumerable<double> perRow, IEnumerable<TKey> groups, double? baseline = null, string? baselineFrom = null, long candidates = 1,
        long earlierLooks = 0, double level = 0.05, string metric = "score") =>
        OfGroups(perRow, nameof(perRow), groups, baseline, baselineFrom, Side.Greater, new Looks(candidates, earlierLooks, level), metric);

    private static Verdict OfGroups<TKey>(
        IEnumerable<double> perRow, string rowsName, IEnumerable<TKey> groups, double? baseline, string? baselineFrom, Side side, Looks looks, string metric)
    {
        Check.NotNull(metric, nameof(metric));
        CheckBaseline(baseline, baselineFrom);
        if (baseline is { } fixedValue)
            Check.Finite(fixedValue, nameof(baseline));
        Dictionary<ValueTuple<TKey>, (double Sum, long Rows)> sums = [];
        Moments values = default;
        foreach ((double value, TKey group) in InStep(perRow, rowsName, groups, nameof(groups)))
        {
            Check.FiniteRow(value, values.Count, rowsName);
            values.Add(value);
            sums.TryGetValue(new(group), out (double Sum, long Rows) own);
            sums[new(group)] = (own.Sum + value, own.Rows + 1);
        }

        if (sums.Count < 2)
            throw new ArgumentException($"'groups' has {Check.Text(sums.Count)} groups; at least 2 are needed.", nameof(groups));
        // Whole groups' residuals keep whatever dependence there is inside a group.
        double squares = 0;
        foreach ((double sum, long rows) in sums.Values)
            squares += (sum - rows * values.Mean) * (sum - rows * values.Mean);
        double units = sums.Count, error = Math.Sqrt(squares * units / (units - 1)) / values.Count;
        if (!Check.IsFinite(values.Mean) || !Check.IsFinite(error))
            throw new ArgumentException($"The values in '{rowsName}' are too large to average.", rowsName);
        MeanTest test = MeanTest.OfError(values.Mean, error, sums.Count, baseline ?? 0, baseline is null ? Side.TwoSided : side, looks.Level);
        Verdict verdict = new(metric, values.Mean, values.Count, looks)
        {
            Unit = "group",
            Units = sums.Count,
            Lower = test.Lower,
            Upper = test.Upper,
            IntervalMethod = "cluster-robust t",
            Assumption = ManyGroups,
        };
        string name = test.Name == "t test" ? "cluster-robust t test" : test.Name;
        return baseline is null
            ? verdict
            : verdict with { Baseline = baseline, BaselineFrom = baselineFrom, Side = side, Test = name, PValue = test.PValue };
    }
}
