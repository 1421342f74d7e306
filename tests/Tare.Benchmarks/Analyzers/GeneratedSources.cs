using System.Text;

namespace Tare.Benchmarks.Analyzers;

/// <summary>Code that has cost analyzers most: long methods, rings of calls, large initialisers, and much code of no interest.</summary>
internal static class GeneratedSources
{
    private const string Usings = "using System;\nusing System.Collections.Generic;\nusing System.Linq;\n";

    public static IReadOnlyList<SourceSet> All { get; } =
    [
        new("one 5,000-statement method", [LongMethod(5_000)]),
        new("300 methods in a ring", [Ring(300)]),
        new("5,000-element initialiser", [Initialiser(5_000)]),
        new("60 nested loops and lambdas", [Nested(60)]),
        new("100,000 lines without rows", [.. Enumerable.Range(0, 500).Select(NoRows)]),
        new("100,000 lines, rows in each", [.. Enumerable.Range(0, 500).Select(SomeRows)]),
    ];

    // Every kind of statement over a hundred locals, between a fit and a choice on test rows.
    private static string LongMethod(int statements)
    {
        var text = Begin("Long");
        text.Append("    static int Choose(double[][] trainX, double[] trainY, double[][] testX, double[] testY, int[] ks)\n    {\n");
        text.Append("        int chosen = 0; double best = 0;\n");
        for (int i = 0; i < 100; i++)
            text.Append($"        double v{i} = {i};\n");
        text.Append("        foreach (int k in ks)\n        {\n        double score = Score(Fit(trainX, trainY, k), testX, testY);\n");
        for (int i = 0; i < statements; i++)
        {
            int a = i % 100, b = (i * 7 + 1) % 100;
            text.Append((i % 5) switch
            {
                0 => $"        v{a} += v{b} * score;\n",
                1 => $"        if (v{a} > v{b}) v{a} = v{b}; else v{b} = score;\n",
                2 => $"        v{a} = Math.Max(v{a}, Math.Abs(v{b}));\n",
                3 => $"        v{a} = v{b} > score ? v{a} : testY[{a} % testY.Length];\n",
                _ => $"        if (score > best && v{a} < v{b}) best = score;\n",
            });
        }

        text.Append("        if (score > best) { best = score; chosen = k; }\n        }\n        return chosen;\n    }\n");
        return End(text);
    }

    private static string Ring(int methods)
    {
        var text = Begin("Ring");
        for (int i = 0; i < methods; i++)
        {
            int next = (i + 1) % methods, far = (i * 13 + 5) % methods;
            text.Append(
                $$"""
                    static double M{{i}}(double[][] trainX, double[] trainY, double[][] testX, double[] testY, int k)
                    {
                        double score = Score(Fit(trainX, trainY, k), testX, testY);
                        double other = k > 0 ? M{{next}}(trainX, trainY, testX, testY, k - 1) : M{{far}}(testX, testY, trainX, trainY, k - 2);
                        return score > other ? score : other;
                    }

                """);
        }

        return End(text);
    }

    private static string Initialiser(int elements)
    {
        var text = Begin("Large");
        text.Append("    static double Best(double[][] trainX, double[] trainY, double[][] testX, double[] testY)\n    {\n        var scores = new[]\n        {\n");
        for (int i = 0; i < elements; i++)
            text.Append($"            Score(Fit(trainX, trainY, {i}), testX, testY),\n");
        text.Append("        };\n        return scores.Max();\n    }\n\n    static readonly double[][] TestRows =\n    {\n");
        for (int i = 0; i < elements; i++)
            text.Append($"        new[] {{ {i}.5, {i * 3 % 17}.25 }},\n");
        text.Append("    };\n");
        return End(text);
    }

    private static string Nested(int depth)
    {
        var text = Begin("Deep");
        text.Append("    static double Best(double[][] trainX, double[] trainY, double[][] testX, double[] testY)\n    {\n        double best = 0;\n");
        for (int i = 0; i < depth; i++)
            text.Append(i % 3 == 2 ? $"        Action a{i} = () => {{\n" : $"        for (int i{i} = 0; i{i} < 3; i{i}++) {{\n");
        text.Append("        double score = Score(Fit(trainX, trainY, i0), testX, testY);\n        if (score > best) best = score;\n");
        for (int i = depth - 1; i >= 0; i--)
            text.Append(i % 3 == 2 ? $"        }};\n        a{i}();\n" : "        }\n");
        text.Append("        return best;\n    }\n");
        return End(text);
    }

    // Business code of about 200 lines.
    private static string NoRows(int number)
    {
        var text = new StringBuilder(Usings).Append($"\nnamespace Shop.Part{number};\n\npublic sealed class Orders{number}\n{{\n    private readonly Dictionary<int, decimal> _prices = new();\n");
        for (int i = 0; i < 13; i++)
        {
            text.Append(
                $$"""

                    public decimal Total{{i}}(IReadOnlyList<(int Item, int Count)> lines, string country)
                    {
                        decimal sum = 0;
                        foreach (var (item, count) in lines)
                        {
                            if (!_prices.TryGetValue(item, out decimal price))
                                throw new ArgumentException($"No price for {item}", nameof(lines));
                            sum += price * count;
                        }

                        decimal rate = country switch { "DE" => 0.19m, "CH" => 0.081m, _ => 0.{{i + 1}}m };
                        return lines.Where(l => l.Count > {{i}}).Select(l => l.Item).Distinct().Count() > 3 ? sum * (1 + rate) * 0.97m : sum * (1 + rate);
                    }

                """);
        }

        return text.Append("}\n").ToString();
    }

    // The same amount of modelling code, a choice in each method.
    private static string SomeRows(int number)
    {
        var text = Begin("Models" + number);
        for (int i = 0; i < 13; i++)
        {
            text.Append(
                $$"""
                    static int Choose{{i}}(double[][] trainX, double[] trainY, double[][] testX, double[] testY, int[] ks)
                    {
                        int chosen = 0;
                        double best = double.MinValue;
                        foreach (int k in ks)
                        {
                            var model = Fit(trainX, trainY, k + {{i}});
                            double score = Score(model, testX, testY);
                            if (score > best)
                            {
                                best = score;
                                chosen = k;
                            }
                        }

                        return chosen;
                    }

                """);
        }

        return End(text);
    }

    private static StringBuilder Begin(string type) =>
        new StringBuilder(Usings).Append($"\nnamespace Generated.{type};\n\nstatic class {type}\n{{\n");

    private static string End(StringBuilder text) => text.Append(
        """
            static double[] Fit(double[][] x, double[] y, int k) => x.Select((r, i) => r[0] * y[i] * k).ToArray();

            static double Score(double[] model, double[][] x, double[] y) => x.Where((r, i) => r[0] * model[0] > y[i]).Count() / (double)x.Length;
        }

        """).ToString();
}
