namespace Tare;

/// <summary>A leaderboard that cannot be climbed by luck: it shows a new score only when it beats the best one by a step, and rounds what it shows.</summary>
/// <remarks>
/// <para>Source: Blum and Hardt 2015, The Ladder: a reliable leaderboard for machine learning competitions, ICML, algorithm 1.</para>
/// <para>Keep one instance for one set of holdout rows. Not safe for use from several threads at once.</para>
/// </remarks>
public sealed class Ladder
{
    /// <summary>Opens a leaderboard.</summary>
    /// <param name="step">Improvement below which nothing is shown, above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="step"/> is not above 0.</exception>
    public Ladder(double step)
    {
        Check.Positive(step, nameof(step));
        Step = step;
    }

    /// <summary>The step.</summary>
    public double Step { get; }

    /// <summary>Best loss shown so far; infinite before the first submission.</summary>
    public double Best { get; private set; } = double.PositiveInfinity;

    /// <summary>Submits a loss on the holdout rows.</summary>
    /// <param name="loss">Mean loss, at least 0, finite; lower is better.</param>
    /// <returns>What the leaderboard shows: the loss rounded to a multiple of the step (halves to the even one) when it improves by more than a step, else the best so far.</returns>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="loss"/> is negative, infinite or NaN.</exception>
    public double Submit(double loss)
    {
        Check.AtLeast(loss, 0, nameof(loss));
        if (loss < Best - Step)
            Best = Math.Round(loss / Step) * Step;
        return Best;
    }
}
