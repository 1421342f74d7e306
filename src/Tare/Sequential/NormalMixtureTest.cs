namespace Tare;

/// <summary>
/// Always-valid test of a mean with known variance (and, nearly, of any mean over many rows): look after every row, stop whenever you like.
/// It assumes independent rows.
/// </summary>
/// <remarks>Sources: Robbins 1970, Ann. Math. Statist. 41; Johari, Koomen, Pekelis and Walsh 2022, Oper. Res. 70.</remarks>
public sealed class NormalMixtureTest
{
    private readonly double _variance;
    private readonly double _mixing;
    private double _sum;
    private double _best;

    /// <summary>Starts a test.</summary>
    /// <param name="baseline">Mean under the null hypothesis, finite.</param>
    /// <param name="variance">Known variance of one row, above 0.</param>
    /// <param name="mixingVariance">Variance of the normal mixture over means, above 0: about the square of the difference one hopes to find.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    public NormalMixtureTest(double baseline, double variance, double mixingVariance)
    {
        Check.Finite(baseline, nameof(baseline));
        Check.Positive(variance, nameof(variance));
        Check.Positive(mixingVariance, nameof(mixingVariance));
        Baseline = baseline;
        _variance = variance;
        _mixing = mixingVariance;
    }

    /// <summary>Mean under the null hypothesis.</summary>
    public double Baseline { get; }

    /// <summary>Rows seen.</summary>
    public long Rows { get; private set; }

    /// <summary>Mean of the rows seen; the baseline before the first.</summary>
    public double Mean => Rows == 0 ? Baseline : Baseline + _sum / Rows;

    /// <summary>Logarithm of the evidence so far: the mixture likelihood ratio.</summary>
    public double LogEvidence { get; private set; }

    /// <summary>The always-valid p-value: 1 over the largest evidence so far, at most 1.</summary>
    public double PValue => Math.Min(1, Math.Exp(-_best));

    /// <summary>Adds one row.</summary>
    /// <param name="value">Its value, finite.</param>
    /// <returns>The always-valid p-value after it.</returns>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="value"/> is not finite.</exception>
    public double Add(double value)
    {
        Check.Finite(value, nameof(value));
        Rows++;
        _sum += value - Baseline;
        double spread = _variance + Rows * _mixing;
        LogEvidence = 0.5 * Math.Log(_variance / spread) + _mixing * _sum * _sum / (2 * _variance * spread);
        _best = Math.Max(_best, LogEvidence);
        return PValue;
    }

    /// <summary>Half width of the confidence sequence around <see cref="Mean"/>: all of them together cover the true mean with the given confidence.</summary>
    /// <param name="confidence">Confidence, strictly between 0 and 1.</param>
    /// <returns>A half width; infinite before the first row.</returns>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="confidence"/> lies outside (0,1).</exception>
    public double Radius(double confidence = 0.95)
    {
        Check.Level(confidence, nameof(confidence));
        if (Rows == 0)
            return double.PositiveInfinity;
        double n = Rows, spread = _variance + n * _mixing;
        return Math.Sqrt(_variance * spread / (n * n * _mixing) * (-2 * Math.Log(1 - confidence) + Math.Log(spread / _variance)));
    }
}
