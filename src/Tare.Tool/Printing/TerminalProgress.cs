using Spectre.Console;

namespace Tare.Tool.Printing;

/// <summary>A line on standard error that is gone when the work is done.</summary>
internal sealed class TerminalProgress : IProgressDisplay
{
    private readonly IAnsiConsole _console = AnsiConsole.Create(new AnsiConsoleSettings { Out = new AnsiConsoleOutput(Console.Error) });

    public Task<T> ShowAsync<T>(string title, Func<Action<string>, Task<T>> work) =>
        _console.Status().StartAsync(Markup.Escape(title), status => work(text => status.Status(Markup.Escape(text))));
}
