namespace Tare.Analyzers.Tests.Rules;

/// <summary>A second model for programs: the nearest known boards vote.</summary>
internal static class Nearest
{
    public const string Model =
        """
        internal sealed class NearestBoards(double[][] known, bool[] warped, int neighbours)
        {
            public static NearestBoards Fit(double[][] x, bool[] y, int neighbours) => new(x, y, neighbours);

            public bool Predict(double[] board) => known
                .Select((k, i) => (Distance: k.Zip(board, (a, b) => (a - b) * (a - b)).Sum(), Warped: warped[i]))
                .OrderBy(k => k.Distance).Take(neighbours).Count(k => k.Warped) * 2 > neighbours;

            public double Accuracy(double[][] x, bool[] y)
            {
                int right = 0;
                for (int i = 0; i < x.Length; i++)
                {
                    if (Predict(x[i]) == y[i])
                        right++;
                }

                return right / (double)x.Length;
            }

            public double Loss(double[][] x, bool[] y)
            {
                double loss = 0;
                for (int i = 0; i < x.Length; i++)
                    loss += Predict(x[i]) == y[i] ? 0 : Math.Abs(x[i][0]);
                return loss / x.Length;
            }
        }
        """;

    /// <summary>The statements beside this model.</summary>
    public static Infrastructure.TestProgram Of(string statements)
    {
        var program = ModelProgram.Of(statements);
        return program with { Documents = program.Documents.Add(("Nearest.cs", Model)), Libraries = Infrastructure.Libraries.Tare };
    }
}
