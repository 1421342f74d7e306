namespace Tare;

/// <summary>Largest of K standard normal statistics that all share the same correlation: between Šidák (0) and a single test (1).</summary>
public static class EquicorrelatedMaximum
{
    /// <summary>Probability that the largest (or the largest in size) exceeds a value.</summary>
    /// <param name="value">The value, finite.</param>
    /// <param name="candidates">Number of statistics K, at least 1.</param>
    /// <param name="correlation">Their common correlation, 0 to 1; negative ones are not covered.</param>
    /// <param name="twoSided">Whether sizes are meant.</param>
    /// <returns>A probability.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Dunnett 1955, A multiple comparison procedure for comparing several treatments with a control, JASA 50; by quadrature over the shared factor.</remarks>
    public static double PValue(double value, double candidates, double correlation, bool twoSided = false)
    {
        Check.Finite(value, nameof(value));
        Check.AtLeast(candidates, 1, nameof(candidates));
        Check.Probability(correlation, nameof(correlation));
        if (twoSided && value <= 0)
            return 1;
        if (correlation == 1 || candidates == 1)
            return twoSided ? 2 * Normal.Upper(value) : Normal.Upper(value);
        double shared = Math.Sqrt(correlation), own = Math.Sqrt(1 - correlation);
        if (correlation == 0)
            return Exceeds(0);
        return Math.Min(1, GaussLegendre.Integrate(u => Math.Exp(Normal.LogDensity(u)) * Exceeds(u), -9.5, 9.5, 40));

        double Exceeds(double u)
        {
            double high = (value - shared * u) / own;
            double log = twoSided
                ? Stable.Log1p(-Math.Min(1, Normal.Upper(high) + Normal.Upper((value + shared * u) / own)))
                : Normal.LogUpper(-high);
            return -Stable.Expm1(candidates * log);
        }
    }

    /// <summary>The value that the largest exceeds with the family's level.</summary>
    /// <param name="familyLevel">Level of the family, strictly between 0 and 1.</param>
    /// <param name="candidates">Number of statistics K, at least 1.</param>
    /// <param name="correlation">Their common correlation, 0 to 1.</param>
    /// <param name="twoSided">Whether sizes are meant.</param>
    /// <returns>A critical value.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    public static double CriticalValue(double familyLevel, double candidates, double correlation, bool twoSided = false)
    {
        Check.Level(familyLevel, nameof(familyLevel));
        Check.AtLeast(candidates, 1, nameof(candidates));
        Check.Probability(correlation, nameof(correlation));
        // Šidák's value bounds it from above, a single test's from below.
        double sides = twoSided ? 0.5 : 1;
        double low = Normal.UpperQuantile(sides * familyLevel), high = Normal.UpperQuantile(sides * Thresholds.Sidak(familyLevel, candidates));
        return high - low < 1e-14 || correlation == 0
            ? high
            : correlation == 1
                ? low
                : Root.Find(c => Math.Log(PValue(c, candidates, correlation, twoSided) / familyLevel), low - 1e-9, high + 1e-9, 1e-14);
    }
}
