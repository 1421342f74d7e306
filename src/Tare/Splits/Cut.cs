namespace Tare;

/// <summary>Decides which rows are held out; the public classes only carry rows along.</summary>
internal static class Cut
{
    /// <summary>How many of <paramref name="count"/> rows a share takes: rounded, but never none and never all.</summary>
    public static int Taken(int count, double share, string rowsName)
    {
        Check.Level(share, nameof(share));
        if (count < 2)
            throw new ArgumentException($"'{rowsName}' has {Check.Text(count)} rows; a split needs at least 2.", rowsName);
        return Math.Min(count - 1, Math.Max(1, (int)Math.Round(count * share, MidpointRounding.AwayFromZero)));
    }

    public static bool[] Tail(int count, double share, string rowsName)
    {
        bool[] held = new bool[count];
        int taken = Taken(count, share, rowsName);
        for (int i = count - taken; i < count; i++)
            held[i] = true;
        return held;
    }

    public static bool[] Random(int count, double share, int seed, string rowsName)
    {
        int taken = Taken(count, share, rowsName);
        int[] order = Indices(count);
        new SplitRandom(seed).Shuffle(order);
        bool[] held = new bool[count];
        for (int i = 0; i < taken; i++)
            held[order[i]] = true;
        return held;
    }

    /// <summary>Every label gives its share; largest remainders settle the rest, and a label with one row stays whole.</summary>
    public static bool[] Stratified<TLabel>(IReadOnlyList<TLabel> labels, double share, int seed, string rowsName)
    {
        int taken = Taken(labels.Count, share, rowsName);
        List<List<int>> strata = Gather(labels);
        int[] quota = new int[strata.Count];
        int given = 0;
        for (int s = 0; s < quota.Length; s++)
            given += quota[s] = (int)Math.Floor(strata[s].Count * share);
        // Largest remainder first; ties by order of first appearance, so that the result is the same everywhere.
        int[] byRemainder = Indices(quota.Length);
        double[] remainders = new double[quota.Length];
        for (int s = 0; s < quota.Length; s++)
            remainders[s] = -(strata[s].Count * share - quota[s]) + s * 1e-12;
        Array.Sort(remainders, byRemainder);
        for (int i = 0; i < byRemainder.Length && given < taken; i++)
        {
            if (quota[byRemainder[i]] < strata[byRemainder[i]].Count - 1 || strata[byRemainder[i]].Count > 1 && quota[byRemainder[i]] == 0)
            {
                quota[byRemainder[i]]++;
                given++;
            }
        }

        if (given == 0)
            throw new ArgumentException($"Every label in '{rowsName}' has too few rows to give one away.", rowsName);
        SplitRandom random = new(seed);
        bool[] held = new bool[labels.Count];
        for (int s = 0; s < quota.Length; s++)
        {
            int[] order = strata[s].ToArray();
            random.Shuffle(order);
            for (int i = 0; i < quota[s]; i++)
                held[order[i]] = true;
        }

        return held;
    }

    /// <summary>Whole groups, in random order, until the held rows are as near to the share as they get.</summary>
    public static bool[] ByGroup<TKey>(IReadOnlyList<TKey> keys, double share, int seed, string rowsName)
    {
        int wanted = Taken(keys.Count, share, rowsName);
        List<List<int>> groups = Gather(keys);
        if (groups.Count < 2)
            throw new ArgumentException($"'{rowsName}' holds one group only; a split by group needs at least 2.", rowsName);
        int[] order = Indices(groups.Count);
        new SplitRandom(seed).Shuffle(order);
        bool[] held = new bool[keys.Count];
        int taken = 0, leftOver = groups.Count;
        foreach (int g in order)
        {
            int size = groups[g].Count;
            bool nearer = Math.Abs(taken + size - wanted) < Math.Abs(taken - wanted);
            if (leftOver == 1 || (taken > 0 && !nearer))
                continue;
            foreach (int row in groups[g])
                held[row] = true;
            taken += size;
            leftOver--;
        }

        return held;
    }

    public static int[] Indices(int count)
    {
        int[] indices = new int[count];
        for (int i = 0; i < count; i++)
            indices[i] = i;
        return indices;
    }

    public static T[] Pick<T>(IReadOnlyList<T> rows, bool[] held, bool value)
    {
        int count = 0;
        foreach (bool h in held)
            count += h == value ? 1 : 0;
        T[] picked = new T[count];
        int at = 0;
        for (int i = 0; i < held.Length; i++)
        {
            if (held[i] == value)
                picked[at++] = rows[i];
        }

        return picked;
    }

    public static void Parallel(int first, string firstName, int second, string secondName)
    {
        if (first != second)
            throw Check.UnequalLengths(firstName, first, secondName, second);
    }

    public static IReadOnlyList<TKey> Keys<T, TKey>(IReadOnlyList<T> rows, Func<T, TKey> keyOf, string keyName)
    {
        Check.NotNull(keyOf, keyName);
        TKey[] keys = new TKey[rows.Count];
        for (int i = 0; i < keys.Length; i++)
            keys[i] = keyOf(rows[i]);
        return keys;
    }

    // Rows by key, keys in order of first appearance; null is a key like any other.
    private static List<List<int>> Gather<TKey>(IReadOnlyList<TKey> keys)
    {
        List<List<int>> groups = [];
        Dictionary<ValueTuple<TKey>, int> places = [];
        for (int i = 0; i < keys.Count; i++)
        {
            ValueTuple<TKey> key = new(keys[i]);
            if (!places.TryGetValue(key, out int place))
            {
                place = groups.Count;
                places.Add(key, place);
                groups.Add([]);
            }

            groups[place].Add(i);
        }

        return groups;
    }
}
