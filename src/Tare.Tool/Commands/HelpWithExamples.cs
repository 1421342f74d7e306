using System.CommandLine;
using System.CommandLine.Help;
using System.CommandLine.Invocation;

namespace Tare.Tool.Commands;

/// <summary>The usual help, and the command's examples below it.</summary>
internal sealed class HelpWithExamples(HelpAction usual, IReadOnlyDictionary<string, string> examples) : SynchronousCommandLineAction
{
    public override bool ClearsParseErrors => true;

    public override int Invoke(ParseResult parseResult)
    {
        var result = usual.Invoke(parseResult);
        if (examples.TryGetValue(parseResult.CommandResult.Command.Name, out var text))
        {
            parseResult.InvocationConfiguration.Output.WriteLine(text);
        }

        return result;
    }
}
