using System.Diagnostics;
using Tare.Tool.Analysis;
using Tare.Tool.Loading;
using Tare.Tool.Printing;
using Tare.Tool.Sarif;

namespace Tare.Tool.Commands;

/// <summary>`tare inspect`: shows findings.</summary>
internal sealed class InspectCommand(RulePack rules, Surroundings surroundings)
{
    public async Task<int> RunAsync(InspectOptions options, TextWriter output, TextWriter error, CancellationToken cancel)
    {
        var clock = Stopwatch.StartNew();
        using var code = await surroundings.Progress.ShowAsync("Loading", progress => CodeLoader.LoadAsync(options.Path, surroundings.WorkingDirectory, progress, cancel));
        var inspection = await surroundings.Progress.ShowAsync("Analysing", progress => new Inspector(rules).InspectAsync(code, code.Solution, progress, cancel));
        var findings = inspection.Findings.Where(finding => options.Rules.Length == 0 || options.Rules.Contains(finding.Id)).ToArray();
        if (options.Sarif != null)
        {
            await new SarifWriter(rules).WriteAsync(Path.GetFullPath(options.Sarif, surroundings.WorkingDirectory), code, findings, cancel);
        }

        Notes.Write(error, inspection);
        var printer = new FindingPrinter(output, new Ink(surroundings.Colour), path => DisplayPath.From(surroundings.WorkingDirectory, path));
        foreach (var finding in findings)
        {
            printer.Write(finding);
        }

        await output.WriteLineAsync(Summary.Of(findings, code, clock.Elapsed));
        if (!inspection.Crashes.IsEmpty)
        {
            return ExitCode.Failed;
        }

        return findings.Any(finding => options.FailOn.Fails(finding.Severity)) ? ExitCode.Found : ExitCode.Clean;
    }
}
