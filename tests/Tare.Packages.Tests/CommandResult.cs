namespace Tare.Packages.Tests;

/// <summary>How a command ended, and what it printed.</summary>
internal sealed record CommandResult(string Command, int ExitCode, string Output)
{
    public void AssertSucceeded() => Assert.True(ExitCode == 0, $"'{Command}' ended with {ExitCode}:\n{Output}");

    public override string ToString() => $"'{Command}' ended with {ExitCode}:\n{Output}";
}
