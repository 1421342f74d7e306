namespace Tare;

/// <summary>
/// Thresholdout: answers many questions about holdout rows while keeping them fresh. It gives back the training value unless training
/// and holdout values differ by more than a noisy threshold; only then does it spend budget and give the holdout value with noise.
/// </summary>
/// <remarks>
/// <para>Source: Dwork, Feldman, Hardt, Pitassi, Reingold and Roth 2015, Generalization in adaptive data analysis and holdout reuse, NIPS (the
/// version in Science 2015 differs in detail).</para>
/// <para>Keep one instance for one set of holdout rows for as long as they are used: a second instance starts a second budget on the same rows and
/// voids the protection. Not safe for use from several threads at once.</para>
/// </remarks>
public sealed class ReusableHoldout
{
    private readonly Func<double, double> _noise;
    private double _noisyThreshold;

    /// <summary>Opens a holdout.</summary>
    /// <param name="threshold">Difference between training and holdout value that is still taken for luck, at least 0; 0.04 is a usual choice.</param>
    /// <param name="noise">Scale of the Laplace noise, above 0; 0.01 is a usual choice.</param>
    /// <param name="budget">How often the holdout may answer itself, at least 1.</param>
    /// <param name="seed">Seed of the noise. Whoever knows it can undo the noise: keep it from those who ask.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    public ReusableHoldout(double threshold, double noise, int budget, int seed)
        : this(threshold, noise, budget, Seeded(seed))
    {
    }

    /// <summary>Opens a holdout with a noise source of one's own.</summary>
    /// <param name="threshold">Difference between training and holdout value that is still taken for luck, at least 0.</param>
    /// <param name="noise">Scale of the Laplace noise, above 0.</param>
    /// <param name="budget">How often the holdout may answer itself, at least 1.</param>
    /// <param name="laplace">Draws one value from the centred Laplace law with the given scale.</param>
    /// <exception cref="ArgumentException">An argument lies outside its domain.</exception>
    public ReusableHoldout(double threshold, double noise, int budget, Func<double, double> laplace)
    {
        Check.AtLeast(threshold, 0, nameof(threshold));
        Check.Positive(noise, nameof(noise));
        Check.AtLeast((long)budget, 1, nameof(budget));
        _noise = Check.NotNull(laplace, nameof(laplace));
        Threshold = threshold;
        Noise = noise;
        BudgetLeft = budget;
        _noisyThreshold = threshold + _noise(2 * noise);
    }

    /// <summary>The threshold without noise.</summary>
    public double Threshold { get; }

    /// <summary>Scale of the noise.</summary>
    public double Noise { get; }

    /// <summary>How often the holdout can still answer itself. For the keeper of the rows, not for those who ask.</summary>
    public int BudgetLeft { get; private set; }

    /// <summary>Asks for the mean of a function of rows, from its means on training and holdout rows.</summary>
    /// <param name="trainingValue">Mean on the training rows, 0 to 1.</param>
    /// <param name="holdoutValue">Mean on the holdout rows, 0 to 1.</param>
    /// <returns>An answer that is safe to act on; null when the budget is spent, and then for every further question.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A value lies outside [0,1] or is NaN.</exception>
    public double? Ask(double trainingValue, double holdoutValue)
    {
        Check.Probability(trainingValue, nameof(trainingValue));
        Check.Probability(holdoutValue, nameof(holdoutValue));
        if (BudgetLeft < 1)
            return null;
        if (!(Math.Abs(holdoutValue - trainingValue) > _noisyThreshold + _noise(4 * Noise)))
            return trainingValue;
        double answer = holdoutValue + _noise(Noise);
        BudgetLeft--;
        _noisyThreshold = Threshold + _noise(2 * Noise);
        return answer;
    }

    private static Func<double, double> Seeded(int seed)
    {
        SplitRandom random = new(seed);
        return scale => Laplace.Quantile(random.Fraction(), scale);
    }
}
