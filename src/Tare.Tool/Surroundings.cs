using Tare.Tool.Printing;

namespace Tare.Tool;

/// <summary>What a run takes from its process, so that tests can put their own in.</summary>
/// <param name="WorkingDirectory">Absolute path that relative paths start from and that printed paths are relative to.</param>
/// <param name="Colour">Whether standard output takes colour.</param>
/// <param name="Progress">Shows that long work goes on.</param>
internal sealed record Surroundings(string WorkingDirectory, bool Colour, IProgressDisplay Progress)
{
    public static Surroundings OfProcess() =>
        new(Environment.CurrentDirectory, Terminal.TakesColour(), Terminal.IsErrorShown ? new TerminalProgress() : new NoProgress());
}
