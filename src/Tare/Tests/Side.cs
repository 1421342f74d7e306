namespace Tare;

/// <summary>Which departure from the baseline a test looks for.</summary>
public enum Side
{
    /// <summary>Larger than the baseline.</summary>
    Greater,

    /// <summary>Smaller than the baseline.</summary>
    Less,

    /// <summary>Different from the baseline, either way.</summary>
    TwoSided,
}
