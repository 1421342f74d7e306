namespace Tare.Analyzers.Knowledge;

/// <summary>The part that a parameter (or <c>this</c>, or <c>return</c>) plays in a member's effect.</summary>
internal enum CatalogueKey
{
    /// <summary>The rows the effect is about.</summary>
    Rows,

    /// <summary>Where the rows are loaded from.</summary>
    Path,

    /// <summary>What is fitted, or what transforms.</summary>
    Model,

    /// <summary>The seed of the random source.</summary>
    Seed,

    /// <summary>The group key that a split keeps together.</summary>
    Group,

    /// <summary>Rows that choose or stop while others are learned from.</summary>
    Validation,

    /// <summary>The values that leave the program or are carried on.</summary>
    Value,

    /// <summary>The number of comparisons, or the p-values whose number it is.</summary>
    Count,

    /// <summary>The level that is corrected.</summary>
    Level,

    /// <summary>The function that an optimiser calls.</summary>
    Objective,

    /// <summary>What a part of a split is for: training, validation or test. A word, not a parameter.</summary>
    Role,

    /// <summary>Whether higher or lower is better. A word, not a parameter.</summary>
    Better,
}
