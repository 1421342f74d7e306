namespace Tare;

/// <summary>How much of a test's level may be spent by the time a share of the planned rows has been seen. With it a test may be looked at while rows come in.</summary>
/// <remarks>Every function starts at 0 and reaches the whole level at t = 1. A two-sided test spends half its level on each side.</remarks>
public static class AlphaSpending
{
    /// <summary>O'Brien–Fleming type: very little early, nearly all at the end.</summary>
    /// <param name="level">Level of one side, strictly between 0 and 1.</param>
    /// <param name="t">Share of the planned rows seen, above 0, at most 1.</param>
    /// <returns>The level spent so far.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Lan and DeMets 1983, Discrete sequential boundaries for clinical trials, Biometrika 70.</remarks>
    public static double OBrienFleming(double level, double t)
    {
        CheckArguments(level, t);
        return 2 * Normal.Upper(Normal.UpperQuantile(0.5 * level) / Math.Sqrt(t));
    }

    /// <summary>Pocock type: spends early.</summary>
    /// <param name="level">Level of one side, strictly between 0 and 1.</param>
    /// <param name="t">Share of the planned rows seen, above 0, at most 1.</param>
    /// <returns>The level spent so far.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Lan and DeMets 1983, Biometrika 70.</remarks>
    public static double Pocock(double level, double t)
    {
        CheckArguments(level, t);
        return level * Stable.Log1p((Math.E - 1) * t);
    }

    /// <summary>Power family: level times t to the power rho.</summary>
    /// <param name="level">Level of one side, strictly between 0 and 1.</param>
    /// <param name="t">Share of the planned rows seen, above 0, at most 1.</param>
    /// <param name="rho">Above 0; 1 spends evenly, larger spends later.</param>
    /// <returns>The level spent so far.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Kim and DeMets 1987, Design and analysis of group sequential tests based on the type I error spending rate function, Biometrika 74.</remarks>
    public static double Power(double level, double t, double rho)
    {
        CheckArguments(level, t);
        Check.Positive(rho, nameof(rho));
        return level * Math.Pow(t, rho);
    }

    /// <summary>Hwang–Shih–DeCani family.</summary>
    /// <param name="level">Level of one side, strictly between 0 and 1.</param>
    /// <param name="t">Share of the planned rows seen, above 0, at most 1.</param>
    /// <param name="gamma">Any finite number; negative spends late, positive early, 0 evenly.</param>
    /// <returns>The level spent so far.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument lies outside its domain or is NaN.</exception>
    /// <remarks>Source: Hwang, Shih and De Cani 1990, Group sequential designs using a family of type I error probability spending functions, Statist. Med. 9.</remarks>
    public static double HwangShihDeCani(double level, double t, double gamma)
    {
        CheckArguments(level, t);
        Check.Finite(gamma, nameof(gamma));
        return gamma == 0 ? level * t : level * Stable.Expm1(-gamma * t) / Stable.Expm1(-gamma);
    }

    private static void CheckArguments(double level, double t)
    {
        Check.Level(level, nameof(level));
        if (!(t > 0 && t <= 1))
            throw Check.OutOfRange(nameof(t), t, "must lie above 0 and at most at 1");
    }
}
