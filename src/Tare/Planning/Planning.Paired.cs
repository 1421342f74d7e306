namespace Tare;

/// <content>Plans for two models on the same rows, and for two independent sets of rows.</content>
public static partial class Planning
{
    /// <summary>Test rows for McNemar's two-sided test of two classifiers on the same rows; normal approximation.</summary>
    /// <param name="onlyFirst">Share of rows only the first gets right, 0 to 1.</param>
    /// <param name="onlySecond">Share of rows only the second gets right, 0 to 1; the two differ and add up to at most 1.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="power">Power, above the level, below 1.</param>
    /// <param name="comparisons">Comparisons on the test rows, at least 1.</param>
    /// <returns>A number of rows, to be rounded up; <see cref="McNemarPower"/> gives the exact power there, a little lower.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain.</exception>
    /// <remarks>Sources: Miettinen 1968, Biometrics 24; Connor 1987, Sample size for testing differences in proportions for the paired-sample design, Biometrics 43.</remarks>
    public static double RowsForMcNemar(double onlyFirst, double onlySecond, double level = 0.05, double power = 0.8, double comparisons = 1)
    {
        CheckDiscordant(onlyFirst, onlySecond);
        Check.Level(power, nameof(power));
        double each = Thresholds.Bonferroni(level, comparisons);
        if (onlyFirst == onlySecond)
            throw Check.OutOfRange(nameof(onlySecond), onlySecond, "equals onlyFirst: no number of rows shows a difference that is not there");
        if (!(power > each))
            throw Check.OutOfRange(nameof(power), power, $"must exceed the level {Check.Text(each)}");
        double discordant = onlyFirst + onlySecond, difference = Math.Abs(onlyFirst - onlySecond);
        double root = (Normal.UpperQuantile(0.5 * each) * Math.Sqrt(discordant) - Normal.UpperQuantile(power) * Math.Sqrt(discordant - difference * difference)) / difference;
        return root * root;
    }

    /// <summary>Exact power of McNemar's two-sided test, over all discordant counts and their divisions.</summary>
    /// <param name="rows">Test rows, 1 to 20,000 (the cost grows with their square).</param>
    /// <param name="onlyFirst">Share of rows only the first gets right, 0 to 1.</param>
    /// <param name="onlySecond">Share of rows only the second gets right, 0 to 1; the two add up to at most 1.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="comparisons">Comparisons on the test rows, at least 1.</param>
    /// <param name="midP">Whether the mid-p value decides instead of the exact one.</param>
    /// <returns>A probability.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain.</exception>
    public static double McNemarPower(
        long rows, double onlyFirst, double onlySecond, double level = 0.05, double comparisons = 1, bool midP = false)
    {
        Check.AtLeast(rows, 1, nameof(rows));
        if (rows > 20_000)
            throw Check.OutOfRange(nameof(rows), rows, "must be at most 20000");
        CheckDiscordant(onlyFirst, onlySecond);
        double each = Thresholds.Bonferroni(level, comparisons), discordant = onlyFirst + onlySecond;
        if (discordant == 0)
            return 0;
        double share = onlyFirst / discordant, total = 0;
        for (long m = 1; m <= rows; m++)
        {
            double weight = Binomial.Pmf(m, rows, Math.Min(1, discordant));
            if (weight < 1e-18)
                continue;
            // The test rejects when the smaller count is at most some limit, the same on both sides.
            long low = -1, high = (m - 1) / 2;
            while (low < high)
            {
                long middle = high - (high - low) / 2;
                double p = midP ? McNemarTest.MidP(middle, m - middle) : McNemarTest.Exact(middle, m - middle);
                if (p <= each)
                    low = middle;
                else
                    high = middle - 1;
            }

            if (low >= 0)
                total += weight * (Binomial.AtMost(low, m, share) + Binomial.AtLeast(m - low, m, share));
        }

        return Math.Min(1, total);
    }

    /// <summary>Rows of each of two independent samples for the test of two proportions; normal approximation with pooled variance under no difference.</summary>
    /// <param name="first">First proportion, strictly between 0 and 1.</param>
    /// <param name="second">Second proportion, strictly between 0 and 1, different from the first.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="power">Power, above the level, below 1.</param>
    /// <param name="comparisons">Number of comparisons, at least 1.</param>
    /// <param name="twoSided">Whether the test looks both ways.</param>
    /// <returns>A number of rows a sample, to be rounded up.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain.</exception>
    /// <remarks>Source: Fleiss, Levin and Paik 2003, Statistical methods for rates and proportions, chapter 4; as R's <c>power.prop.test</c>.</remarks>
    public static double RowsForTwoProportions(
        double first, double second, double level = 0.05, double power = 0.8, double comparisons = 1, bool twoSided = true)
    {
        (double pooled, double separate, double z, double each) = TwoProportions(first, second, level, comparisons, twoSided);
        Check.Level(power, nameof(power));
        if (!(power > each))
            throw Check.OutOfRange(nameof(power), power, $"must exceed the level {Check.Text(each)}");
        double root = (z * pooled - Normal.UpperQuantile(power) * separate) / (second - first);
        return root * root;
    }

    /// <summary>Power of that test.</summary>
    /// <param name="rows">Rows of each sample, at least 1.</param>
    /// <param name="first">First proportion, strictly between 0 and 1.</param>
    /// <param name="second">Second proportion, strictly between 0 and 1, different from the first.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="comparisons">Number of comparisons, at least 1.</param>
    /// <param name="twoSided">Whether the test looks both ways; passing on the wrong side is not counted.</param>
    /// <returns>A probability.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain.</exception>
    public static double TwoProportionsPower(
        double rows, double first, double second, double level = 0.05, double comparisons = 1, bool twoSided = true)
    {
        Check.AtLeast(rows, 1, nameof(rows));
        (double pooled, double separate, double z, _) = TwoProportions(first, second, level, comparisons, twoSided);
        return Normal.Cdf((Math.Sqrt(rows) * Math.Abs(second - first) - z * pooled) / separate);
    }

    /// <summary>Rows for the two-sided paired t test of a mean difference.</summary>
    /// <param name="difference">True mean difference, not 0.</param>
    /// <param name="standardDeviation">Standard deviation of the differences, above 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="power">Power, above the level, below 1.</param>
    /// <param name="comparisons">Number of comparisons, at least 1.</param>
    /// <returns>A real number of rows of at least 2, to be rounded up.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain.</exception>
    /// <remarks>Source: noncentral t law; as R's <c>power.t.test(type = "paired")</c>.</remarks>
    public static double RowsForPairedT(
        double difference, double standardDeviation, double level = 0.05, double power = 0.8, double comparisons = 1)
    {
        Check.Level(power, nameof(power));
        double each = Thresholds.Bonferroni(level, comparisons);
        if (!(power > each))
            throw Check.OutOfRange(nameof(power), power, $"must exceed the level {Check.Text(each)}");
        double low = 2, high = 4;
        if (PairedTPower(low, difference, standardDeviation, level, comparisons) >= power)
            return low;
        while (PairedTPower(high, difference, standardDeviation, level, comparisons) < power)
        {
            low = high;
            high *= 2;
            if (high > 1e12)
                throw Check.OutOfRange(nameof(difference), difference, "is too small against the standard deviation to be planned for");
        }

        return Root.Find(rows => PairedTPower(rows, difference, standardDeviation, level, comparisons) - power, low, high, 1e-13);
    }

    /// <summary>Power of the two-sided paired t test.</summary>
    /// <param name="rows">Rows, at least 2; real numbers allowed.</param>
    /// <param name="difference">True mean difference, not 0.</param>
    /// <param name="standardDeviation">Standard deviation of the differences, above 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="comparisons">Number of comparisons, at least 1.</param>
    /// <param name="countWrongSide">Whether passing on the wrong side counts too.</param>
    /// <returns>A probability.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain.</exception>
    public static double PairedTPower(
        double rows, double difference, double standardDeviation, double level = 0.05, double comparisons = 1, bool countWrongSide = false)
    {
        Check.AtLeast(rows, 2, nameof(rows));
        Check.Finite(difference, nameof(difference));
        if (difference == 0)
            throw Check.OutOfRange(nameof(difference), difference, "must not be 0");
        Check.Positive(standardDeviation, nameof(standardDeviation));
        double df = rows - 1, delta = Math.Sqrt(rows) * Math.Abs(difference) / standardDeviation;
        double critical = StudentT.UpperQuantile(0.5 * Thresholds.Bonferroni(level, comparisons), df);
        double right = NoncentralT.Upper(critical, df, delta);
        return Math.Min(1, countWrongSide ? right + NoncentralT.Upper(critical, df, -delta) : right);
    }

    private static (double Pooled, double Separate, double Z, double Each) TwoProportions(
        double first, double second, double level, double comparisons, bool twoSided)
    {
        Check.Level(first, nameof(first));
        Check.Level(second, nameof(second));
        if (first == second)
            throw Check.OutOfRange(nameof(second), second, "equals first: no number of rows shows a difference that is not there");
        double each = Thresholds.Bonferroni(level, comparisons), sum = first + second;
        return (
            Math.Sqrt(sum * (1 - 0.5 * sum)),
            Math.Sqrt(first * (1 - first) + second * (1 - second)),
            Normal.UpperQuantile(twoSided ? 0.5 * each : each),
            each);
    }

    private static void CheckDiscordant(double onlyFirst, double onlySecond)
    {
        Check.Probability(onlyFirst, nameof(onlyFirst));
        Check.Probability(onlySecond, nameof(onlySecond));
        if (!(onlyFirst + onlySecond <= 1 + 1e-12))
            throw Check.OutOfRange(nameof(onlySecond), onlySecond, $"and onlyFirst = {Check.Text(onlyFirst)} add up to more than 1");
    }
}
