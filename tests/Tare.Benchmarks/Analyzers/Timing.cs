namespace Tare.Benchmarks.Analyzers;

/// <summary>Time of the compiler (parsing aside: binding and its own diagnostics) and of the analyzer on the same code.</summary>
internal sealed record Timing(string Name, int Lines, TimeSpan Compiler, TimeSpan Analyzer, int Findings, int Errors)
{
    public double Ratio => Analyzer / Compiler;
}
