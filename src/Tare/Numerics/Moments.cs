namespace Tare;

/// <summary>
/// Count, mean and sum of squared deviations, by Welford's updates (1962) on the distance to the first value: values near 1e8 that
/// differ by a few units keep all digits of their variance.
/// </summary>
internal struct Moments
{
    private double _first;
    private double _shiftedMean;
    private double _squares;

    public long Count { get; private set; }

    public readonly double Mean => _first + _shiftedMean;

    /// <summary>Sample variance, divisor n-1; 0 for one value.</summary>
    public readonly double Variance => Count < 2 ? 0 : _squares / (Count - 1);

    public void Add(double value)
    {
        if (Count == 0)
            _first = value;
        Count++;
        double shifted = value - _first;
        double before = shifted - _shiftedMean;
        _shiftedMean += before / Count;
        _squares += before * (shifted - _shiftedMean);
    }
}
