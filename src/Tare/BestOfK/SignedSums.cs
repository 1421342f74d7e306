#if NET
using System.Numerics;
#endif

namespace Tare;

/// <summary>
/// Column sums of a score matrix under many patterns of row signs at once. Rows go in groups of eight: all 256 signed sums of a
/// group are tabled once (each from another by one addition), and every pattern then adds one table entry instead of eight rows.
/// </summary>
/// <remarks>Idea: Arlazarov, Dinic, Kronrod and Faradzhev 1970 (four Russians' tables). Sums are in single precision, exact for whole numbers up to 16 million.</remarks>
internal sealed class SignedSums
{
    /// <summary>Candidates a block, so that its table fits the first-level cache.</summary>
    private const int Block = 32;

    private readonly ScoreMatrix _matrix;
    private readonly float[] _table = new float[256 * Block];
    private readonly float[] _row = new float[Block];
    private readonly float[] _sums;

    public SignedSums(ScoreMatrix matrix, int patterns)
    {
        _matrix = matrix;
        _sums = new float[patterns * Block];
    }

    /// <summary>Groups of eight rows.</summary>
    public static int Groups(int rows) => (rows + 7) / 8;

    /// <summary>Fills <paramref name="answer"/> (patterns × candidates) from sign bytes (patterns × groups; bit i set: row 8g+i counts as it is, else with its sign turned).</summary>
    public void Fill(byte[] signs, int patterns, float[] answer)
    {
        int candidates = _matrix.Candidates, groups = Groups(_matrix.Rows);
        for (int from = 0; from < candidates; from += Block)
        {
            int width = Math.Min(Block, candidates - from);
            Array.Clear(_sums, 0, patterns * Block);
            for (int g = 0; g < groups; g++)
            {
                FillTable(g, from, width);
                for (int r = 0; r < patterns; r++)
                    Add(_sums, r * Block, _table, signs[r * groups + g] * Block);
            }

            for (int r = 0; r < patterns; r++)
                Array.Copy(_sums, r * Block, answer, r * candidates + from, width);
        }
    }

    // Entry p+2^i (bit i newly set) is entry p plus twice row i; entry 0 is minus the sum of all eight rows.
    private void FillTable(int group, int from, int width)
    {
        int first = group * 8, count = Math.Min(8, _matrix.Rows - first);
        Array.Clear(_table, 0, Block);
        for (int i = 0; i < count; i++)
        {
            Load(first + i, from, width);
            for (int j = 0; j < Block; j++)
                _table[j] -= _row[j];
        }

        for (int i = 0; i < 8; i++)
        {
            if (i < count)
                Load(first + i, from, width);
            else
                Array.Clear(_row, 0, Block);
            for (int j = 0; j < Block; j++)
                _row[j] *= 2;
            for (int p = 0; p < 1 << i; p++)
            {
                Array.Copy(_table, p * Block, _table, (p | 1 << i) * Block, Block);
                Add(_table, (p | 1 << i) * Block, _row, 0);
            }
        }
    }

    private void Load(int row, int from, int width)
    {
        Array.Copy(_matrix.Values, row * _matrix.Candidates + from, _row, 0, width);
        Array.Clear(_row, width, Block - width);
    }

    private static void Add(float[] target, int targetAt, float[] source, int sourceAt)
    {
#if NET
        ref float into = ref target[targetAt];
        ref float what = ref source[sourceAt];
        // Both blocks are whole, so the last element checks the bounds of all of them.
        _ = target[targetAt + Block - 1];
        _ = source[sourceAt + Block - 1];
        for (int j = 0; j < Block; j += Vector<float>.Count)
        {
            Vector<float> sum = Vector.LoadUnsafe(ref into, (nuint)j) + Vector.LoadUnsafe(ref what, (nuint)j);
            sum.StoreUnsafe(ref into, (nuint)j);
        }
#else
        for (int j = 0; j < Block; j++)
            target[targetAt + j] += source[sourceAt + j];
#endif
    }
}
