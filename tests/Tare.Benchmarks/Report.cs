using Tare.Benchmarks.Analyzers;

namespace Tare.Benchmarks;

/// <summary>Prints measurements as a table.</summary>
internal static class Report
{
    public static void Header() =>
        Console.WriteLine($"{"case",-28} {"lines",8} {"compiler ms",12} {"analyzer ms",12} {"ratio",7} {"findings",9} {"errors",7}");

    public static void Row(Timing timing) =>
        Console.WriteLine($"{timing.Name,-28} {timing.Lines,8} {timing.Compiler.TotalMilliseconds,12:F1} {timing.Analyzer.TotalMilliseconds,12:F1} {timing.Ratio,7:F3} {timing.Findings,9} {timing.Errors,7}");
}
