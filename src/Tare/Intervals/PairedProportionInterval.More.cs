namespace Tare;

/// <content>Further intervals for the difference of two classifiers' accuracies on the same rows.</content>
public static partial class PairedProportionInterval
{
    /// <summary>Tango's score interval: the differences that the score test does not reject; approximate, good from small samples on.</summary>
    /// <param name="rows">All rows, at least 1.</param>
    /// <param name="onlyFirst">Rows only the first gets right, at least 0.</param>
    /// <param name="onlySecond">Rows only the second gets right, at least 0; the two together at most <paramref name="rows"/>.</param>
    /// <param name="confidence">Confidence, strictly between 0 and 1.</param>
    /// <returns>An interval within [-1,1] for accuracy of the first less accuracy of the second.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Tango 1998, Equivalence test and confidence interval for the difference in proportions for the paired-sample design, Statist. Med. 17.</remarks>
    public static Interval Tango(long rows, long onlyFirst, long onlySecond, double confidence = 0.95)
    {
        double z = CheckedZ(rows, onlyFirst, onlySecond, confidence);
        double n = rows, b = onlyFirst, c = onlySecond, difference = (b - c) / n;
        double lower = difference <= -1 ? -1 : Bisect(-1 + 1e-15, difference, d => Score(d) > z);
        double upper = difference >= 1 ? 1 : Bisect(difference, 1 - 1e-15, d => Score(d) > -z);
        return new Interval(lower, upper, confidence, "Tango");

        double Score(double d)
        {
            double half = -b - c + (2 * n - b + c) * d, last = -c * d * (1 - d);
            double q = (Math.Sqrt(Math.Max(0, half * half - 8 * n * last)) - half) / (4 * n);
            double variance = n * (2 * q + d * (1 - d)), distance = b - c - n * d;
            return variance > 0 ? distance / Math.Sqrt(variance) : distance == 0 ? 0 : distance > 0 ? double.PositiveInfinity : double.NegativeInfinity;
        }
    }

    /// <summary>Wald's formula with half a row added to each of the four counts.</summary>
    /// <param name="rows">All rows, at least 1.</param>
    /// <param name="onlyFirst">Rows only the first gets right, at least 0.</param>
    /// <param name="onlySecond">Rows only the second gets right, at least 0; the two together at most <paramref name="rows"/>.</param>
    /// <param name="confidence">Confidence, strictly between 0 and 1.</param>
    /// <returns>An interval cut to [-1,1].</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Agresti and Min 2005, Simple improved confidence intervals for comparing matched proportions, Statist. Med. 24.</remarks>
    public static Interval AgrestiMin(long rows, long onlyFirst, long onlySecond, double confidence = 0.95)
    {
        double z = CheckedZ(rows, onlyFirst, onlySecond, confidence);
        double n = rows + 2.0, gap = (double)onlyFirst - onlySecond, difference = gap / n;
        double reach = z * Math.Sqrt((double)onlyFirst + onlySecond + 1 - gap * gap / n) / n;
        return new Interval(Math.Max(-1, difference - reach), Math.Min(1, difference + reach), confidence, "Agresti-Min");
    }

    /// <summary>Wald's formula with one row added to each discordant count.</summary>
    /// <param name="rows">All rows, at least 1.</param>
    /// <param name="onlyFirst">Rows only the first gets right, at least 0.</param>
    /// <param name="onlySecond">Rows only the second gets right, at least 0; the two together at most <paramref name="rows"/>.</param>
    /// <param name="confidence">Confidence, strictly between 0 and 1.</param>
    /// <returns>An interval cut to [-1,1].</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Bonett and Price 2012, Adjusted Wald confidence interval for a difference of binomial proportions based on paired data, J. Educ. Behav. Statist. 37.</remarks>
    public static Interval BonettPrice(long rows, long onlyFirst, long onlySecond, double confidence = 0.95)
    {
        double z = CheckedZ(rows, onlyFirst, onlySecond, confidence);
        double n = rows + 2.0, p = (onlyFirst + 1.0) / n, q = (onlySecond + 1.0) / n, difference = p - q;
        double reach = z * Math.Sqrt((p + q - difference * difference) / n);
        return new Interval(Math.Max(-1, difference - reach), Math.Min(1, difference + reach), confidence, "Bonett-Price");
    }

    private static double CheckedZ(long rows, long onlyFirst, long onlySecond, double confidence)
    {
        Check.AtLeast(rows, 1, nameof(rows));
        Check.AtLeast(onlyFirst, 0, nameof(onlyFirst));
        Check.AtLeast(onlySecond, 0, nameof(onlySecond));
        if (onlyFirst > rows - onlySecond)
            throw Check.OutOfRange(nameof(onlySecond), onlySecond, $"and onlyFirst = {Check.Text(onlyFirst)} are more than rows = {Check.Text(rows)}");
        Check.Level(confidence, nameof(confidence));
        return Normal.UpperQuantile(0.5 * (1 - confidence));
    }

    private static double Bisect(double low, double high, Func<double, bool> goUp)
    {
        for (int step = 0; step < 200; step++)
        {
            double middle = 0.5 * (low + high);
            if (middle == low || middle == high)
                break;
            if (goUp(middle))
                low = middle;
            else
                high = middle;
        }

        return 0.5 * (low + high);
    }
}
