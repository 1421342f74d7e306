using System.Diagnostics;
using System.Text;

namespace Tare.Packages.Tests;

/// <summary>Runs the SDK as a user would: in a folder, with its own package cache.</summary>
internal static class Dotnet
{
    private static readonly TimeSpan Limit = TimeSpan.FromMinutes(5);

    /// <summary>Runs a command in a folder.</summary>
    /// <param name="packages">Where packages are unpacked; null for the user's own folder.</param>
    public static async Task<CommandResult> RunAsync(string folder, string? packages, params string[] arguments)
    {
        var start = new ProcessStartInfo(Environment.GetEnvironmentVariable("DOTNET_HOST_PATH") ?? "dotnet", arguments)
        {
            WorkingDirectory = folder,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        };
        // The test runner's own build must not leak into the user's.
        foreach (string variable in start.Environment.Keys.Where(k => k.StartsWith("MSBUILD", StringComparison.OrdinalIgnoreCase)).ToArray())
            start.Environment.Remove(variable);
        // A server that outlives the command would hold its output open.
        start.Environment["MSBUILDDISABLENODEREUSE"] = "1";
        start.Environment["UseSharedCompilation"] = "false";
        start.Environment["DOTNET_CLI_UI_LANGUAGE"] = "en";
        start.Environment["CI"] = null;
        if (packages is not null)
            start.Environment["NUGET_PACKAGES"] = packages;

        using var process = Process.Start(start) ?? throw new InvalidOperationException("dotnet does not start.");
        var output = new StringBuilder();
        void Append(object _, DataReceivedEventArgs line)
        {
            lock (output)
                output.AppendLine(line.Data);
        }

        process.OutputDataReceived += Append;
        process.ErrorDataReceived += Append;
        process.BeginOutputReadLine();
        process.BeginErrorReadLine();
        using var cancel = new CancellationTokenSource(Limit);
        try
        {
            await process.WaitForExitAsync(cancel.Token);
        }
        catch (OperationCanceledException)
        {
            process.Kill(entireProcessTree: true);
        }

        lock (output)
            return new CommandResult("dotnet " + string.Join(" ", arguments), process.ExitCode, output.ToString());
    }
}
