using System.CommandLine;
using Tare.Tool.Analysis;
using Tare.Tool.Commands;

namespace Tare.Tool;

/// <summary>The command line as one call, so that it runs in a test as it runs in a shell.</summary>
internal sealed class Application(RulePack rules, Surroundings surroundings)
{
    /// <summary>Runs the shipped rules over what the arguments name.</summary>
    /// <returns>The exit code: see <see cref="ExitCode"/>.</returns>
    public static Task<int> RunAsync(string[] args, TextWriter output, TextWriter error) =>
        new Application(RulePack.Shipped(), Surroundings.OfProcess()).InvokeAsync(args, output, error);

    public async Task<int> InvokeAsync(string[] args, TextWriter output, TextWriter error)
    {
        try
        {
            var parsed = CommandLine.Build(rules, surroundings).Parse(args);
            if (parsed.Errors.Count > 0)
            {
                var command = parsed.CommandResult.Command is RootCommand ? "tare" : $"tare {parsed.CommandResult.Command.Name}";
                await error.WriteLineAsync($"tare: {OneLine(parsed.Errors[0].Message)}; see `{command} --help`.");
                return ExitCode.Failed;
            }

            return await parsed.InvokeAsync(new InvocationConfiguration
            {
                Output = output,
                Error = error,
                EnableDefaultExceptionHandler = false,
            });
        }
        catch (ToolException problem)
        {
            await error.WriteLineAsync($"tare: {problem.Message}");
            return ExitCode.Failed;
        }
        catch (OperationCanceledException)
        {
            await error.WriteLineAsync("tare: stopped before the end; nothing was written.");
            return ExitCode.Failed;
        }
        catch (Exception fault)
        {
            // Unknown is not clean: without this the runtime would abort with a code of its own.
            await error.WriteLineAsync($"tare: a fault of the tool itself, please report it: {fault}");
            return ExitCode.Failed;
        }
    }

    private static string OneLine(string message) => string.Join(' ', message.Split('\n', StringSplitOptions.TrimEntries | StringSplitOptions.RemoveEmptyEntries)).TrimEnd('.');
}
