using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Rules;

/// <summary>Programs about a model that stands in a file of its own, so that each test shows only what it is about.</summary>
internal static class ModelProgram
{
    private const string Model =
        """
        internal sealed record Setting(int Depth, double Rate);

        internal sealed record Board(double[] Readings, bool Warped);

        internal sealed class Model
        {
            private readonly double _cut;

            private Model(double cut) => _cut = cut;

            public static Model Fit(double[][] rows, bool[] labels, double strength) =>
                new(rows.Where((_, i) => labels[i]).Average(r => r[0]) * strength);

            public static Model Fit(IReadOnlyList<Board> boards, double strength) =>
                new(boards.Where(b => b.Warped).Average(b => b.Readings[0]) * strength);

            public bool Predict(double[] row) => row[0] > _cut;

            public double Accuracy(double[][] rows, bool[] labels) => rows.Where((r, i) => Predict(r) == labels[i]).Count() / (double)rows.Length;

            public double Accuracy(IReadOnlyList<Board> boards) => boards.Count(b => Predict(b.Readings) == b.Warped) / (double)boards.Count;

            public double Loss(double[][] rows, bool[] labels) => rows.Where((r, i) => Predict(r) != labels[i]).Sum(r => Math.Abs(r[0] - _cut)) / rows.Length;
        }
        """;

    /// <summary>Fails unless the statements are reported exactly where their markers say.</summary>
    public static Task Check(string statements) => Labelled.Check(Of(statements));

    /// <summary>The statements in a method that is handed rows of two roles, or of three.</summary>
    public static TestProgram Of(string statements) => new([("Program.cs", Wrap(statements)), ("Model.cs", Model)]);

    private static string Wrap(string statements) =>
        $$"""
        internal static class Program
        {
            private static void Run(
                double[][] trainX, bool[] trainY, double[][] validationX, bool[] validationY, double[][] testX, bool[] testY,
                double[] strengths, Setting[] settings, List<Board> trainBoards, List<Board> testBoards)
            {
        {{statements}}
            }
        }
        """;
}
