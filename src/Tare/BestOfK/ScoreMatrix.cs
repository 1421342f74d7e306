namespace Tare;

/// <summary>Per-row scores of K candidates on the same rows, packed in single precision (4 bytes a score, no other copy is made).</summary>
/// <remarks>Whole numbers up to 16 million are held exactly, so 0/1 outcomes and their differences are.</remarks>
public sealed class ScoreMatrix
{
    /// <summary>Makes a matrix of zeros to be filled.</summary>
    /// <param name="rows">Rows, at least 1.</param>
    /// <param name="candidates">Candidates, at least 1; rows times candidates at most 2147 million.</param>
    /// <exception cref="ArgumentOutOfRangeException">A size lies outside its domain.</exception>
    public ScoreMatrix(int rows, int candidates)
    {
        Check.AtLeast((long)rows, 1, nameof(rows));
        Check.AtLeast((long)candidates, 1, nameof(candidates));
        if ((long)rows * candidates > 0x7FEFFFFF)
            throw Check.OutOfRange(nameof(rows), rows, $"times candidates = {Check.Text(candidates)} is more than 2147 million scores");
        Rows = rows;
        Candidates = candidates;
        Values = new float[rows * candidates];
    }

    /// <summary>Number of rows.</summary>
    public int Rows { get; }

    /// <summary>Number of candidates.</summary>
    public int Candidates { get; }

    internal float[] Values { get; }

    /// <summary>The score of a candidate on a row; finite.</summary>
    /// <param name="row">Row, from 0.</param>
    /// <param name="candidate">Candidate, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An index or the value lies outside its domain.</exception>
    public double this[int row, int candidate]
    {
        get => Values[Place(row, candidate)];
        set
        {
            if (!(Math.Abs(value) <= float.MaxValue))
                throw Check.OutOfRange(nameof(value), value, "must be finite in single precision");
            Values[Place(row, candidate)] = (float)value;
        }
    }

    /// <summary>Packs one array a candidate.</summary>
    /// <param name="candidates">For each candidate its scores on the same rows in the same order; at least one candidate and one row, all finite.</param>
    /// <returns>The matrix.</returns>
    /// <exception cref="ArgumentException">Nothing given, unequal lengths, or a score that is not finite.</exception>
    public static ScoreMatrix FromCandidates(IReadOnlyList<IReadOnlyList<double>> candidates)
    {
        Check.NotNull(candidates, nameof(candidates));
        if (candidates.Count == 0)
            throw new ArgumentException("'candidates' is empty.", nameof(candidates));
        int rows = Check.NotNull(candidates[0], nameof(candidates)).Count;
        if (rows == 0)
            throw Check.Empty(nameof(candidates));
        ScoreMatrix matrix = new(rows, candidates.Count);
        for (int j = 0; j < candidates.Count; j++)
        {
            IReadOnlyList<double> scores = Check.NotNull(candidates[j], nameof(candidates));
            if (scores.Count != rows)
                throw new ArgumentException($"Candidate {Check.Text(j)} has {Check.Text(scores.Count)} rows and candidate 0 has {Check.Text(rows)}.", nameof(candidates));
            for (int i = 0; i < rows; i++)
            {
                if (!(Math.Abs(scores[i]) <= float.MaxValue))
                    throw Check.OutOfRange(nameof(candidates), scores[i], $"at candidate {Check.Text(j)}, row {Check.Text(i)} must be finite in single precision");
                matrix.Values[(long)i * matrix.Candidates + j] = (float)scores[i];
            }
        }

        return matrix;
    }

    /// <summary>Subtracts a baseline's score on each row from every candidate's, in place.</summary>
    /// <param name="baseline">One finite score a row.</param>
    /// <returns>This matrix.</returns>
    /// <exception cref="ArgumentException">Another number of rows, or a score that is not finite.</exception>
    public ScoreMatrix Minus(ReadOnlySpan<double> baseline)
    {
        if (baseline.Length != Rows)
            throw new ArgumentException($"'baseline' has {Check.Text(baseline.Length)} rows and the matrix {Check.Text(Rows)}.", nameof(baseline));
        for (int i = 0; i < Rows; i++)
        {
            Check.FiniteRow(baseline[i], i, nameof(baseline));
            for (int j = 0; j < Candidates; j++)
                Values[i * Candidates + j] = (float)(Values[i * Candidates + j] - baseline[i]);
        }

        return this;
    }

    /// <summary>Adds the rows of each group together, for rows that are not independent of each other inside a group.</summary>
    /// <typeparam name="TKey">Type of a group key.</typeparam>
    /// <param name="groups">Group key of each row, parallel.</param>
    /// <returns>A matrix with one row a group: the independent units.</returns>
    /// <exception cref="ArgumentException">Another number of rows.</exception>
    public ScoreMatrix SumByGroup<TKey>(IReadOnlyList<TKey> groups)
    {
        Check.NotNull(groups, nameof(groups));
        if (groups.Count != Rows)
            throw new ArgumentException($"'groups' has {Check.Text(groups.Count)} rows and the matrix {Check.Text(Rows)}.", nameof(groups));
        Dictionary<ValueTuple<TKey>, int> places = [];
        int[] placeOf = new int[Rows];
        for (int i = 0; i < Rows; i++)
        {
            ValueTuple<TKey> key = new(groups[i]);
            if (!places.TryGetValue(key, out int place))
                places.Add(key, place = places.Count);
            placeOf[i] = place;
        }

        ScoreMatrix sums = new(places.Count, Candidates);
        for (int i = 0; i < Rows; i++)
        {
            for (int j = 0; j < Candidates; j++)
                sums.Values[placeOf[i] * Candidates + j] += Values[i * Candidates + j];
        }

        return sums;
    }

    private int Place(int row, int candidate)
    {
        if (row < 0 || row >= Rows)
            throw Check.OutOfRange(nameof(row), row, $"must lie between 0 and {Check.Text(Rows - 1)}");
        if (candidate < 0 || candidate >= Candidates)
            throw Check.OutOfRange(nameof(candidate), candidate, $"must lie between 0 and {Check.Text(Candidates - 1)}");
        return row * Candidates + candidate;
    }
}
