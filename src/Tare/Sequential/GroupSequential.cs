namespace Tare;

/// <summary>Tests that may be repeated while rows come in, at planned looks, without passing too often.</summary>
/// <remarks>Looks are given as information fractions: rows seen over rows planned. Statistics are standard normal under no difference, with independent increments; rows must be independent.</remarks>
public static class GroupSequential
{
    /// <summary>Bounds for the statistic at each look, from a spending function.</summary>
    /// <param name="times">Information fractions, strictly increasing, in (0,1]; 1 to 100 looks.</param>
    /// <param name="spending">Level spent on one side as a function of (one-sided level, fraction), such as <see cref="AlphaSpending.OBrienFleming"/>.</param>
    /// <param name="level">Level of the whole test, strictly between 0 and 1.</param>
    /// <param name="twoSided">Whether both sides count; each then gets half the level.</param>
    /// <returns>Bounds in standard deviations: stop when the statistic (its size when two-sided) reaches the bound.</returns>
    /// <exception cref="ArgumentException">Fractions out of order or range, a spending function that does not grow, or a level outside (0,1).</exception>
    /// <remarks>Sources: Lan and DeMets 1983, Biometrika 70; Armitage, McPherson and Rowe 1969, JRSS A 132, for the recursion.</remarks>
    public static double[] Bounds(ReadOnlySpan<double> times, Func<double, double, double> spending, double level = 0.05, bool twoSided = true)
    {
        Check.NotNull(spending, nameof(spending));
        Check.Level(level, nameof(level));
        CheckTimes(times);
        SubDensity paths = new(twoSided);
        double[] bounds = new double[times.Length];
        double spent = 0;
        for (int k = 0; k < bounds.Length; k++)
        {
            double upToNow = twoSided ? 2 * spending(0.5 * level, times[k]) : spending(level, times[k]);
            if (!(upToNow > spent && upToNow <= level * (1 + 1e-12)))
                throw Check.OutOfRange(nameof(spending), upToNow, $"spent at {Check.Text(times[k])} must grow from look to look and not exceed the level");
            bounds[k] = Solve(paths, times[k], upToNow - spent);
            paths.Pass(bounds[k], times[k]);
            spent = upToNow;
        }

        return bounds;
    }

    /// <summary>Pocock's bound: the same at each of K equally spaced looks, two-sided.</summary>
    /// <param name="looks">Number of looks K, 1 to 100.</param>
    /// <param name="level">Level of the whole test, strictly between 0 and 1.</param>
    /// <returns>The bound in standard deviations.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain.</exception>
    /// <remarks>Source: Pocock 1977, Group sequential methods in the design and analysis of clinical trials, Biometrika 64.</remarks>
    public static double PocockBound(int looks, double level = 0.05) => Constant(looks, level, (_, _) => 1);

    /// <summary>O'Brien and Fleming's bound at the last of K equally spaced looks, two-sided; at look k it is this times sqrt(K/k).</summary>
    /// <param name="looks">Number of looks K, 1 to 100.</param>
    /// <param name="level">Level of the whole test, strictly between 0 and 1.</param>
    /// <returns>The bound in standard deviations.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain.</exception>
    /// <remarks>Source: O'Brien and Fleming 1979, A multiple testing procedure for clinical trials, Biometrics 35.</remarks>
    public static double OBrienFlemingBound(int looks, double level = 0.05) => Constant(looks, level, (k, of) => Math.Sqrt((double)of / k));

    /// <summary>What testing at an uncorrected two-sided level at each of K equally spaced looks really costs.</summary>
    /// <param name="looks">Number of looks K, 1 to 100.</param>
    /// <param name="level">Level used at each look, strictly between 0 and 1.</param>
    /// <returns>Probability of passing at least once under no difference.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain.</exception>
    /// <remarks>Source: Armitage, McPherson and Rowe 1969, JRSS A 132.</remarks>
    public static double PeekingErrorRate(int looks, double level = 0.05)
    {
        CheckLooks(looks, level);
        double bound = Normal.UpperQuantile(0.5 * level);
        return ExitOf(looks, bound, (_, _) => 1);
    }

    private static double Constant(int looks, double level, Func<int, int, double> shape)
    {
        CheckLooks(looks, level);
        double low = Normal.UpperQuantile(0.5 * level) * 0.99;
        return Root.Find(bound => ExitOf(looks, bound, shape) - level, low, low + 6, 1e-13);
    }

    private static double ExitOf(int looks, double bound, Func<int, int, double> shape)
    {
        SubDensity paths = new(twoSided: true);
        double exit = 0;
        for (int k = 1; k <= looks; k++)
        {
            double here = bound * shape(k, looks), t = (double)k / looks;
            exit += paths.Exit(here, t);
            if (k < looks)
                paths.Pass(here, t);
        }

        return exit;
    }

    // On the log scale, since an early look may be given 1e-12.
    private static double Solve(SubDensity paths, double t, double exit) =>
        Root.Find(bound => Math.Log(Math.Max(paths.Exit(bound, t), 1e-320) / exit), -5, 38, 1e-14);

    private static void CheckLooks(int looks, double level)
    {
        if (looks < 1 || looks > 100)
            throw Check.OutOfRange(nameof(looks), looks, "must lie between 1 and 100");
        Check.Level(level, nameof(level));
    }

    private static void CheckTimes(ReadOnlySpan<double> times)
    {
        if (times.IsEmpty || times.Length > 100)
            throw new ArgumentException($"'times' has {Check.Text(times.Length)} looks; 1 to 100 are possible.", nameof(times));
        double before = 0;
        foreach (double t in times)
        {
            if (!(t > before && t <= 1))
                throw Check.OutOfRange(nameof(times), t, $"must lie above the look before ({Check.Text(before)}) and at most at 1");
            before = t;
        }
    }
}
