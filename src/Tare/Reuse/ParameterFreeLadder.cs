namespace Tare;

/// <summary>The Ladder without a step to choose: a submission must beat the last accepted one by one standard error of their difference.</summary>
/// <remarks>
/// <para>Source: Blum and Hardt 2015, The Ladder, ICML, algorithm 2 (from memory; the divisor n-1 of the standard deviation is a choice made here).</para>
/// <para>Keep one instance for one set of holdout rows. Not safe for use from several threads at once.</para>
/// </remarks>
public sealed class ParameterFreeLadder
{
    private readonly double[] _accepted;

    /// <summary>Opens a leaderboard.</summary>
    /// <param name="rows">Holdout rows n, at least 2.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="rows"/> is below 2.</exception>
    public ParameterFreeLadder(int rows)
    {
        Check.AtLeast((long)rows, 2, nameof(rows));
        _accepted = new double[rows];
    }

    /// <summary>Best loss shown so far; infinite before the first submission.</summary>
    public double Best { get; private set; } = double.PositiveInfinity;

    /// <summary>Submits the losses on all holdout rows.</summary>
    /// <param name="losses">One loss a holdout row, each 0 to 1, always in the same order.</param>
    /// <returns>What the leaderboard shows: the mean loss rounded to a multiple of 1/n when it improves by more than a standard error, else the best so far.</returns>
    /// <exception cref="ArgumentException">Another number of losses than rows, or a loss outside [0,1].</exception>
    public double Submit(ReadOnlySpan<double> losses)
    {
        int n = _accepted.Length;
        if (losses.Length != n)
            throw new ArgumentException($"'losses' has {Check.Text(losses.Length)} values for {Check.Text(n)} rows.", nameof(losses));
        Moments differences = default;
        double sum = 0;
        for (int i = 0; i < n; i++)
        {
            Check.Probability(losses[i], nameof(losses));
            differences.Add(losses[i] - _accepted[i]);
            sum += losses[i];
        }

        double mean = sum / n;
        if (mean < Best - Math.Sqrt(differences.Variance / n))
        {
            Best = Math.Round(mean * n) / n;
            losses.CopyTo(_accepted);
        }

        return Best;
    }
}
