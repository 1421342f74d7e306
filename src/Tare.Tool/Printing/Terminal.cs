using Spectre.Console;

namespace Tare.Tool.Printing;

/// <summary>What the process is connected to.</summary>
internal static class Terminal
{
    /// <summary>Whether somebody watches standard error.</summary>
    public static bool IsErrorShown => !Console.IsErrorRedirected;

    /// <summary>Whether standard output is a terminal that takes colour and nobody asked for none (no-color.org).</summary>
    public static bool TakesColour()
    {
        if (Console.IsOutputRedirected || !string.IsNullOrEmpty(Environment.GetEnvironmentVariable("NO_COLOR")))
        {
            return false;
        }

        // Asking also switches a Windows console to escape sequences.
        var console = AnsiConsole.Create(new AnsiConsoleSettings { Out = new AnsiConsoleOutput(Console.Out) });
        return console.Profile.Capabilities.Ansi && console.Profile.Capabilities.ColorSystem != ColorSystem.NoColors;
    }
}
