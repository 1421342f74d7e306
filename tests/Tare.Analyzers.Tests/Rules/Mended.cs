using Microsoft.CodeAnalysis;
using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Rules;

/// <summary>Applies fixes and holds what every fix must hold: the result compiles, the finding is gone, and no other came.</summary>
internal static class Mended
{
    /// <summary>The text after the first action for each finding of a rule, one after the other.</summary>
    public static Task<string> OneByOneAsync(TestProgram program, string rule, string document = "Program.cs") =>
        CheckAsync(program, rule, document, project => Fixes.ApplyFirstAsync(project, rule));

    /// <summary>The text after FixAll, which must give what single fixes give.</summary>
    public static async Task<string> AllAsync(TestProgram program, string rule, string document = "Program.cs")
    {
        string all = await CheckAsync(program, rule, document, project => Fixes.ApplyToAllAsync(project, rule));
        Assert.Equal(await OneByOneAsync(program, rule, document), all);
        return all;
    }

    /// <summary>The rule reports the program, and no action is offered for it.</summary>
    public static async Task OffersNothingAsync(TestProgram program, string rule)
    {
        var project = program.ToProject();
        var findings = (await Analysis.FindAsync(project)).Where(d => d.Id == rule).ToArray();
        Assert.NotEmpty(findings);
        foreach (var finding in findings)
            Assert.Empty(await Fixes.OfferedAsync(project, finding));
    }

    private static async Task<string> CheckAsync(TestProgram program, string rule, string document, Func<Project, Task<Project>> fix)
    {
        var project = program.ToProject();
        var before = await Analysis.FindAsync(project);
        var mended = await fix(project);
        string text = await Fixes.TextAsync(mended, document);
        // compiles, or this throws
        var after = await Analysis.FindAsync(mended);
        Assert.True(after.All(d => d.Id != rule), $"Still reported: {string.Join("\n", after.Where(d => d.Id == rule))}\n{text}");
        Assert.True(after.All(d => before.Any(b => b.Id == d.Id)), $"The fix adds a finding: {string.Join("\n", after)}\n{text}");
        return text;
    }
}
