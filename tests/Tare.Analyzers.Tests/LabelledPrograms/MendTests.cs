using Microsoft.CodeAnalysis;
using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.LabelledPrograms;

/// <summary>
/// Runs the labelled programs that are there to be mended: the integer draws the labels of the test rows,
/// so a winner that moves with it was chosen by them.
/// </summary>
[Collection(ConsoleCollection.Name)]
public class MendTests
{
    private const string Rule = "TARE101";
    private const int Draws = 6;

    public static TheoryData<string> Programs => Cases.Exist ? [.. Cases.Files("mend")] : [];

    [CasesTheory]
    [MemberData(nameof(Programs))]
    public async Task WinnerMovesWithTheTestRowsUntilMended(string file)
    {
        // The runtime library is there: a fix may use it.
        var program = Cases.Program(file) with { Libraries = Libraries.All };
        await CheckAsync(program.ToProject());
    }

    /// <summary>Fails unless the first fix of the rule makes the chosen candidate independent of the test rows.</summary>
    internal static async Task CheckAsync(Project project)
    {
        var before = await CompiledProgram.CompileAsync(project);
        Assert.True((await WinnersAsync(before)).Distinct().Count() > 1, "The winner does not move before the fix: the program shows nothing.");

        var rulesBefore = (await Analysis.FindAsync(project)).Select(d => d.Id).ToHashSet();
        Assert.Contains(Rule, rulesBefore);
        var mended = await Fixes.ApplyFirstAsync(project, Rule);
        string text = await Fixes.TextAsync(mended);

        var after = await CompiledProgram.CompileAsync(mended);
        var findings = await Analysis.FindAsync(mended);
        Assert.True(findings.All(d => d.Id != Rule), $"The mended program is still reported:\n{text}");
        Assert.True(findings.All(d => rulesBefore.Contains(d.Id)), $"The fix adds a finding: {string.Join("\n", findings)}\n{text}");
        string[] winners = await WinnersAsync(after);
        Assert.True(winners.Distinct().Count() == 1, $"The winner still moves with the test rows ({string.Join("; ", winners)}):\n{text}");
    }

    private static async Task<string[]> WinnersAsync(CompiledProgram program)
    {
        var winners = new string[Draws];
        for (int draw = 0; draw < Draws; draw++)
            winners[draw] = await program.ChosenAsync(draw);
        return winners;
    }
}
