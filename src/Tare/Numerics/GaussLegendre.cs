namespace Tare;

/// <summary>Gauss–Legendre quadrature over equal panels.</summary>
internal static class GaussLegendre
{
    private const int Order = 24;
    private static readonly double[] Roots = new double[Order];
    private static readonly double[] Weights = new double[Order];

    // Roots of the Legendre polynomial by Newton's method from Tricomi's start.
    static GaussLegendre()
    {
        for (int i = 0; i < Order; i++)
        {
            double x = Math.Cos(Math.PI * (i + 0.75) / (Order + 0.5));
            double slope = 1;
            for (int step = 0; step < 100; step++)
            {
                double previous = 1, value = x;
                for (int n = 2; n <= Order; n++)
                    (previous, value) = (value, ((2 * n - 1) * x * value - (n - 1) * previous) / n);
                slope = Order * (x * value - previous) / (x * x - 1);
                double move = value / slope;
                x -= move;
                if (Math.Abs(move) < 1e-16)
                    break;
            }

            Roots[i] = x;
            Weights[i] = 2 / ((1 - x * x) * slope * slope);
        }
    }

    public static double Integrate(Func<double, double> function, double from, double to, int panels)
    {
        double half = (to - from) / (2 * panels), sum = 0;
        for (int panel = 0; panel < panels; panel++)
        {
            double middle = from + (2 * panel + 1) * half;
            for (int i = 0; i < Order; i++)
                sum += Weights[i] * function(middle + half * Roots[i]);
        }

        return sum * half;
    }

    /// <summary>The points and weights themselves, for sums over a fixed grid.</summary>
    public static (double[] Points, double[] Weights) Nodes(double from, double to, int panels)
    {
        double half = (to - from) / (2 * panels);
        double[] points = new double[panels * Order], weights = new double[panels * Order];
        for (int panel = 0, at = 0; panel < panels; panel++)
        {
            double middle = from + (2 * panel + 1) * half;
            for (int i = Order - 1; i >= 0; i--, at++)
            {
                points[at] = middle + half * Roots[i];
                weights[at] = half * Weights[i];
            }
        }

        return (points, weights);
    }
}
