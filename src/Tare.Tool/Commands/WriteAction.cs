using System.CommandLine;
using System.CommandLine.Invocation;

namespace Tare.Tool.Commands;

/// <summary>Writes to standard output and is done.</summary>
internal sealed class WriteAction(Action<TextWriter> write) : SynchronousCommandLineAction
{
    public override bool ClearsParseErrors => true;

    public override int Invoke(ParseResult parseResult)
    {
        write(parseResult.InvocationConfiguration.Output);
        return ExitCode.Clean;
    }
}
