using System.Threading;
using System.Threading.Tasks;

namespace Tare;

/// <summary>Chooses a candidate by its score on validation rows, in parallel if asked, with the same result whatever the number of threads.</summary>
public static class Choose
{
    /// <summary>Takes the candidate with the highest score.</summary>
    /// <typeparam name="TCandidate">Type of a candidate.</typeparam>
    /// <param name="candidates">The candidates, at least one.</param>
    /// <param name="score">Fits a candidate on the fitting rows and scores it on validation rows; finite. Called once a candidate, from several threads when <paramref name="threads"/> is above 1.</param>
    /// <param name="threads">How many candidates are scored at a time, at least 1.</param>
    /// <param name="progress">Told the number of candidates scored so far.</param>
    /// <param name="cancel">Stops before the next candidate.</param>
    /// <returns>The winner, the first among equals, with all scores.</returns>
    /// <exception cref="ArgumentException">No candidates, or a score that is not finite.</exception>
    /// <exception cref="OperationCanceledException">It was cancelled.</exception>
    public static Chosen<TCandidate> Highest<TCandidate>(
        IReadOnlyList<TCandidate> candidates, Func<TCandidate, double> score, int threads = 1, IProgress<int>? progress = null,
        CancellationToken cancel = default) => Best(candidates, score, 1, threads, progress, cancel);

    /// <summary>Takes the candidate with the lowest score, such as a loss.</summary>
    /// <typeparam name="TCandidate">Type of a candidate.</typeparam>
    /// <param name="candidates">The candidates, at least one.</param>
    /// <param name="score">Fits a candidate on the fitting rows and scores it on validation rows; finite. Called once a candidate, from several threads when <paramref name="threads"/> is above 1.</param>
    /// <param name="threads">How many candidates are scored at a time, at least 1.</param>
    /// <param name="progress">Told the number of candidates scored so far.</param>
    /// <param name="cancel">Stops before the next candidate.</param>
    /// <returns>The winner, the first among equals, with all scores.</returns>
    /// <exception cref="ArgumentException">No candidates, or a score that is not finite.</exception>
    /// <exception cref="OperationCanceledException">It was cancelled.</exception>
    public static Chosen<TCandidate> Lowest<TCandidate>(
        IReadOnlyList<TCandidate> candidates, Func<TCandidate, double> score, int threads = 1, IProgress<int>? progress = null,
        CancellationToken cancel = default) => Best(candidates, score, -1, threads, progress, cancel);

    private static Chosen<TCandidate> Best<TCandidate>(
        IReadOnlyList<TCandidate> candidates, Func<TCandidate, double> score, int direction, int threads, IProgress<int>? progress,
        CancellationToken cancel)
    {
        Check.NotNull(candidates, nameof(candidates));
        Check.NotNull(score, nameof(score));
        Check.AtLeast((long)threads, 1, nameof(threads));
        if (candidates.Count == 0)
            throw new ArgumentException("'candidates' is empty.", nameof(candidates));
        double[] scores = new double[candidates.Count];
        int done = 0;
        if (threads == 1)
        {
            for (int i = 0; i < scores.Length; i++)
            {
                cancel.ThrowIfCancellationRequested();
                scores[i] = score(candidates[i]);
                progress?.Report(++done);
            }
        }
        else
        {
            Parallel.For(0, scores.Length, new ParallelOptions { MaxDegreeOfParallelism = threads, CancellationToken = cancel }, i =>
            {
                scores[i] = score(candidates[i]);
                progress?.Report(Interlocked.Increment(ref done));
            });
        }

        int best = 0;
        for (int i = 0; i < scores.Length; i++)
        {
            if (!Check.IsFinite(scores[i]))
                throw new ArgumentException($"'score' gave {Check.Text(scores[i])} for candidate {Check.Text(i)}; scores must be finite.", nameof(score));
            if (direction * scores[i] > direction * scores[best])
                best = i;
        }

        return new Chosen<TCandidate>(candidates[best], best, scores[best], scores);
    }
}
