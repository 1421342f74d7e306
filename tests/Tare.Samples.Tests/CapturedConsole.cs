using System.Text;

namespace Tare.Samples.Tests;

/// <summary>Console output that goes to the writer of the run that wrote it, so that runs can go side by side.</summary>
internal sealed class CapturedConsole : TextWriter
{
    private readonly AsyncLocal<StringWriter?> _current = new();
    private readonly TextWriter _outside = Console.Out;

    public static CapturedConsole Install()
    {
        CapturedConsole console = new();
        Console.SetOut(console);
        return console;
    }

    public override Encoding Encoding => Encoding.UTF8;

    public StringWriter Start() => _current.Value = new StringWriter();

    public override void Write(char value) => (_current.Value ?? _outside).Write(value);

    public override void Write(string? value) => (_current.Value ?? _outside).Write(value);

    public override void WriteLine(string? value) => (_current.Value ?? _outside).WriteLine(value);
}
