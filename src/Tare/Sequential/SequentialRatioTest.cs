namespace Tare;

/// <summary>Wald's sequential probability ratio test of two success probabilities: look after every row, stop when one of them is decided. It assumes independent rows.</summary>
/// <remarks>Source: Wald 1945, Sequential tests of statistical hypotheses, Ann. Math. Statist. 16. The error rates hold nearly (and, with these boundaries, not much above).</remarks>
public sealed class SequentialRatioTest
{
    private readonly double _hit;
    private readonly double _miss;

    /// <summary>Starts a test.</summary>
    /// <param name="baseline">Success probability under no skill, strictly between 0 and 1.</param>
    /// <param name="alternative">Success probability that should be found, strictly between 0 and 1, different from <paramref name="baseline"/>.</param>
    /// <param name="level">Chance of deciding for the alternative when the baseline holds, strictly between 0 and 1.</param>
    /// <param name="missRate">Chance of deciding for the baseline when the alternative holds, strictly between 0 and 1; together with the level below 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    public SequentialRatioTest(double baseline, double alternative, double level = 0.05, double missRate = 0.2)
    {
        Check.Level(baseline, nameof(baseline));
        Check.Level(alternative, nameof(alternative));
        Check.Level(level, nameof(level));
        Check.Level(missRate, nameof(missRate));
        if (alternative == baseline)
            throw Check.OutOfRange(nameof(alternative), alternative, "must differ from baseline");
        if (!(level + missRate < 1))
            throw Check.OutOfRange(nameof(missRate), missRate, $"and level = {Check.Text(level)} must add up to less than 1");
        _hit = Math.Log(alternative / baseline);
        _miss = Stable.Log1p(-alternative) - Stable.Log1p(-baseline);
        UpperBound = Math.Log((1 - missRate) / level);
        LowerBound = Math.Log(missRate / (1 - level));
    }

    /// <summary>Log ratio at which the alternative is decided for.</summary>
    public double UpperBound { get; }

    /// <summary>Log ratio at which the baseline is decided for.</summary>
    public double LowerBound { get; }

    /// <summary>Log likelihood ratio so far.</summary>
    public double LogRatio { get; private set; }

    /// <summary>Rows seen.</summary>
    public long Rows { get; private set; }

    /// <summary>Row (from 1) at which the test was decided; 0 while it is open. Rows after it change nothing of the decision.</summary>
    public long DecidedAt { get; private set; }

    /// <summary>Null while open; true for the alternative, false for the baseline.</summary>
    public bool? Decision { get; private set; }

    /// <summary>Adds one row.</summary>
    /// <param name="hit">Whether it was a success.</param>
    /// <returns>The decision so far.</returns>
    public bool? Add(bool hit)
    {
        Rows++;
        LogRatio += hit ? _hit : _miss;
        if (Decision is null && (LogRatio >= UpperBound || LogRatio <= LowerBound))
        {
            Decision = LogRatio >= UpperBound;
            DecidedAt = Rows;
        }

        return Decision;
    }
}
