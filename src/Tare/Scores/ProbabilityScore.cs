namespace Tare;

/// <summary>Scores of predicted probabilities of a two-class outcome; lower is better. Their per-row values can be claimed with <see cref="Claim.Loss(IEnumerable{double}, double?, string?, long, long, double, string)"/>.</summary>
public static class ProbabilityScore
{
    /// <summary>Mean squared distance of probability and outcome.</summary>
    /// <param name="outcomes">Outcome of each row, at least one.</param>
    /// <param name="probabilities">Predicted probability of a true outcome, parallel, each 0 to 1.</param>
    /// <returns>A number in [0,1].</returns>
    /// <exception cref="ArgumentException">No rows, unequal lengths, or a probability outside [0,1].</exception>
    /// <remarks>Source: Brier 1950, Verification of forecasts expressed in terms of probability, Mon. Weather Rev. 78.</remarks>
    public static double Brier(ReadOnlySpan<bool> outcomes, ReadOnlySpan<double> probabilities)
    {
        CheckRows(outcomes, probabilities);
        double sum = 0;
        for (int i = 0; i < outcomes.Length; i++)
        {
            double distance = probabilities[i] - (outcomes[i] ? 1 : 0);
            sum += distance * distance;
        }

        return sum / outcomes.Length;
    }

    /// <summary>Mean negative log likelihood, in natural units.</summary>
    /// <param name="outcomes">Outcome of each row, at least one.</param>
    /// <param name="probabilities">Predicted probability of a true outcome, parallel, each 0 to 1.</param>
    /// <param name="clip">Probabilities are moved into [clip, 1-clip] first, 0 to below 1/2; at 0 a certain and wrong prediction costs infinity.</param>
    /// <returns>A number of at least 0, infinite only when <paramref name="clip"/> is 0.</returns>
    /// <exception cref="ArgumentException">No rows, unequal lengths, a probability outside [0,1], or a clip outside [0,1/2).</exception>
    /// <remarks>Source: Good 1952, Rational decisions, JRSS B 14.</remarks>
    public static double LogLoss(ReadOnlySpan<bool> outcomes, ReadOnlySpan<double> probabilities, double clip)
    {
        CheckRows(outcomes, probabilities);
        if (!(clip >= 0 && clip < 0.5))
            throw Check.OutOfRange(nameof(clip), clip, "must be at least 0 and below 1/2");
        double sum = 0;
        for (int i = 0; i < outcomes.Length; i++)
        {
            double p = Math.Min(1 - clip, Math.Max(clip, probabilities[i]));
            sum -= outcomes[i] ? Math.Log(p) : Stable.Log1p(-p);
        }

        return sum / outcomes.Length;
    }

    private static void CheckRows(ReadOnlySpan<bool> outcomes, ReadOnlySpan<double> probabilities)
    {
        if (outcomes.IsEmpty)
            throw Check.Empty(nameof(outcomes));
        if (outcomes.Length != probabilities.Length)
            throw Check.UnequalLengths(nameof(outcomes), outcomes.Length, nameof(probabilities), probabilities.Length);
        foreach (double p in probabilities)
            Check.Probability(p, nameof(probabilities));
    }
}
