namespace Tare;

/// <summary>
/// Always-valid test of a success probability: look after every row, stop whenever you like. The p-value never rises, and the chance
/// that it ever falls to a level is at most that level when the probability is <see cref="Baseline"/>. It assumes independent rows.
/// </summary>
/// <remarks>Sources: Robbins 1970, Statistical methods related to the law of the iterated logarithm, Ann. Math. Statist. 41; Johari, Koomen, Pekelis and Walsh 2022, Always valid inference, Oper. Res. 70.</remarks>
public sealed class BernoulliMixtureTest
{
    private readonly double _a;
    private readonly double _b;
    private readonly double _logPrior;
    private double _best;

    /// <summary>Starts a test.</summary>
    /// <param name="baseline">Success probability under the null hypothesis, strictly between 0 and 1.</param>
    /// <param name="a">First parameter of the Beta mixture, above 0.</param>
    /// <param name="b">Second parameter of the Beta mixture, above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    public BernoulliMixtureTest(double baseline, double a = 1, double b = 1)
    {
        Check.Level(baseline, nameof(baseline));
        Check.Positive(a, nameof(a));
        Check.Positive(b, nameof(b));
        Baseline = baseline;
        _a = a;
        _b = b;
        _logPrior = LogBeta(a, b);
    }

    /// <summary>Success probability under the null hypothesis.</summary>
    public double Baseline { get; }

    /// <summary>Rows seen.</summary>
    public long Rows { get; private set; }

    /// <summary>Successes seen.</summary>
    public long Hits { get; private set; }

    /// <summary>Logarithm of the evidence so far: the mixture likelihood ratio.</summary>
    public double LogEvidence { get; private set; }

    /// <summary>The always-valid p-value: 1 over the largest evidence so far, at most 1.</summary>
    public double PValue => Math.Min(1, Math.Exp(-_best));

    /// <summary>Adds one row.</summary>
    /// <param name="hit">Whether it was a success.</param>
    /// <returns>The always-valid p-value after it.</returns>
    public double Add(bool hit)
    {
        Rows++;
        Hits += hit ? 1 : 0;
        LogEvidence = LogBeta(_a + Hits, _b + Rows - Hits) - _logPrior - Hits * Math.Log(Baseline) - (Rows - Hits) * Stable.Log1p(-Baseline);
        _best = Math.Max(_best, LogEvidence);
        return PValue;
    }

    private static double LogBeta(double a, double b) => Gamma.Log(a) + Gamma.Log(b) - Gamma.Log(a + b);
}
