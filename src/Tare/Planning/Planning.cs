namespace Tare;

/// <summary>Test rows needed, and what given test rows can show, before anything is measured.</summary>
/// <remarks>
/// Several comparisons: the level of each is <c>level / comparisons</c> (Bonferroni), as <see cref="Claim"/> uses it; for another
/// correction pass its level and leave <c>comparisons</c> at 1. All forms assume independent rows. For rows in groups of m with
/// correlation r inside a group, multiply the rows by the design effect 1+(m-1)r.
/// </remarks>
public static partial class Planning
{
    /// <summary>Power of the exact one-sided binomial test of an accuracy against a baseline.</summary>
    /// <param name="rows">Test rows, at least 1.</param>
    /// <param name="baseline">Accuracy to beat, strictly between 0 and 1.</param>
    /// <param name="accuracy">True accuracy, 0 to 1.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="comparisons">Comparisons on the test rows, at least 1.</param>
    /// <returns>Critical count, size and power.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Clopper and Pearson 1934 tails; exact.</remarks>
    public static BinomialPower AccuracyPower(long rows, double baseline, double accuracy, double level = 0.05, double comparisons = 1)
    {
        Check.AtLeast(rows, 1, nameof(rows));
        Check.Level(baseline, nameof(baseline));
        Check.Probability(accuracy, nameof(accuracy));
        double each = Thresholds.Bonferroni(level, comparisons);
        long critical = CriticalCount(rows, baseline, each);
        return new BinomialPower(rows, each, critical, Binomial.AtLeast(critical, rows, baseline), Binomial.AtLeast(critical, rows, accuracy));
    }

    /// <summary>Test rows with which the exact one-sided binomial test finds an accuracy above a baseline.</summary>
    /// <param name="baseline">Accuracy to beat, strictly between 0 and 1.</param>
    /// <param name="accuracy">Accuracy that should be found, above <paramref name="baseline"/>, below 1.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="power">Probability of finding it, above the level, below 1.</param>
    /// <param name="comparisons">Comparisons on the test rows, at least 1.</param>
    /// <returns>Two numbers of rows, since the power is a saw.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain, or more than a million rows would be needed.</exception>
    /// <remarks>Source: exact search over the binomial law (saw-tooth: Chernick and Liu 2002, The saw-toothed behavior of power versus sample size, Am. Statist. 56).</remarks>
    public static RowsNeeded RowsForAccuracy(double baseline, double accuracy, double level = 0.05, double power = 0.8, double comparisons = 1)
    {
        Check.Level(baseline, nameof(baseline));
        Check.Level(accuracy, nameof(accuracy));
        Check.Level(power, nameof(power));
        double each = Thresholds.Bonferroni(level, comparisons);
        if (!(accuracy > baseline))
            throw Check.OutOfRange(nameof(accuracy), accuracy, $"must exceed baseline = {Check.Text(baseline)}");
        if (!(power > each))
            throw Check.OutOfRange(nameof(power), power, $"must exceed the level {Check.Text(each)}");
        double root = (Normal.UpperQuantile(each) * Math.Sqrt(baseline * (1 - baseline)) - Normal.UpperQuantile(power) * Math.Sqrt(accuracy * (1 - accuracy))) / (accuracy - baseline);
        double normal = root * root;
        if (!(normal <= 1e6))
            throw Check.OutOfRange(nameof(accuracy), accuracy, $"needs about {Plain.Number(normal)} rows; more than a million are not searched");
        // The saw's teeth are about one critical count wide, so small plans are searched whole and large ones around the answer.
        long start = normal < 5000 ? 1 : (long)(0.95 * normal) - 300;
        long end = (long)Math.Ceiling(normal < 5000 ? 2 * normal + 300 : 1.05 * normal + 300);
        long first = 0, lastBelow = start - 1;
        double atFirst = 0;
        long critical = CriticalCount(start, baseline, each);
        for (long rows = start; rows <= end; rows++)
        {
            // One row more moves the critical count by one or not at all.
            while (Binomial.AtLeast(critical, rows, baseline) > each)
                critical++;
            double found = Binomial.AtLeast(critical, rows, accuracy);
            if (found < power)
            {
                lastBelow = rows;
            }
            else if (first == 0)
            {
                first = rows;
                atFirst = found;
            }
        }

        long stays = lastBelow + 1;
        return new RowsNeeded(each, first, atFirst, stays, AccuracyPower(stays, baseline, accuracy, each).Power, normal);
    }

    /// <summary>The smallest true accuracy that so many rows show to be above a baseline with the given power.</summary>
    /// <param name="rows">Test rows, at least 1.</param>
    /// <param name="baseline">Accuracy to beat, strictly between 0 and 1.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="power">Probability of showing it, strictly between 0 and 1.</param>
    /// <param name="comparisons">Comparisons on the test rows, at least 1.</param>
    /// <returns>An accuracy in (0,1]; 1 when even a perfect model cannot pass on so few rows (<see cref="AccuracyPower"/> then has a critical count of rows + 1).</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    public static double SmallestAccuracyShown(long rows, double baseline, double level = 0.05, double power = 0.8, double comparisons = 1)
    {
        Check.AtLeast(rows, 1, nameof(rows));
        Check.Level(baseline, nameof(baseline));
        Check.Level(power, nameof(power));
        long critical = CriticalCount(rows, baseline, Thresholds.Bonferroni(level, comparisons));
        return critical > rows ? 1 : Beta.Quantile(power, 1 - power, critical, rows - critical + 1);
    }

    /// <summary>Test rows that make every one of K mean scores lie within a margin of its true value, whatever the law of the scores.</summary>
    /// <param name="margin">Half width, above 0.</param>
    /// <param name="range">Largest less smallest possible score, above 0; 1 for accuracy.</param>
    /// <param name="level">Probability that any of them lies outside, strictly between 0 and 1.</param>
    /// <param name="comparisons">Number of means K, at least 1.</param>
    /// <returns>A number of rows: the next whole one is enough.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Hoeffding 1963, Probability inequalities for sums of bounded random variables, JASA 58, with a union bound.</remarks>
    public static double RowsForMargin(double margin, double range = 1, double level = 0.05, double comparisons = 1)
    {
        Check.Positive(margin, nameof(margin));
        Check.Positive(range, nameof(range));
        Check.Level(level, nameof(level));
        Check.AtLeast(comparisons, 1, nameof(comparisons));
        double ratio = range / margin;
        return ratio * ratio * Math.Log(2 * comparisons / level) / 2;
    }

    // Smallest count whose upper tail at the baseline is at most the level.
    private static long CriticalCount(long rows, double baseline, double level)
    {
        long low = 0, high = rows + 1;
        while (low < high)
        {
            long middle = low + (high - low) / 2;
            if (Binomial.AtLeast(middle, rows, baseline) <= level)
                high = middle;
            else
                low = middle + 1;
        }

        return low;
    }
}
