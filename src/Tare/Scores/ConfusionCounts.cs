namespace Tare;

/// <summary>Counts of a two-class classifier on test rows, and the measures made of them. A measure whose denominator is 0 is null, never NaN.</summary>
public readonly record struct ConfusionCounts
{
    /// <summary>Takes the four counts; they can be added up over parts of the rows.</summary>
    /// <param name="truePositives">Positive rows called positive, at least 0.</param>
    /// <param name="falsePositives">Negative rows called positive, at least 0.</param>
    /// <param name="falseNegatives">Positive rows called negative, at least 0.</param>
    /// <param name="trueNegatives">Negative rows called negative, at least 0; the four are not all 0.</param>
    /// <exception cref="ArgumentException">A count is negative, or there are no rows.</exception>
    public ConfusionCounts(long truePositives, long falsePositives, long falseNegatives, long trueNegatives)
    {
        Check.AtLeast(truePositives, 0, nameof(truePositives));
        Check.AtLeast(falsePositives, 0, nameof(falsePositives));
        Check.AtLeast(falseNegatives, 0, nameof(falseNegatives));
        Check.AtLeast(trueNegatives, 0, nameof(trueNegatives));
        if (truePositives == 0 && falsePositives == 0 && falseNegatives == 0 && trueNegatives == 0)
            throw Check.Empty(nameof(truePositives));
        TruePositives = truePositives;
        FalsePositives = falsePositives;
        FalseNegatives = falseNegatives;
        TrueNegatives = trueNegatives;
    }

    /// <summary>Positive rows called positive.</summary>
    public long TruePositives { get; }

    /// <summary>Negative rows called positive.</summary>
    public long FalsePositives { get; }

    /// <summary>Positive rows called negative.</summary>
    public long FalseNegatives { get; }

    /// <summary>Negative rows called negative.</summary>
    public long TrueNegatives { get; }

    /// <summary>All rows.</summary>
    public double Rows => (double)TruePositives + FalsePositives + FalseNegatives + TrueNegatives;

    /// <summary>Share of rows called rightly.</summary>
    public double Accuracy => ((double)TruePositives + TrueNegatives) / Rows;

    /// <summary>Share of positive rows called positive (recall).</summary>
    public double? Sensitivity => Share(TruePositives, (double)TruePositives + FalseNegatives);

    /// <summary>Share of negative rows called negative.</summary>
    public double? Specificity => Share(TrueNegatives, (double)TrueNegatives + FalsePositives);

    /// <summary>Share of positive calls that are right.</summary>
    public double? Precision => Share(TruePositives, (double)TruePositives + FalsePositives);

    /// <summary>Mean of sensitivity and specificity.</summary>
    public double? BalancedAccuracy => (Sensitivity + Specificity) / 2;

    /// <summary>Harmonic mean of precision and sensitivity.</summary>
    public double? F1 => Share(2.0 * TruePositives, 2.0 * TruePositives + FalsePositives + FalseNegatives);

    /// <summary>Correlation of calls and labels (Matthews 1975), the root taken factor by factor against overflow.</summary>
    public double? MatthewsCorrelation
    {
        get
        {
            double a = (double)TruePositives + FalsePositives, b = (double)TruePositives + FalseNegatives;
            double c = (double)TrueNegatives + FalsePositives, d = (double)TrueNegatives + FalseNegatives;
            return a == 0 || b == 0 || c == 0 || d == 0
                ? null
                : ((double)TruePositives * TrueNegatives - (double)FalsePositives * FalseNegatives) / Math.Sqrt(a) / Math.Sqrt(b) / Math.Sqrt(c) / Math.Sqrt(d);
        }
    }

    /// <summary>Agreement of calls and labels beyond chance (Cohen 1960, Educ. Psychol. Meas. 20).</summary>
    public double? Kappa
    {
        get
        {
            double n = Rows, called = (double)TruePositives + FalsePositives, positive = (double)TruePositives + FalseNegatives;
            double chance = called / n * (positive / n) + (n - called) / n * ((n - positive) / n);
            return chance == 1 ? null : (Accuracy - chance) / (1 - chance);
        }
    }

    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>90 true and 5 false positives, 10 false and 895 true negatives: accuracy 0.985</c>.</returns>
    public override string ToString() =>
        $"{Plain.Count(TruePositives)} true and {Plain.Count(FalsePositives)} false positives, "
        + $"{Plain.Count(FalseNegatives)} false and {Plain.Count(TrueNegatives)} true negatives: accuracy {Plain.Number(Accuracy)}";

    private static double? Share(double part, double whole) => whole == 0 ? null : part / whole;
}
