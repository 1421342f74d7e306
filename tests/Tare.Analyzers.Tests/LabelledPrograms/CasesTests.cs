using System.Collections.Concurrent;
using System.Globalization;
using System.Text;
using Tare.Analyzers.Tests.Infrastructure;
using Xunit.Abstractions;

namespace Tare.Analyzers.Tests.LabelledPrograms;

/// <summary>Scores the labelled programs of the folder that TARE_CASES names.</summary>
public class CasesTests(ITestOutputHelper output)
{
    /// <summary>Rules that are held to their labels; other rules' labels and findings do not count. The list grows with the rules.</summary>
    private static readonly string[] Judged = ["TARE101", "TARE102", "TARE108", "TARE201"];

    private const double LeastRecall = 0.9;

    [CasesFact]
    public async Task NineOfTenAreFoundAndNoCleanProgramIsReported()
    {
        string[] files = Cases.Files();
        Assert.NotEmpty(files);
        var scores = new ConcurrentDictionary<string, Score>();
        var failures = new ConcurrentDictionary<string, string>();
        await Parallel.ForEachAsync(files, async (file, _) =>
        {
            try
            {
                scores[file] = await ScoreAsync(file);
            }
            catch (Exception exception)
            {
                failures[file] = exception.Message;
            }
        });

        var total = files.Where(scores.ContainsKey).Aggregate(Score.Empty, (sum, file) => sum.Plus(scores[file]));
        var unclean = files.Where(f => scores.TryGetValue(f, out var s) && !s.FalseReports.IsEmpty && IsClean(f)).ToArray();
        string summary = Summarise(files, total, unclean, failures);
        output.WriteLine(summary);
        Write(summary);

        Assert.Empty(failures);
        Assert.True(unclean.Length == 0, "Clean programs are reported:\n" + summary);
        foreach (string rule in Judged)
            Assert.True(Recall(total, rule) is not < LeastRecall, $"{rule} is found less often than {LeastRecall}:\n{summary}");
    }

    private static async Task<Score> ScoreAsync(string file)
    {
        string text = Cases.Read(file);
        var findings = await Analysis.FindAsync(new TestProgram(text));
        return Score.Of(Label.In(file, text), findings.Select(d => Finding.Of(d) with { File = file }), Judged.Contains);
    }

    private static bool IsClean(string file) => !Label.In(file, Cases.Read(file)).Any(l => l.Required);

    private static double? Recall(Score score, string rule)
    {
        int hits = score.Hits.Count(f => f.Rule == rule);
        int labels = hits + score.Misses.Count(l => l.Rule == rule);
        return labels == 0 ? null : hits / (double)labels;
    }

    private static string Summarise(string[] files, Score total, string[] unclean, IReadOnlyDictionary<string, string> failures)
    {
        var text = new StringBuilder();
        text.AppendLine(CultureInfo.InvariantCulture, $"{files.Length} programs, {files.Count(IsClean)} of them clean; clean programs reported: {unclean.Length}");
        text.AppendLine("rule      hits  missed  false  recall");
        foreach (string rule in Judged)
        {
            text.AppendLine(string.Create(
                CultureInfo.InvariantCulture,
                $"{rule}  {total.Hits.Count(f => f.Rule == rule),5} {total.Misses.Count(l => l.Rule == rule),7} {total.FalseReports.Count(f => f.Rule == rule),6}  {Recall(total, rule):F2}"));
        }

        foreach (var hit in total.Hits)
            text.AppendLine($"hit    {hit.File}({hit.Line}): {hit.Rule}");
        foreach (var miss in total.Misses)
            text.AppendLine($"missed {miss.File}({miss.Line}): {miss.Rule}");
        foreach (var report in total.FalseReports)
            text.AppendLine($"false  {report.File}({report.Line}): {report.Rule}{(unclean.Contains(report.File) ? " in a clean program" : "")}: {report.Message}");
        foreach (var (file, message) in failures)
            text.AppendLine($"failed {file}: {message}");
        return text.ToString();
    }

    // The summary outlives the run: beside the test results that the caller asked for, else in the project's own.
    private static void Write(string summary)
    {
        string folder = Environment.GetEnvironmentVariable("TARE_RESULTS")
            ?? Repository.At("tests", "Tare.Analyzers.Tests", "TestResults");
        Directory.CreateDirectory(folder);
        string runner = typeof(CasesTests).Assembly.GetName().Name!;
        File.WriteAllText(Path.Combine(folder, $"cases-{runner}.txt"), summary);
    }
}
