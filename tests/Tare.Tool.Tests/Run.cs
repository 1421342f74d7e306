using Tare.Tool.Analysis;
using Tare.Tool.Printing;

namespace Tare.Tool.Tests;

/// <summary>What a run of the tool gave.</summary>
public sealed record Run(int Exit, string Output, string Error)
{
    private static readonly RulePack Markers = new([new MarkerAnalyzer()], [new MarkerFix(), new MarkerFileFix()]);

    /// <summary>Runs the tool with the marker rules, standing in the folder.</summary>
    public static Task<Run> InAsync(Folder folder, params string[] args) => InAsync(Markers, folder, args);

    /// <summary>Runs the tool with the rules it ships.</summary>
    public static Task<Run> ShippedInAsync(Folder folder, params string[] args) => InAsync(RulePack.Shipped(), folder, args);

    private static async Task<Run> InAsync(RulePack rules, Folder folder, string[] args)
    {
        using var output = new StringWriter { NewLine = "\n" };
        using var error = new StringWriter { NewLine = "\n" };
        var exit = await new Application(rules, new Surroundings(folder.Path, Colour: false, new NoProgress())).InvokeAsync(args, output, error);
        return new Run(exit, output.ToString(), error.ToString());
    }
}
