using System.Globalization;
using Tare.Benchmarks;
using Tare.Benchmarks.Analyzers;

CultureInfo.CurrentCulture = CultureInfo.InvariantCulture;

if (args is ["--help" or "-h", ..])
{
    Console.WriteLine("""
        Prints how much time the analyzer takes beside the compiler's own, in one run.

          Tare.Benchmarks [NAME...]        the generated worst cases, or those whose name holds NAME
          Tare.Benchmarks --folder PATH    all C# files below a folder as one compilation
        """);
    return 0;
}

if (args is ["--folder", var path])
{
    if (!Directory.Exists(path))
    {
        Console.Error.WriteLine($"There is no folder '{path}'.");
        return 2;
    }

    Report.Header();
    Report.Row(AnalyzerTiming.Measure(SourceFolder.Read(path)));
    return 0;
}

var chosen = GeneratedSources.All.Where(s => args.Length == 0 || args.Any(a => s.Name.Contains(a, StringComparison.OrdinalIgnoreCase))).ToArray();
if (chosen.Length == 0)
{
    Console.Error.WriteLine($"No case is called that. There are: {string.Join(", ", GeneratedSources.All.Select(s => s.Name))}.");
    return 2;
}

Report.Header();
foreach (var source in chosen)
    Report.Row(AnalyzerTiming.Measure(source));
return 0;
