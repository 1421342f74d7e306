using System.Text;

namespace Tare;

/// <summary>A claim about a winner on test rows, with everything a reader needs to weigh it. It prints itself in one plain line.</summary>
/// <remarks>Made by <see cref="Claim"/>. A dropped verdict claims nothing: print it, store it, or act on <see cref="Passed"/>.</remarks>
public sealed record Verdict
{
    internal Verdict(string metric, double value, long rows, Looks looks)
    {
        Metric = metric;
        Value = value;
        Rows = rows;
        Units = rows;
        FamilyLevel = looks.FamilyLevel;
        Level = looks.Level;
        Candidates = looks.Candidates;
        EarlierLooks = looks.Earlier;
    }

    /// <summary>What was measured, such as accuracy.</summary>
    public string Metric { get; }

    /// <summary>The measured value on the test rows.</summary>
    public double Value { get; }

    /// <summary>Test rows n.</summary>
    public long Rows { get; }

    /// <summary>What was assumed to be independent of each other: the row, or the group of rows.</summary>
    public string Unit { get; internal init; } = "row";

    /// <summary>How many independent units there are: <see cref="Rows"/> unless rows come in groups.</summary>
    public long Units { get; internal init; }

    /// <summary>What the value is compared with; null when nothing was given.</summary>
    public double? Baseline { get; internal init; }

    /// <summary>Where the baseline comes from, in the caller's words.</summary>
    public string? BaselineFrom { get; internal init; }

    /// <summary>Which departure from the baseline counts.</summary>
    public Side Side { get; internal init; } = Side.TwoSided;

    /// <summary>Name of the test; null without a baseline.</summary>
    public string? Test { get; internal init; }

    /// <summary>p-value of the test, not corrected: compare it with <see cref="Level"/>. Null without a baseline.</summary>
    public double? PValue { get; internal init; }

    /// <summary>Level of the whole family of comparisons on these test rows.</summary>
    public double FamilyLevel { get; }

    /// <summary>Level of this comparison: <see cref="FamilyLevel"/> over <see cref="Compared"/> (Bonferroni, so whatever the dependence).</summary>
    public double Level { get; }

    /// <summary>Candidates this program compares on these test rows: 1 after a choice on validation rows.</summary>
    public long Candidates { get; }

    /// <summary>Scores on these test rows that were seen before.</summary>
    public long EarlierLooks { get; }

    /// <summary>Comparisons on these test rows that the level is corrected for: candidates and earlier looks together.</summary>
    public long Compared => Candidates + EarlierLooks;

    /// <summary>Lower end of the interval at 1-<see cref="Level"/>; the end of the domain where only an upper bound belongs to the side. Null where the claim has no interval.</summary>
    public double? Lower { get; internal init; }

    /// <summary>Upper end of the interval; the end of the domain where only a lower bound belongs to the side.</summary>
    public double? Upper { get; internal init; }

    /// <summary>Method of the interval.</summary>
    public string? IntervalMethod { get; internal init; }

    /// <summary>True when the interval is for the difference to the baseline on the same rows rather than for the value.</summary>
    public bool IntervalOfDifference { get; internal init; }

    /// <summary>What must be true of the rows for the numbers to hold.</summary>
    public string Assumption { get; internal init; } = "independent rows";

    /// <summary>Whether the p-value is at most <see cref="Level"/>; null when there is no baseline and so nothing to pass.</summary>
    public bool? Passed => PValue is { } p ? p <= Level : null;

    /// <summary>The whole claim in one plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>passed: accuracy 0.56 on 400 rows is greater than baseline 0.5 (coin): p = 0.009386 &lt;= 0.05 …</c>.</returns>
    public override string ToString()
    {
        StringBuilder line = new();
        if (Passed is { } passed)
            line.Append(passed ? "passed: " : "not passed: ");
        line.Append(Metric).Append(' ').Append(Plain.Number(Value)).Append(" on ").Append(Plain.Count(Rows)).Append(Rows == 1 ? " row" : " rows");
        if (Unit != "row")
            line.Append(" in ").Append(Plain.Count(Units)).Append(' ').Append(Unit).Append('s');
        if (Passed is { } decided)
            AppendTest(line, decided);
        if (Lower is { } lower && Upper is { } upper)
            AppendInterval(line, lower, upper);
        line.Append("; compared on these test rows: ").Append(Plain.Count(Compared));
        if (EarlierLooks > 0)
            line.Append(" (").Append(Plain.Count(Candidates)).Append(" now, ").Append(Plain.Count(EarlierLooks)).Append(" earlier)");
        if (Compared > 1)
            line.Append(", level ").Append(Plain.Level(FamilyLevel)).Append(" for all of them");
        if (PValue is null)
            line.Append("; no baseline, so no pass or fail");
        return line.Append("; assumes ").Append(Assumption).ToString();
    }

    private void AppendTest(StringBuilder line, bool passed)
    {
        if (Baseline is { } baseline)
        {
            string relation = Side switch { Side.Greater => "greater than", Side.Less => "less than", _ => "different from" };
            line.Append(passed ? " is " : " is not shown to be ").Append(relation).Append(" baseline ").Append(Plain.Number(baseline));
            if (BaselineFrom is { } from)
                line.Append(" (").Append(from).Append(')');
        }

        line.Append(": p = ").Append(Plain.Number(PValue!.Value)).Append(passed ? " <= " : " > ").Append(Plain.Level(Level))
            .Append(", ").Append(Test);
    }

    private void AppendInterval(StringBuilder line, double lower, double upper)
    {
        line.Append(IntervalOfDifference ? "; difference " : "; ");
        if (PValue is not null && Side == Side.Greater)
            line.Append("at least ").Append(Plain.Number(lower));
        else if (PValue is not null && Side == Side.Less)
            line.Append("at most ").Append(Plain.Number(upper));
        else
            line.Append(Plain.Number(lower)).Append(" to ").Append(Plain.Number(upper));
        line.Append(" at ").Append(Plain.Percent(1 - Level)).Append(" (").Append(IntervalMethod).Append(')');
    }
}
