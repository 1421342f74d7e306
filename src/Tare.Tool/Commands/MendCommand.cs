using Tare.Tool.Analysis;
using Tare.Tool.Loading;
using Tare.Tool.Mending;
using Tare.Tool.Printing;

namespace Tare.Tool.Commands;

/// <summary>`tare mend`: shows fixes or applies them. Standard output carries the diff or the names of changed files, standard error all else.</summary>
internal sealed class MendCommand(RulePack rules, Surroundings surroundings)
{
    public async Task<int> RunAsync(MendOptions options, TextWriter output, TextWriter error, CancellationToken cancel)
    {
        using var code = await surroundings.Progress.ShowAsync("Loading", progress => CodeLoader.LoadAsync(options.Path, surroundings.WorkingDirectory, progress, cancel));
        var result = await surroundings.Progress.ShowAsync("Mending", progress => new Mender(rules).MendAsync(
            code, finding => options.Rules.Length == 0 || options.Rules.Contains(finding.Id), progress, cancel));
        Notes.Write(error, result.First);
        var ink = new Ink(surroundings.Colour);
        if (options.Write)
        {
            FileWriter.WriteAll(result.Changes);
        }

        foreach (var change in result.Changes)
        {
            if (options.Write)
            {
                await output.WriteLineAsync($"mended {DisplayPath.From(surroundings.WorkingDirectory, change.Path)}");
            }
            else
            {
                var path = DisplayPath.ForDiff(surroundings.WorkingDirectory, code.Root, change.Path);
                DiffPrinter.Write(output, ink, UnifiedDiff.Of(path, change.Before, change.After));
            }
        }

        foreach (var refusal in result.Refused)
        {
            await error.WriteLineAsync($"tare: a fix of {refusal.Rule} was left out {refusal.Reason}.");
        }

        // Colour follows standard output, which these lines do not go to.
        var printer = new FindingPrinter(error, new Ink(colour: false), path => DisplayPath.From(surroundings.WorkingDirectory, path));
        foreach (var finding in result.Left)
        {
            printer.WriteHead(finding);
        }

        await error.WriteLineAsync(Outcome(result, options.Write));
        if (!result.First.Crashes.IsEmpty)
        {
            return ExitCode.Failed;
        }

        return result.Left.Any(finding => options.FailOn.Fails(finding.Severity)) ? ExitCode.Found : ExitCode.Clean;
    }

    private static string Outcome(MendResult result, bool written)
    {
        if (result.Found == 0)
        {
            return "tare: no findings, nothing to mend.";
        }

        // A fix may bring a finding of another rule, so that more can be left than were found.
        var mended = Math.Max(0, result.Found - result.Left.Length);
        var left = result.Left.IsEmpty ? "" : $"; {result.Left.Length} left to mend by hand";
        var how = result.Changes.IsEmpty ? ""
            : $" in {Summary.Count(result.Changes.Length, "file")}" + (written ? "" : "; run again with --write to apply");
        return $"tare: {(written || result.Changes.IsEmpty ? "mended" : "would mend")} {mended} of {Summary.Count(result.Found, "finding")}{how}{left}.";
    }
}
