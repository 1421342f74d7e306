using System.Text;
using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Robustness;

/// <summary>
/// Generated code nests deeply. The compiler gives up on some of it with an error; a stack overflow in the analyzer
/// would end the process, and with it the build.
/// </summary>
public class DeepNestingTests
{
    private const int Depth = 1_500;

    public static TheoryData<string> Forms =>
    [
        "parentheses", "else-if", "addition", "conditional", "calls", "blocks", "lambdas", "concatenation", "and", "loops", "members", "initialisers",
    ];

    [Theory]
    [MemberData(nameof(Forms))]
    public async Task NoStackOverflow(string form) =>
        await Analysis.FindAsync(new TestProgram(Program(form)) { AllowErrors = true });

    // The deep part stands inside a choice on test rows: a method that the analyzer has every reason to follow.
    private static string Program(string form)
    {
        var (statements, expression) = form switch
        {
            "parentheses" => ("", Repeat("(") + "score" + Repeat(")")),
            "else-if" => (Repeat(i => $"if (k == {i}) score += {i}; else ") + "score += 1;", "score"),
            "addition" => ("", "score" + Repeat(" + score")),
            "conditional" => ("", Repeat(i => $"k == {i} ? score : ") + "score"),
            "calls" => ("", Repeat("Math.Abs(") + "score" + Repeat(")")),
            "blocks" => (Repeat("{") + "score += 1;" + Repeat("}"), "score"),
            // The compiler's own look at nullability overflows its stack on more.
            "lambdas" => ("Func<double, object> f = " + Repeat(i => i < 100 ? "_ => (Func<double, object>)(" : "") + "x => score" + Repeat(i => i < 100 ? ")" : "") + ";", "score"),
            "concatenation" => ("string text = \"\"" + Repeat(" + score.ToString()") + ";", "score"),
            "and" => ("bool all = score > 0" + Repeat(" && score > best") + ";", "score"),
            // The compiler itself overflows its stack on more.
            "loops" => (Repeat(i => i < 200 ? $"for (int i{i} = 0; i{i} < 2; i{i}++) " : "") + "score += 1;", "score"),
            "members" => ("", "score" + Repeat(".CompareTo(1)")),
            "initialisers" => ("object deep = " + Repeat("new object[] { ") + "score" + Repeat(" }") + ";", "score"),
            _ => throw new ArgumentOutOfRangeException(nameof(form), form, null),
        };
        return $$"""
            static class Deep
            {
                static int Choose(double[][] trainX, double[] trainY, double[][] testX, double[] testY, int[] ks)
                {
                    int chosen = 0;
                    double best = 0;
                    foreach (int k in ks)
                    {
                        var model = Fit(trainX, trainY, k);
                        double score = Accuracy(model, testX, testY);
                        {{statements}}
                        double total = {{expression}};
                        if (total > best)
                        {
                            best = total;
                            chosen = k;
                        }
                    }

                    Console.WriteLine(best);
                    return chosen;
                }

                static double[] Fit(double[][] x, double[] y, int k) => [x[0][0] * y[0] * k];

                static double Accuracy(double[] model, double[][] x, double[] y) => x.Zip(y).Count(p => p.First[0] * model[0] > p.Second) / (double)x.Length;
            }
            """;
    }

    private static string Repeat(string part) => new StringBuilder().Insert(0, part, Depth).ToString();

    private static string Repeat(Func<int, string> part)
    {
        var text = new StringBuilder();
        for (int i = 0; i < Depth; i++)
            text.Append(part(i));
        return text.ToString();
    }
}
