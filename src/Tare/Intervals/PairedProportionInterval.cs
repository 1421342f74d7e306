namespace Tare;

/// <summary>Confidence interval for the difference of two classifiers' accuracies on the same rows. It assumes independent rows.</summary>
public static partial class PairedProportionInterval
{
    /// <summary>Newcombe's square-and-add interval of Wilson limits with corrected correlation (his method 10); approximate, good from small samples on.</summary>
    /// <param name="bothRight">Rows both get right, at least 0.</param>
    /// <param name="onlyFirst">Rows only the first gets right, at least 0.</param>
    /// <param name="onlySecond">Rows only the second gets right, at least 0.</param>
    /// <param name="bothWrong">Rows both get wrong, at least 0; the four counts are not all 0.</param>
    /// <param name="confidence">Confidence, strictly between 0 and 1.</param>
    /// <param name="side">Both ends, a lower bound (<see cref="Side.Greater"/>, upper end 1) or an upper bound (<see cref="Side.Less"/>, lower end -1).</param>
    /// <returns>An interval within [-1,1] for accuracy of the first less accuracy of the second.</returns>
    /// <exception cref="ArgumentException">A count is negative, there are no rows, or the confidence lies outside its domain.</exception>
    /// <remarks>Source: Newcombe 1998, Improved confidence intervals for the difference between binomial proportions based on paired data, Statist. Med. 17.</remarks>
    public static Interval Newcombe(
        long bothRight, long onlyFirst, long onlySecond, long bothWrong, double confidence = 0.95, Side side = Side.TwoSided)
    {
        Check.AtLeast(bothRight, 0, nameof(bothRight));
        Check.AtLeast(onlyFirst, 0, nameof(onlyFirst));
        Check.AtLeast(onlySecond, 0, nameof(onlySecond));
        Check.AtLeast(bothWrong, 0, nameof(bothWrong));
        Check.Level(confidence, nameof(confidence));
        if (side is not (Side.TwoSided or Side.Greater or Side.Less))
            throw Check.OutOfRange(nameof(side), side, "is no side");
        if (bothRight == 0 && onlyFirst == 0 && onlySecond == 0 && bothWrong == 0)
            throw Check.Empty(nameof(bothRight));
        return AtLevel(bothRight, onlyFirst, onlySecond, bothWrong, 1 - confidence, side);
    }

    internal static Interval AtLevel(double a, double b, double c, double d, double level, Side side)
    {
        double z = Normal.UpperQuantile(side == Side.TwoSided ? 0.5 * level : level);
        double n = a + b + c + d, first = (a + b) / n, second = (a + c) / n, difference = (b - c) / n;
        (double low1, double high1) = ProportionInterval.WilsonEnds(a + b, n, z);
        (double low2, double high2) = ProportionInterval.WilsonEnds(a + c, n, z);
        double phi = Correlation(a, b, c, d, n);
        double lower = Math.Max(-1, difference - Root(first - low1, high2 - second, phi));
        double upper = Math.Min(1, difference + Root(high1 - first, second - low2, phi));
        return new Interval(side == Side.Less ? -1 : lower, side == Side.Greater ? 1 : upper, 1 - level, "Newcombe");
    }

    private static double Root(double first, double second, double phi) =>
        Math.Sqrt(Math.Max(0, first * first - 2 * phi * first * second + second * second));

    private static double Correlation(double a, double b, double c, double d, double n)
    {
        double margins = Math.Sqrt((a + b) * (c + d)) * Math.Sqrt((a + c) * (b + d));
        if (margins == 0)
            return 0;
        double cross = a * d - b * c;
        return cross > n / 2 ? (cross - n / 2) / margins : cross >= 0 ? 0 : cross / margins;
    }
}
