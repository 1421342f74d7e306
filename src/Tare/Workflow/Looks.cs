namespace Tare;

/// <summary>How many comparisons share the level: candidates compared now and scores seen earlier, on the same test rows.</summary>
internal readonly struct Looks
{
    public Looks(long candidates, long earlierLooks, double level)
    {
        Check.AtLeast(candidates, 1, nameof(candidates));
        Check.AtLeast(earlierLooks, 0, nameof(earlierLooks));
        Check.Level(level, nameof(level));
        if (candidates > long.MaxValue - earlierLooks)
            throw Check.OutOfRange(nameof(earlierLooks), earlierLooks, "is too large beside candidates");
        Candidates = candidates;
        Earlier = earlierLooks;
        FamilyLevel = level;
    }

    public long Candidates { get; }

    public long Earlier { get; }

    public double FamilyLevel { get; }

    public double Level => Thresholds.Bonferroni(FamilyLevel, (double)Candidates + Earlier);
}
