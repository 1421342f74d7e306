namespace Tare.Analyzers.Flow;

/// <summary>A small immutable set of ids, kept sorted; the empty set costs nothing.</summary>
internal readonly struct IdSet : IEquatable<IdSet>
{
    private readonly int[]? _ids;

    private IdSet(int[]? ids) => _ids = ids;

    public static IdSet Empty => default;

    public bool IsEmpty => _ids is null;

    public int Count => _ids?.Length ?? 0;

    public static IdSet Of(int id) => new(new[] { id });

    public static IdSet Of(IEnumerable<int> ids)
    {
        var set = new SortedSet<int>(ids);
        return set.Count == 0 ? default : new IdSet(set.ToArray());
    }

    public ReadOnlySpan<int>.Enumerator GetEnumerator() => new ReadOnlySpan<int>(_ids).GetEnumerator();

    public int First() => _ids![0];

    public bool Contains(int id) => _ids is not null && Array.BinarySearch(_ids, id) >= 0;

    public IdSet Add(int id) => Contains(id) ? this : Union(Of(id));

    public IdSet Union(IdSet other)
    {
        if (other._ids is null || ReferenceEquals(_ids, other._ids))
            return this;
        if (_ids is null)
            return other;
        int[] a = _ids, b = other._ids;
        if (b.Length <= a.Length && ContainsAll(other))
            return this;
        if (a.Length < b.Length && other.ContainsAll(this))
            return other;
        var merged = new int[a.Length + b.Length];
        int i = 0, j = 0, n = 0;
        while (i < a.Length && j < b.Length)
        {
            if (a[i] == b[j])
            {
                merged[n++] = a[i++];
                j++;
            }
            else
            {
                merged[n++] = a[i] < b[j] ? a[i++] : b[j++];
            }
        }

        while (i < a.Length)
            merged[n++] = a[i++];
        while (j < b.Length)
            merged[n++] = b[j++];
        Array.Resize(ref merged, n);
        return new IdSet(merged);
    }

    /// <summary>At most so many ids, the oldest ones: what came first is nearest to where it matters.</summary>
    public IdSet AtMost(int count)
    {
        if (_ids is null || _ids.Length <= count)
            return this;
        var kept = new int[count];
        Array.Copy(_ids, kept, count);
        return new IdSet(kept);
    }

    public IdSet Except(IdSet other)
    {
        if (_ids is null || other._ids is null || !Overlaps(other))
            return this;
        return Where(id => !other.Contains(id));
    }

    public IdSet Intersect(IdSet other)
    {
        if (_ids is null || other._ids is null)
            return default;
        return Where(other.Contains);
    }

    public IdSet Where(Func<int, bool> keep)
    {
        if (_ids is null)
            return this;
        int[] kept = Array.FindAll(_ids, id => keep(id));
        return kept.Length == _ids.Length ? this : kept.Length == 0 ? default : new IdSet(kept);
    }

    public bool Overlaps(IdSet other)
    {
        if (_ids is null || other._ids is null)
            return false;
        int i = 0, j = 0;
        while (i < _ids.Length && j < other._ids.Length)
        {
            if (_ids[i] == other._ids[j])
                return true;
            if (_ids[i] < other._ids[j])
                i++;
            else
                j++;
        }

        return false;
    }

    public bool ContainsAll(IdSet other)
    {
        foreach (int id in other)
        {
            if (!Contains(id))
                return false;
        }

        return true;
    }

    public bool Equals(IdSet other) =>
        ReferenceEquals(_ids, other._ids) || (Count == other.Count && ContainsAll(other));

    public override bool Equals(object? obj) => obj is IdSet other && Equals(other);

    public override int GetHashCode()
    {
        int hash = 17;
        foreach (int id in this)
            hash = (hash * 31) + id;
        return hash;
    }

    public override string ToString() => "{" + string.Join(",", _ids ?? Array.Empty<int>()) + "}";
}
