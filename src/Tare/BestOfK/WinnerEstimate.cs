namespace Tare;

/// <summary>What the winner's mean score is worth once the luck of having been chosen is taken off.</summary>
/// <param name="Winner">The candidate with the best mean score, from 0; the first among equals.</param>
/// <param name="Raw">Its mean score, which flatters it.</param>
/// <param name="Corrected">The score expected of what this choice picks, on rows it was not chosen on.</param>
/// <param name="Interval">Percentile interval of the corrected score.</param>
public readonly record struct WinnerEstimate(int Winner, double Raw, double Corrected, Interval Interval)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>candidate 17 shows 0.58; corrected for the choice 0.51, 0.43 to 0.59 (95 % bootstrap)</c>.</returns>
    public override string ToString() =>
        $"candidate {Plain.Count(Winner + 1)} shows {Plain.Number(Raw)}; corrected for the choice {Plain.Number(Corrected)}, {Interval}";

    /// <summary>Bootstrap bias correction: on each resample of rows the best candidate is chosen again and scored on the rows the resample left out.</summary>
    /// <param name="scores">Rows × candidates of per-row scores (0/1 or real) on the rows that chose; at least 2 rows.</param>
    /// <param name="higherIsBetter">Direction of the scores.</param>
    /// <param name="resamples">Resamples, at least 100.</param>
    /// <param name="confidence">Confidence of the interval, strictly between 0 and 1.</param>
    /// <param name="seed">Seed.</param>
    /// <returns>The winner, its raw score and the corrected one. Slightly pessimistic, since a resample holds about 63 % of the rows. Rows must be independent; for grouped rows sum by group first.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain.</exception>
    /// <remarks>Source: Tsamardinos, Greasidou and Borboudakis 2018, Bootstrapping the out-of-sample predictions for efficient and accurate cross-validation, Machine Learning 107.</remarks>
    public static WinnerEstimate Bootstrap(
        ScoreMatrix scores, bool higherIsBetter = true, int resamples = 1000, double confidence = 0.95, int seed = 1)
    {
        Check.NotNull(scores, nameof(scores));
        Check.AtLeast((long)scores.Rows, 2, nameof(scores));
        Check.AtLeast((long)resamples, 100, nameof(resamples));
        Check.Level(confidence, nameof(confidence));
        int n = scores.Rows, m = scores.Candidates;
        int[] once = new int[n];
        for (int i = 0; i < n; i++)
            once[i] = 1;
        double[] sums = new double[m];
        int winner = Best(scores, once, higherIsBetter, sums);
        double raw = sums[winner] / n, total = 0;
        double[] outside = new double[resamples];
        int[] times = new int[n];
        for (int r = 0; r < resamples; r++)
        {
            SplitRandom random = new(seed, r);
            int left;
            do
            {
                // A resample that holds every row leaves nothing to score on and is drawn again.
                Array.Clear(times, 0, n);
                left = n;
                for (int i = 0; i < n; i++)
                {
                    if (times[random.Below(n)]++ == 0)
                        left--;
                }
            }
            while (left == 0);
            int chosen = Best(scores, times, higherIsBetter, sums);
            double sum = 0;
            for (int i = 0; i < n; i++)
                sum += times[i] == 0 ? scores.Values[i * m + chosen] : 0;
            total += outside[r] = sum / left;
        }

        Array.Sort(outside);
        double tail = 0.5 * (1 - confidence);
        return new WinnerEstimate(
            winner, raw, total / resamples,
            new Interval(Quantiles.OfSorted(outside, tail), Quantiles.OfSorted(outside, 1 - tail), confidence, "bootstrap"));
    }

    private static int Best(ScoreMatrix scores, int[] times, bool higherIsBetter, double[] sums)
    {
        int m = scores.Candidates;
        Array.Clear(sums, 0, m);
        for (int i = 0; i < times.Length; i++)
        {
            if (times[i] == 0)
                continue;
            for (int j = 0; j < m; j++)
                sums[j] += times[i] * (double)scores.Values[i * m + j];
        }

        int best = 0;
        for (int j = 1; j < m; j++)
        {
            if (higherIsBetter ? sums[j] > sums[best] : sums[j] < sums[best])
                best = j;
        }

        return best;
    }
}
