namespace Tare;

/// <summary>What the signed-rank test does with differences of exactly zero.</summary>
public enum ZeroDifferences
{
    /// <summary>Left out before ranking (Wilcoxon 1945).</summary>
    Drop,

    /// <summary>Ranked with the others and left out afterwards (Pratt 1959).</summary>
    Pratt,
}
