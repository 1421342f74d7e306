namespace Tare;

/// <summary>Effective number of independent tests among K correlated ones. Heuristics: none of them guarantees a family's level; <see cref="MaxStatisticTest"/> does.</summary>
/// <param name="Tests">Number of tests K.</param>
/// <param name="Nyholt">Nyholt's number, from the variance of the eigenvalues.</param>
/// <param name="LiJi">Li and Ji's number, from whole and fractional parts of the eigenvalues (it jumps where an eigenvalue crosses a whole number).</param>
/// <param name="Galwey">Galwey's number, from the roots of the eigenvalues.</param>
/// <param name="Gao">Gao's number: principal components that hold 99.5 % of the variance.</param>
public readonly record struct EffectiveTests(int Tests, double Nyholt, double LiJi, double Galwey, int Gao)
{
    /// <summary>Computes all of them from the tests' correlation matrix.</summary>
    /// <param name="correlation">Symmetric K × K matrix with ones on its diagonal and no negative eigenvalue; not changed. K is best below a few hundred.</param>
    /// <returns>The numbers, each between 1 and K up to rounding.</returns>
    /// <exception cref="ArgumentException">Not square, not symmetric, a diagonal entry not 1, an entry outside [-1,1], or a negative eigenvalue.</exception>
    /// <remarks>Sources: Nyholt 2004, Am. J. Hum. Genet. 74; Li and Ji 2005, Heredity 95; Galwey 2009, Genet. Epidemiol. 33; Gao, Starmer and Martin 2008, Genet. Epidemiol. 32.</remarks>
    public static EffectiveTests Of(double[,] correlation)
    {
        Check.NotNull(correlation, nameof(correlation));
        int m = correlation.GetLength(0);
        if (m == 0 || m != correlation.GetLength(1))
            throw new ArgumentException($"'correlation' is {Check.Text(m)} × {Check.Text(correlation.GetLength(1))}; it must be square and not empty.", nameof(correlation));
        for (int i = 0; i < m; i++)
        {
            for (int j = 0; j <= i; j++)
            {
                double value = correlation[i, j];
                if (!(Math.Abs(value) <= 1 + 1e-12) || Math.Abs(value - correlation[j, i]) > 1e-12 || (i == j && Math.Abs(value - 1) > 1e-12))
                    throw Check.OutOfRange(nameof(correlation), value, $"at [{Check.Text(i)}, {Check.Text(j)}] does not belong into a correlation matrix");
            }
        }

        double[] values = SymmetricEigenvalues.Of((double[,])correlation.Clone());
        if (values[m - 1] < -1e-8)
            throw Check.OutOfRange(nameof(correlation), values[m - 1], "is a negative eigenvalue: this is no correlation matrix");
        Moments spread = default;
        double sum = 0, roots = 0, liJi = 0;
        for (int i = 0; i < m; i++)
        {
            // Rounded, so that an eigenvalue of 0.9999999999999998 counts as the 1 it is.
            double value = values[i] = Math.Max(0, Math.Round(values[i], 10));
            spread.Add(value);
            sum += value;
            roots += Math.Sqrt(value);
            liJi += (value >= 1 ? 1 : 0) + (value - Math.Floor(value));
        }

        int gao = 0;
        for (double held = 0; gao < m && held < 0.995 * sum * (1 - 1e-12); gao++)
            held += values[gao];
        return new EffectiveTests(m, 1 + (m - 1) * (1 - spread.Variance / m), liJi, roots * roots / sum, gao);
    }
}
