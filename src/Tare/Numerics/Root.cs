namespace Tare;

/// <summary>Root of a function that changes sign between two points.</summary>
/// <remarks>Source: Chandrupatla 1997, A new hybrid quadratic/bisection algorithm for finding the zero of a nonlinear function, Adv. Eng. Software 28.</remarks>
internal static class Root
{
    public static double Find(Func<double, double> function, double from, double to, double relative = 1e-15, double absolute = 1e-300)
    {
        double a = from, b = to, fa = function(a), fb = function(b);
        double c = a, fc = fa, t = 0.5;
        for (int step = 0; step < 200; step++)
        {
            double x = a + t * (b - a), fx = function(x);
            if (Math.Sign(fx) == Math.Sign(fa))
            {
                (c, fc) = (a, fa);
            }
            else
            {
                (c, fc) = (b, fb);
                (b, fb) = (a, fa);
            }

            (a, fa) = (x, fx);
            double best = Math.Abs(fa) < Math.Abs(fb) ? a : b;
            double least = (relative * Math.Abs(best) + absolute) / Math.Abs(b - a);
            if (!(least < 0.5) || fa == 0)
                return fa == 0 ? a : best;
            double xi = (a - b) / (c - b), phi = (fa - fb) / (fc - fb);
            t = phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi
                ? fa / (fb - fa) * (fc / (fb - fc)) + (c - a) / (b - a) * (fa / (fc - fa)) * (fb / (fc - fb))
                : 0.5;
            t = Math.Min(1 - least, Math.Max(least, t));
        }

        return a;
    }
}
