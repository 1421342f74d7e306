namespace Tare.Analyzers.Flow;

/// <summary>How a value depends on rows: on one row, on all of them as rows, or on something computed over all of them.</summary>
internal enum Level
{
    /// <summary>One row, or a number that belongs to one row.</summary>
    Element = 0,

    /// <summary>The rows themselves, still a row each.</summary>
    Whole = 1,

    /// <summary>A quantity computed over the rows: a fitted model or a score.</summary>
    Aggregate = 2,
}

/// <summary>Packs a row set and a level into one id, so that tags live in an <see cref="IdSet"/>.</summary>
internal static class Tag
{
    public static int Of(int rows, Level level) => (rows << 2) | (int)level;

    public static int Rows(int tag) => tag >> 2;

    public static Level LevelOf(int tag) => (Level)(tag & 3);

    /// <summary>The row sets that stand in <paramref name="tags"/> at <paramref name="level"/>.</summary>
    public static IdSet At(IdSet tags, Level level)
    {
        var rows = IdSet.Empty;
        foreach (int tag in tags)
        {
            if (LevelOf(tag) == level)
                rows = rows.Add(Rows(tag));
        }

        return rows;
    }

    public static bool Has(IdSet tags, Level level)
    {
        foreach (int tag in tags)
        {
            if (LevelOf(tag) == level)
                return true;
        }

        return false;
    }

    /// <summary>Moves every tag of <paramref name="from"/> level, of rows that pass, to <paramref name="to"/>.</summary>
    public static IdSet Move(IdSet tags, Level from, Level to, Func<int, bool>? rows = null)
    {
        var moved = IdSet.Empty;
        bool changed = false;
        foreach (int tag in tags)
        {
            bool hit = LevelOf(tag) == from && (rows is null || rows(Rows(tag)));
            changed |= hit;
            moved = moved.Add(hit ? Of(Rows(tag), to) : tag);
        }

        return changed ? moved : tags;
    }
}
