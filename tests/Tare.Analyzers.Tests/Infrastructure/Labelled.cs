namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>Checks programs whose lines say what must be reported.</summary>
internal static class Labelled
{
    /// <summary>Ids of all rules that the analyzer has.</summary>
    public static IReadOnlySet<string> AllRules { get; } =
        new TareAnalyzer().SupportedDiagnostics.Select(d => d.Id).ToHashSet(StringComparer.Ordinal);

    /// <summary>Fails unless the program is reported exactly where its markers say, for every rule there is.</summary>
    public static Task Check(string source) => Check(new TestProgram(source));

    /// <summary>The same for one rule, or a few: others' labels and findings do not count.</summary>
    public static Task Check(string source, params string[] rules) => Check(new TestProgram(source), rules);

    /// <summary>The same for a program of several files or with settings of its own.</summary>
    public static async Task Check(TestProgram program, params string[] rules)
    {
        var score = await ScoreAsync(program, rules.Length == 0 ? AllRules.Contains : rules.Contains);
        Assert.True(score.IsPerfect, score + "\n" + string.Join("\n", program.Documents.Select(d => Numbered(d.Text))));
    }

    /// <summary>Holds the findings of a program against its markers.</summary>
    public static async Task<Score> ScoreAsync(TestProgram program, Func<string, bool> judged)
    {
        var findings = await Analysis.FindAsync(program);
        return Score.Of(program.Documents.SelectMany(d => Label.In(d.Name, d.Text)), findings.Select(Finding.Of), judged);
    }

    private static string Numbered(string text) =>
        string.Join("\n", text.Split('\n').Select((line, i) => $"{i + 1,4} {line}"));
}
