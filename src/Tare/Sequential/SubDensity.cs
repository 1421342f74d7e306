namespace Tare;

/// <summary>
/// Density of a Brownian path's value at the last look, restricted to paths that have not left the continuation region at any look:
/// the recursion behind group sequential tests.
/// </summary>
/// <remarks>Source: Armitage, McPherson and Rowe 1969, Repeated significance tests on accumulating data, JRSS A 132.</remarks>
internal sealed class SubDensity(bool twoSided)
{
    private const int Panels = 24;
    private double[] _points = [0];
    private double[] _masses = [1];
    private double _time;

    /// <summary>Probability of lying outside the bound (in standard deviations) at the next look at time t, having stayed inside so far.</summary>
    public double Exit(double bound, double t)
    {
        double step = Math.Sqrt(t - _time), edge = bound * Math.Sqrt(t), upper = 0, lower = 0;
        for (int i = 0; i < _points.Length; i++)
        {
            upper += _masses[i] * Normal.Upper((edge - _points[i]) / step);
            if (twoSided)
                lower += _masses[i] * Normal.Upper((edge + _points[i]) / step);
        }

        return upper + lower;
    }

    /// <summary>Passes the look at time t with this bound and keeps what stays inside.</summary>
    public void Pass(double bound, double t)
    {
        double step = Math.Sqrt(t - _time), edge = bound * Math.Sqrt(t), far = 9 * Math.Sqrt(t);
        double from = twoSided ? -Math.Min(edge, far) : -far, to = Math.Min(edge, far);
        (double[] points, double[] weights) = GaussLegendre.Nodes(from, to, Panels);
        double[] masses = new double[points.Length];
        for (int j = 0; j < points.Length; j++)
        {
            double density = 0;
            for (int i = 0; i < _points.Length; i++)
            {
                double z = (points[j] - _points[i]) / step;
                density += _masses[i] * Math.Exp(-0.5 * z * z);
            }

            masses[j] = weights[j] * density * 0.39894228040143267794 / step;
        }

        (_points, _masses, _time) = (points, masses, t);
    }
}
