namespace Tare;

/// <summary>Student's t test of a mean and the interval that belongs to it.</summary>
internal readonly record struct MeanTest(string Name, double PValue, double Lower, double Upper)
{
    public static MeanTest Of(Moments values, double baseline, Side side, double level, string rowsName)
    {
        if (values.Count < 2)
            throw new ArgumentException($"'{rowsName}' has {Check.Text(values.Count)} rows; a mean's claim needs at least 2.", rowsName);
        double df = values.Count - 1, error = Math.Sqrt(values.Variance / values.Count);
        if (!Check.IsFinite(values.Mean) || !Check.IsFinite(error))
            throw new ArgumentException($"The values in '{rowsName}' are too large to average.", rowsName);
        double difference = values.Mean - baseline;
        if (error == 0)
        {
            // t does not exist; all differences have one sign, and the sign test still knows how surprising that is.
            long positive = difference > 0 ? values.Count : 0, negative = difference < 0 ? values.Count : 0;
            return new MeanTest("exact sign test", SignTest.PValue(positive, negative, side), values.Mean, values.Mean);
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
            side == Side.Less ? double.NegativeInfinity : values.Mean - reach,
            side == Side.Greater ? double.PositiveInfinity : values.Mean + reach);
    }
}
