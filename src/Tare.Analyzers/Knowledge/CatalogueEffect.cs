namespace Tare.Analyzers.Knowledge;

/// <summary>What calling, constructing or reading a library member means for rows, models and scores.</summary>
internal enum CatalogueEffect
{
    /// <summary>The result is rows that come from outside the program.</summary>
    Loads,

    /// <summary>The result holds the same rows, possibly in another order or as views of them.</summary>
    Passes,

    /// <summary>The result is computed from the rows, row by row, possibly by a model.</summary>
    Transforms,

    /// <summary>The rows are put in a random order.</summary>
    Shuffles,

    /// <summary>The result holds disjoint parts of the rows.</summary>
    Splits,

    /// <summary>The property or field is one named part of a split.</summary>
    Part,

    /// <summary>The result holds one score and possibly one model for each fold of the rows.</summary>
    CrossValidates,

    /// <summary>A model, a preparation or a statistic is learned from the rows.</summary>
    Fits,

    /// <summary>The rows are handed to a trainer as the ones that decide when it stops.</summary>
    Stops,

    /// <summary>The result, a number or an object of metrics, is a score of the rows.</summary>
    Scores,

    /// <summary>The property reads one score off an object of metrics.</summary>
    Metric,

    /// <summary>The result is a p-value.</summary>
    PValue,

    /// <summary>The result is a cumulative or tail probability, from which code makes a p-value.</summary>
    Tail,

    /// <summary>The value leaves the program.</summary>
    Reports,

    /// <summary>The result still carries the values it was made of: formatting, joining, serialising.</summary>
    Carries,

    /// <summary>A level or p-values are corrected for the number of comparisons.</summary>
    Corrects,

    /// <summary>An optimiser calls the objective and returns the argument that did best.</summary>
    Chooses,

    /// <summary>Models are searched automatically.</summary>
    Searches,

    /// <summary>The result depends on no value of any row.</summary>
    Nothing,
}
