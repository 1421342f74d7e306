using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Rules.Choice.ChosenOnTestRows;

/// <summary>
/// Programs that choose how many neighbours tell whether a kiln-dried board warps. They count what they do: the last line
/// says how many models were fitted and how often the test rows were scored.
/// </summary>
/// <remarks>
/// The first argument draws the labels of the test rows, the second those of the last quarter of the training rows, which a
/// fix holds out; the third makes the boards alternate, so that one neighbour is always right and more are not.
/// </remarks>
internal static class KilnProgram
{
    private const string Head =
        """
        int seed = args.Length > 0 ? int.Parse(args[0]) : 0;
        int late = args.Length > 1 ? int.Parse(args[1]) : 0;
        bool planted = args.Length > 2;
        double[][] trainX = Mill.Boards(120, 1, planted);
        int[] trainY = Mill.Warped(120, 2, planted);
        double[][] testX = Mill.Boards(40, 3, planted);
        int[] testY = Mill.Warped(40, 100 + seed, planted);
        if (late > 0)
            Mill.Warped(30, late, false).CopyTo(trainY, 90);
        Mill.Judged = testX;

        """;

    private const string Tail =
        """

        Console.WriteLine($"counts={Mill.Fits} fits, {Mill.Scored} test scores");

        public static class Mill
        {
            public static int Fits;
            public static int Scored;
            public static object? Judged;

            public static Func<double[], int> Fit(double[][] x, int[] y, int neighbours)
            {
                Fits++;
                return board => x
                    .Select((known, i) => (Distance: known.Zip(board, (a, b) => (a - b) * (a - b)).Sum(), Warped: y[i]))
                    .OrderBy(t => t.Distance).Take(neighbours).Sum(t => t.Warped) * 2 > neighbours ? 1 : 0;
            }

            public static double Accuracy(Func<double[], int> model, double[][] x, int[] y)
            {
                if (ReferenceEquals(x, Judged))
                    Scored++;
                return x.Select((board, i) => model(board) == y[i] ? 1.0 : 0.0).Average();
            }

            public static double[][] Boards(int count, int seed, bool planted)
            {
                var scanner = new Random(seed);
                return Enumerable.Range(0, count)
                    .Select(i => planted ? new[] { i % 20 + scanner.NextDouble() / 1000 } : new[] { scanner.NextDouble(), scanner.NextDouble(), scanner.NextDouble() })
                    .ToArray();
            }

            public static int[] Warped(int count, int seed, bool planted)
            {
                var outcome = new Random(seed);
                return Enumerable.Range(0, count).Select(i => planted ? i % 2 : outcome.Next(2)).ToArray();
            }
        }
        """;

    public static TestProgram Of(string choosing) => new(Head + choosing + Tail) { Libraries = Libraries.Tare };
}
