namespace Tare;

/// <summary>Student's t test of a mean and the interval that belongs to it.</summary>
internal readonly record struct MeanTest(string Name, double PValue, double Lower, double Upper)
{
    public static MeanTest Of(Moments values, double baseline, Side side, double level, string rowsName)
    {
        if (values.Count < 2)
            throw new ArgumentException($"'{rowsName}' has {Check.Text(values.Count)} rows; a mean's claim needs at least 2.", rowsName);
        double error = Math.Sqrt(values.Variance / values.Count);
        if (!Check.IsFinite(values.Mean) || !Check.IsFinite(error))
            throw new ArgumentException($"The values in '{rowsName}' are too large to average.", rowsName);
        return OfError(values.Mean, error, values.Count, baseline, side, level);
    }

    /// <summary>The same from a mean, its standard error and the number of independent units.</summary>
    public static MeanTest OfError(double mean, double error, long units, double baseline, Side side, double level)
    {
        double df = units - 1, difference = mean - baseline;
        if (error == 0)
        {
            // t does not exist; all differences have one sign, and the sign test still knows how surprising that is.
            long positive = difference > 0 ? units : 0, negative = difference < 0 ? units : 0;
            return new MeanTest("exact sign test", SignTest.PValue(positive, negative, side), mean, mean);
        }

        Tails tails = StudentT.Tails(difference / error, df);
        double p = side switch
        {
            Side.Greater => tails.Upper,
            Side.Less => tails.Lower,
            _ => Math.Min(1, 2 * Math.Min(tails.Lower, tails.Upper)),
        };
        double reach = error * StudentT.UpperQuantile(side == Side.TwoSided ? 0.5 * level : level, df);
        return new MeanTest(
            "t test",
            p,
            side == Side.Less ? double.NegativeInfinity : mean - reach,
            side == Side.Greater ? double.PositiveInfinity : mean + reach);
    }
}
