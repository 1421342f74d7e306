using System.Threading;
using System.Threading.Tasks;

namespace Tare;

/// <summary>
/// Tests K candidates on the same rows by turning the signs of whole rows: the dependence among candidates is kept, so correlated
/// candidates cost less than Bonferroni charges. Family-wise error is held at any number of rows when differences are symmetric about zero
/// under no difference (always so for 0/1 outcomes of two models).
/// </summary>
/// <remarks>
/// <para>Source: Westfall and Young 1993, Resampling-based multiple testing; p-values count the observed pattern (Phipson and Smyth 2010, Permutation p-values should never be zero, SAGMB 9).</para>
/// <para>Rows must be independent. For rows in groups use <see cref="ScoreMatrix.SumByGroup"/> first: signs then turn group by group.</para>
/// <para>Sums are in single precision; patterns within 4 millionths of a standard deviation of the observed value count as reaching it (whole numbers are exact).</para>
/// </remarks>
public static class MaxStatisticTest
{
    /// <summary>Up to so many rows all 2^rows patterns are looked at.</summary>
    public const int ExactUpToRows = 20;

    private const int PatternsABatch = 1024;

    /// <summary>Random sign patterns.</summary>
    /// <param name="differences">Rows × candidates: each candidate's score less the baseline's on each row (<see cref="ScoreMatrix.Minus"/>); higher is better.</param>
    /// <param name="side"><see cref="Side.Greater"/>: candidates better than the baseline.</param>
    /// <param name="patterns">Random patterns, 1 to 100 million; the smallest p-value is 1/(patterns+1).</param>
    /// <param name="seed">Seed; one seed gives one result whatever the number of threads.</param>
    /// <param name="studentize">Whether each candidate's sum is divided by its spread, so that all candidates weigh alike.</param>
    /// <param name="threads">Threads to use, at least 1; 0 for all cores.</param>
    /// <param name="progress">Told the share of patterns done, 0 to 1.</param>
    /// <param name="cancel">Stops between batches of 1024 patterns.</param>
    /// <returns>Raw, single-step and step-down p-values of all candidates; all patterns and exact ones when there are at most <see cref="ExactUpToRows"/> rows and no more patterns than asked for.</returns>
    /// <exception cref="ArgumentException">An argument lies outside its domain.</exception>
    /// <exception cref="OperationCanceledException">It was cancelled.</exception>
    public static MaxStatisticResult SignFlip(
        ScoreMatrix differences, Side side = Side.Greater, int patterns = 9999, int seed = 1, bool studentize = true, int threads = 0,
        IProgress<double>? progress = null, CancellationToken cancel = default)
    {
        Check.NotNull(differences, nameof(differences));
        if (side is not (Side.TwoSided or Side.Greater or Side.Less))
            throw Check.OutOfRange(nameof(side), side, "is no side");
        if (patterns < 1 || patterns > 100_000_000)
            throw Check.OutOfRange(nameof(patterns), patterns, "must lie between 1 and 100 million");
        Check.AtLeast((long)threads, 0, nameof(threads));
        bool exact = differences.Rows <= ExactUpToRows && 1L << differences.Rows <= patterns;
        Plan plan = new(differences, side, exact ? 1 << differences.Rows : patterns, exact, seed, studentize);
        int batches = (plan.Patterns + PatternsABatch - 1) / PatternsABatch, done = 0;
        object merging = new();
        Counts all = new(differences.Candidates);
        ParallelOptions options = new() { MaxDegreeOfParallelism = threads == 0 ? -1 : threads, CancellationToken = cancel };
        Parallel.For(0, batches, options, () => new Worker(plan), (batch, _, worker) =>
        {
            worker.Run(batch);
            progress?.Report((double)Interlocked.Increment(ref done) / batches);
            return worker;
        }, worker =>
        {
            lock (merging)
                all.Add(worker.Counts);
        });
        return plan.Finish(all);
    }

    /// <summary>What all threads share.</summary>
    private sealed class Plan
    {
        public Plan(ScoreMatrix matrix, Side side, int patterns, bool exact, int seed, bool studentize)
        {
            (Matrix, Side, Patterns, Exact, Seed) = (matrix, side, patterns, exact, seed);
            int m = matrix.Candidates, groups = SignedSums.Groups(matrix.Rows);
            double[] squares = new double[m];
            Whole = true;
            for (int i = 0; i < matrix.Values.Length; i++)
            {
                double value = matrix.Values[i];
                squares[i % m] += value * value;
                Whole &= value == Math.Floor(value) && Math.Abs(value) * matrix.Rows < 16_000_000;
            }

            // The observed sums through the same additions as the patterns', so that equal patterns give equal bits.
            byte[] asTheyAre = new byte[groups];
            for (int g = 0; g < groups; g++)
                asTheyAre[g] = 255;
            float[] sums = new float[m];
            new SignedSums(matrix, 1).Fill(asTheyAre, 1, sums);
            Scale = new double[m];
            Observed = new double[m];
            Reach = new double[m];
            for (int j = 0; j < m; j++)
            {
                Scale[j] = !studentize ? 1 : squares[j] > 0 ? 1 / Math.Sqrt(squares[j]) : 0;
                Observed[j] = Sided(sums[j]) * Scale[j];
                Reach[j] = Observed[j] - (Whole ? 0 : 4e-6 * Math.Sqrt(squares[j]) * Scale[j]);
            }

            Order = Cut.Indices(m);
            Array.Sort(Order, (a, b) => Observed[a] != Observed[b] ? Observed[b].CompareTo(Observed[a]) : a.CompareTo(b));
        }

        public ScoreMatrix Matrix { get; }

        public Side Side { get; }

        public int Patterns { get; }

        public bool Exact { get; }

        public int Seed { get; }

        public bool Whole { get; }

        public double[] Scale { get; }

        public double[] Observed { get; }

        /// <summary>A pattern's statistic counts from here on.</summary>
        public double[] Reach { get; }

        /// <summary>Candidates from the largest observed statistic down.</summary>
        public int[] Order { get; }

        public double Sided(double sum) => Side switch { Side.Greater => sum, Side.Less => -sum, _ => Math.Abs(sum) };

        public MaxStatisticResult Finish(Counts counts)
        {
            int m = Observed.Length;
            // All patterns hold the observed one; random patterns get it added.
            double add = Exact ? 0 : 1, total = Patterns + add;
            double[] raw = new double[m], single = new double[m], down = new double[m], statistics = new double[m];
            double running = 0;
            foreach (int j in Order)
            {
                statistics[j] = Side == Side.Less ? -Observed[j] : Observed[j];
                raw[j] = (counts.Raw[j] + add) / total;
                single[j] = (counts.Single[j] + add) / total;
                running = down[j] = Math.Max(running, (counts.Down[j] + add) / total);
            }

            return new MaxStatisticResult(statistics, raw, single, down, (long)total, Exact, Side);
        }
    }

    private sealed class Counts(int candidates)
    {
        public long[] Raw { get; } = new long[candidates];

        public long[] Single { get; } = new long[candidates];

        public long[] Down { get; } = new long[candidates];

        public void Add(Counts other)
        {
            for (int j = 0; j < Raw.Length; j++)
            {
                Raw[j] += other.Raw[j];
                Single[j] += other.Single[j];
                Down[j] += other.Down[j];
            }
        }
    }

    private sealed class Worker
    {
        private readonly Plan _plan;
        private readonly SignedSums _sums;
        private readonly byte[] _signs;
        private readonly float[] _answer;
        private readonly double[] _statistics;
        private readonly int _groups;

        public Worker(Plan plan)
        {
            _plan = plan;
            _groups = SignedSums.Groups(plan.Matrix.Rows);
            // Memory for long columns: fewer patterns at a time, same patterns.
            int patterns = (int)Math.Min(Math.Min(PatternsABatch, plan.Patterns), Math.Max(64, 128_000_000L / _groups));
            _sums = new SignedSums(plan.Matrix, patterns);
            _signs = new byte[patterns * _groups];
            _answer = new float[patterns * plan.Matrix.Candidates];
            _statistics = new double[plan.Matrix.Candidates];
            Counts = new Counts(plan.Matrix.Candidates);
        }

        public Counts Counts { get; }

        public void Run(int batch)
        {
            int first = batch * PatternsABatch, end = Math.Min(_plan.Patterns, first + PatternsABatch), atATime = _signs.Length / _groups;
            for (int from = first; from < end; from += atATime)
            {
                int count = Math.Min(atATime, end - from);
                for (int r = 0; r < count; r++)
                    FillSigns(from + r, r * _groups);
                _sums.Fill(_signs, count, _answer);
                for (int r = 0; r < count; r++)
                    Compare(r * _plan.Matrix.Candidates);
            }
        }

        // A pattern is decided by the seed and its own number, not by which thread comes first.
        private void FillSigns(int pattern, int at)
        {
            if (_plan.Exact)
            {
                for (int g = 0; g < _groups; g++)
                    _signs[at + g] = (byte)(pattern >> (8 * g));
                return;
            }

            SplitRandom random = new(_plan.Seed, pattern);
            ulong bits = 0;
            for (int g = 0; g < _groups; g++)
            {
                if (g % 8 == 0)
                    bits = random.Bits();
                _signs[at + g] = (byte)(bits >> (8 * (g % 8)));
            }
        }

        private void Compare(int at)
        {
            double largest = double.NegativeInfinity;
            for (int j = 0; j < _statistics.Length; j++)
            {
                _statistics[j] = _plan.Sided(_answer[at + j]) * _plan.Scale[j];
                largest = Math.Max(largest, _statistics[j]);
                if (_statistics[j] >= _plan.Reach[j])
                    Counts.Raw[j]++;
            }

            // From the smallest observed statistic up: each is met by the largest of those no better.
            double running = double.NegativeInfinity;
            for (int place = _plan.Order.Length - 1; place >= 0; place--)
            {
                int j = _plan.Order[place];
                running = Math.Max(running, _statistics[j]);
                if (running >= _plan.Reach[j])
                    Counts.Down[j]++;
                if (largest >= _plan.Reach[j])
                    Counts.Single[j]++;
            }
        }
    }
}
