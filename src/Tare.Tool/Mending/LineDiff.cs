namespace Tare.Tool.Mending;

/// <summary>
/// The shortest edit between two lists of lines: E. W. Myers, "An O(ND) difference algorithm and its variations", Algorithmica 1 (1986), 251–266.
/// </summary>
internal static class LineDiff
{
    // Beyond this many edits the trace would take hundreds of megabytes; the middle is then given as one replacement, correct but not shortest.
    private const int MaxEdits = 4000;

    /// <summary>Which lines of <paramref name="a"/> go and which of <paramref name="b"/> come; the others are the same, in order.</summary>
    public static (bool[] Removed, bool[] Added) Compare(IReadOnlyList<string> a, IReadOnlyList<string> b)
    {
        var removed = new bool[a.Count];
        var added = new bool[b.Count];
        var start = 0;
        while (start < a.Count && start < b.Count && a[start] == b[start])
        {
            start++;
        }

        var (endA, endB) = (a.Count, b.Count);
        while (endA > start && endB > start && a[endA - 1] == b[endB - 1])
        {
            (endA, endB) = (endA - 1, endB - 1);
        }

        if (Trace(a, b, start, endA - start, endB - start) is not { } trace)
        {
            Array.Fill(removed, true, start, endA - start);
            Array.Fill(added, true, start, endB - start);
            return (removed, added);
        }

        var (x, y) = (endA - start, endB - start);
        for (var edits = trace.Count - 1; edits > 0; edits--)
        {
            // Furthest points after one edit fewer, on the diagonals from -(edits - 1) to edits - 1.
            var reach = trace[edits - 1];
            var k = x - y;
            var down = k == -edits || (k != edits && At(reach, k - 1) < At(reach, k + 1));
            var fromK = down ? k + 1 : k - 1;
            var fromX = At(reach, fromK);
            var fromY = fromX - fromK;
            if (down)
            {
                added[start + fromY] = true;
            }
            else
            {
                removed[start + fromX] = true;
            }

            (x, y) = (fromX, fromY);
        }

        return (removed, added);
    }

    /// <summary>For each number of edits, how far each diagonal reaches; null when there are too many edits.</summary>
    private static List<int[]>? Trace(IReadOnlyList<string> a, IReadOnlyList<string> b, int start, int n, int m)
    {
        var trace = new List<int[]>();
        for (var edits = 0; edits <= n + m; edits++)
        {
            if (edits > MaxEdits)
            {
                return null;
            }

            var reach = new int[(2 * edits) + 1];
            var before = edits == 0 ? null : trace[^1];
            for (var k = -edits; k <= edits; k += 2)
            {
                var x = before == null ? 0
                    : k == -edits || (k != edits && At(before, k - 1) < At(before, k + 1)) ? At(before, k + 1)
                    : At(before, k - 1) + 1;
                while (x < n && x - k < m && x - k >= 0 && a[start + x] == b[start + x - k])
                {
                    x++;
                }

                reach[k + edits] = x;
                if (x >= n && x - k >= m)
                {
                    trace.Add(reach);
                    return trace;
                }
            }

            trace.Add(reach);
        }

        return trace;
    }

    private static int At(int[] reach, int k) => reach[k + (reach.Length / 2)];
}
