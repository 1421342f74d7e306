namespace Tare;

/// <summary>Chance that at least one of k tries succeeds, from n tries of which c succeeded. A best-of-k figure: say k beside it.</summary>
public static class PassAtK
{
    /// <summary>The unbiased estimate 1 - C(n-c, k) / C(n, k).</summary>
    /// <param name="tries">Tries made n, at least 1.</param>
    /// <param name="successes">Successes among them c, 0 to n.</param>
    /// <param name="k">Tries allowed, 1 to n.</param>
    /// <returns>A probability.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A count lies outside its domain.</exception>
    /// <remarks>Source: Chen and others 2021, Evaluating large language models trained on code.</remarks>
    public static double Of(long tries, long successes, long k)
    {
        Check.HitsOf(successes, tries, nameof(successes), nameof(tries));
        if (k < 1 || k > tries)
            throw Check.OutOfRange(nameof(k), k, $"must lie between 1 and tries = {Check.Text(tries)}");
        if (tries - successes < k)
            return 1;
        // Product over the successes or the tries, whichever are fewer, in log1p form for small answers.
        double log = 0;
        long fewer = Math.Min(successes, k), other = Math.Max(successes, k);
        for (long i = 0; i < fewer; i++)
            log += Stable.Log1p(-(double)other / (tries - i));
        return -Stable.Expm1(log);
    }
}
