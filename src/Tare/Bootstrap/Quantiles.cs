namespace Tare;

/// <summary>Sample quantiles.</summary>
public static class Quantiles
{
    /// <summary>Quantile by linear interpolation between order statistics (type 7, the default of most statistics programs).</summary>
    /// <param name="values">Values in any order, at least one, all finite.</param>
    /// <param name="probability">Probability, 0 to 1, both allowed.</param>
    /// <returns>A number between the smallest and the largest value.</returns>
    /// <exception cref="ArgumentException">No values, one that is not finite, or a probability outside [0,1].</exception>
    /// <remarks>Source: Hyndman and Fan 1996, Sample quantiles in statistical packages, Am. Statist. 50.</remarks>
    public static double Of(ReadOnlySpan<double> values, double probability)
    {
        if (values.IsEmpty)
            throw new ArgumentException("'values' is empty.", nameof(values));
        Check.Probability(probability, nameof(probability));
        for (int i = 0; i < values.Length; i++)
            Check.FiniteRow(values[i], i, nameof(values));
        double[] sorted = values.ToArray();
        Array.Sort(sorted);
        return OfSorted(sorted, probability);
    }

    internal static double OfSorted(double[] sorted, double probability)
    {
        double place = probability * (sorted.Length - 1);
        int below = (int)Math.Floor(place);
        return below + 1 >= sorted.Length ? sorted[sorted.Length - 1] : sorted[below] + (place - below) * (sorted[below + 1] - sorted[below]);
    }
}
