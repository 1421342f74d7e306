using System.Reflection;

namespace Tare.Samples.Tests;

/// <summary>Runs a sample's own entry point in this process and gives back the line it prints, so that what is tested is the program as it stands.</summary>
internal sealed class SampleProgram
{
    private static readonly CapturedConsole Console = CapturedConsole.Install();
    private readonly MethodInfo _entry;

    public SampleProgram(string name) => _entry = Assembly.Load(name).EntryPoint!;

    public string Run(int seed, bool signal = false)
    {
        using StringWriter output = Console.Start();
        string[] args = signal ? ["--seed", $"{seed}", "--signal"] : ["--seed", $"{seed}"];
        object? result = _entry.Invoke(null, [args]);
        (result as Task)?.GetAwaiter().GetResult();
        return output.ToString().TrimEnd();
    }

    /// <summary>Runs many seeds on all cores.</summary>
    public string[] RunAll(int seeds, bool signal = false)
    {
        string[] lines = new string[seeds];
        Parallel.For(0, seeds, i => lines[i] = Run(i + 1, signal));
        return lines;
    }
}
