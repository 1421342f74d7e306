namespace Tare;

/// <summary>
/// <c>log(1+x)</c> and <c>exp(x)-1</c> that keep full relative accuracy near zero.
/// The base library's <c>double.LogP1</c> and <c>double.ExpM1</c> form 1+x and exp(x)-1 plainly and return 0 for 1e-20.
/// Both use Kahan's correction: the rounding made by forming 1+x (or exp x) is divided out again.
/// </summary>
/// <remarks>Source: W. Kahan's formulas as given by N. J. Higham, Accuracy and Stability of Numerical Algorithms, 2002, section 1.14.1.</remarks>
internal static class Stable
{
    /// <summary>log(1+x) for x >= -1; -Infinity at -1.</summary>
    public static double Log1p(double x)
    {
        double u = 1 + x;
        if (u == 1)
            return x;
        if (u == 0)
            return double.NegativeInfinity;
        // For large x the correction is 1 and Infinity/Infinity must not be formed.
        return x > 1e15 ? Math.Log(u) : Math.Log(u) * (x / (u - 1));
    }

    /// <summary>exp(x)-1; -1 at -Infinity.</summary>
    public static double Expm1(double x)
    {
        if (x > 40 || x < -40)
            return Math.Exp(x) - 1;
        double u = Math.Exp(x);
        if (u == 1)
            return x;
        double below = u - 1;
        return below == -1 ? -1 : below * (x / Math.Log(u));
    }
}
