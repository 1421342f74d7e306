using System.Reflection;
using System.Runtime.Loader;
using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>A test program compiled in memory, to be run with arguments. Runs share the console: one at a time.</summary>
internal sealed class CompiledProgram
{
    private static readonly TimeSpan Limit = TimeSpan.FromSeconds(60);
    private readonly byte[] _image;

    private CompiledProgram(byte[] image) => _image = image;

    public static async Task<CompiledProgram> CompileAsync(Project project)
    {
        var compilation = await project.GetCompilationAsync() ?? throw new InvalidOperationException("no compilation");
        Analysis.AssertCompiles(compilation);
        using var image = new MemoryStream();
        var emitted = compilation.Emit(image);
        Assert.True(emitted.Success, string.Join("\n", emitted.Diagnostics));
        return new CompiledProgram(image.ToArray());
    }

    /// <summary>Runs the program in a load context of its own, so that its statics start afresh, and returns what it printed.</summary>
    public async Task<string> RunAsync(params string[] arguments)
    {
        var context = new AssemblyLoadContext("program", isCollectible: true);
        var console = Console.Out;
        using var printed = new StringWriter();
        try
        {
            Console.SetOut(printed);
            var entry = context.LoadFromStream(new MemoryStream(_image)).EntryPoint
                ?? throw new InvalidOperationException("The program has no entry point.");
            object?[] passed = entry.GetParameters().Length == 0 ? [] : [arguments];
            await Task.Run(() => entry.Invoke(null, BindingFlags.DoNotWrapExceptions, null, passed, null)).WaitAsync(Limit);
        }
        finally
        {
            Console.SetOut(console);
            context.Unload();
        }

        return printed.ToString();
    }

    /// <summary>Runs the program and returns what follows <c>chosen=</c> in its output.</summary>
    public async Task<string> ChosenAsync(int argument)
    {
        string output = await RunAsync(argument.ToString(System.Globalization.CultureInfo.InvariantCulture));
        string? line = output.Split('\n').FirstOrDefault(l => l.StartsWith("chosen=", StringComparison.Ordinal));
        Assert.True(line is not null, "The program printed no line that starts with chosen=:\n" + output);
        return line["chosen=".Length..].Trim();
    }
}
