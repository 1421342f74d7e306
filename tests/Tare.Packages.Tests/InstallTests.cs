using System.Text.RegularExpressions;

namespace Tare.Packages.Tests;

/// <summary>One package reference in a fresh project: warnings in the build, errors where asked for, fixes from the command line.</summary>
[Collection(PackagesCollection.Name)]
public class InstallTests(PackedFixture packed)
{
    [Theory]
    [InlineData("net10.0")]
    [InlineData("net8.0;net10.0")]
    public async Task TareWarnsFailsAndMends(string targets)
    {
        using var project = packed.NewProject(targets, "Tare");

        var build = await project.BuildAsync();
        build.AssertSucceeded();
        foreach (string target in targets.Split(';'))
            Assert.True(Reports(build, "warning", target), $"No warning for {target}: {build}");
        // The runtime library is there to be used; the analyzers leave nothing behind.
        Assert.Equal(["Boards.deps.json", "Boards.dll", "Boards.pdb", "Boards.runtimeconfig.json", "Tare.dll"], project.OutputFiles().Where(f => f != "System.Memory.dll"));

        var strict = await project.BuildAsync("--no-restore", "-warnaserror");
        Assert.True(strict.ExitCode != 0 && Reports(strict, "error", targets.Split(';')[0]), strict.ToString());

        string before = await File.ReadAllTextAsync(project.ProgramFile);
        var format = await project.RunAsync("format", "analyzers", "--diagnostics", "TARE101", "--severity", "warn", "--no-restore");
        format.AssertSucceeded();
        string after = await File.ReadAllTextAsync(project.ProgramFile);
        Assert.True(before != after, $"The program is unchanged: {format}");

        var mended = await project.BuildAsync("--no-restore");
        Assert.True(mended.ExitCode == 0, $"{mended}\n{after}");
        Assert.DoesNotContain("TARE101", mended.Output);
    }

    [Fact]
    public async Task AnalyzersAloneAddNothingToTheProgram()
    {
        using var project = packed.NewProject("net10.0", "Tare.Analyzers");
        var build = await project.BuildAsync();
        build.AssertSucceeded();
        Assert.True(Reports(build, "warning", "net10.0"), build.ToString());
        Assert.Equal(["Boards.deps.json", "Boards.dll", "Boards.pdb", "Boards.runtimeconfig.json"], project.OutputFiles());
    }

    // The build names the target of a warning only where there are several.
    private static bool Reports(CommandResult build, string severity, string target) =>
        Regex.IsMatch(build.Output, $@"Program\.cs\({FreshProject.ChoiceLine},\d+\): {severity} TARE101: .*Boards\.csproj(::TargetFramework={Regex.Escape(target)})?\]");
}
