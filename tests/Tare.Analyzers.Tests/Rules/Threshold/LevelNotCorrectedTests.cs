namespace Tare.Analyzers.Tests.Rules.Threshold;

/// <summary>TARE201 where the p-values and the comparison stand in one method.</summary>
public class LevelNotCorrectedTests
{
    private const string SignTest =
        """

        internal static class SignTest
        {
            public static double PValue(double[] differences)
            {
                int n = differences.Length, fewer = Math.Min(differences.Count(d => d > 0), differences.Count(d => d <= 0));
                double tail = 0, term = Math.Pow(0.5, n);
                for (int k = 0; k <= fewer; k++)
                {
                    tail += term;
                    term *= (n - k) / (k + 1.0);
                }

                return Math.Min(1, 2 * tail);
            }
        }
        """;

    [Fact]
    public Task ForLoop() => Check("""
        for (int i = 0; i < plans.Length; i++)
        {
            double pValue = SignTest.PValue(differences[i]);
            if (pValue < 0.05) // ! TARE201
                Console.WriteLine(plans[i]);
        }
        """);

    [Fact]
    public Task NamedLevel() => Check("""
        const double alpha = 0.01;
        var significant = new List<string>();
        foreach (var (plan, d) in plans.Zip(differences))
        {
            double p = SignTest.PValue(d);
            if (alpha >= p) // ! TARE201
                significant.Add(plan);
        }

        Console.WriteLine(string.Join(", ", significant));
        """);

    [Fact]
    public Task Where() => Check("""
        var pValues = differences.Select(d => SignTest.PValue(d)).ToArray();
        var kept = plans.Where((_, i) => pValues[i] < 0.05).ToList(); // ! TARE201
        Console.WriteLine(kept.Count);
        """);

    [Fact]
    public Task Any() => Check("""
        bool works = differences.Any(d => SignTest.PValue(d) < 0.05); // ! TARE201
        Console.WriteLine(works);
        """);

    [Fact]
    public Task Minimum() => Check("""
        double[] pValues = differences.Select(SignTest.PValue).ToArray();
        if (pValues.Min() < 0.05) // ! TARE201
            Console.WriteLine("some plan changes the warp");
        """);

    [Fact]
    public Task DividedLevelIsRight() => Check("""
        for (int i = 0; i < plans.Length; i++)
        {
            double pValue = SignTest.PValue(differences[i]);
            if (pValue < 0.05 / plans.Length)
                Console.WriteLine(plans[i]);
        }
        """);

    [Fact]
    public Task AllNeedsEverySmall() => Check("""
        bool everywhere = differences.All(d => SignTest.PValue(d) < 0.05);
        Console.WriteLine(everywhere);
        """);

    [Fact]
    public Task OneTest() => Check("""
        double pValue = SignTest.PValue(differences[0]);
        if (pValue < 0.05)
            Console.WriteLine(plans[0]);
        """);

    [Fact]
    public Task FixedOrderThatStops() => Check("""
        for (int i = 0; i < plans.Length; i++)
        {
            double pValue = SignTest.PValue(differences[i]);
            if (pValue >= 0.05)
                break;
            Console.WriteLine(plans[i]);
        }
        """);

    [Fact]
    public Task PricesAreNoPValues() => Check("""
        foreach (double[] d in differences)
        {
            double price = d.Average();
            if (price < 0.05)
                Console.WriteLine(price);
        }
        """);

    private static Task Check(string statements) => Infrastructure.Labelled.Check(
        $$"""
        internal static class Trial
        {
            private static void Report(string[] plans, double[][] differences)
            {
        {{statements}}
            }
        }
        """ + SignTest);
}
