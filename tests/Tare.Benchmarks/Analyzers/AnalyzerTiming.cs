using System.Collections.Immutable;
using System.Diagnostics;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.Diagnostics;
using Tare.Analyzers;

namespace Tare.Benchmarks.Analyzers;

/// <summary>Times the analyzer by the driver's own clock, as a build with ReportAnalyzer does.</summary>
internal static class AnalyzerTiming
{
    private const int Rounds = 3;

    private static readonly ImmutableArray<MetadataReference> References =
    [
        .. ((string)AppContext.GetData("TRUSTED_PLATFORM_ASSEMBLIES")!).Split(Path.PathSeparator)
            .Where(p => Path.GetFileName(p).StartsWith("System", StringComparison.Ordinal) || Path.GetFileName(p) == "netstandard.dll")
            .Select(p => MetadataReference.CreateFromFile(p)),
    ];

    /// <summary>The median of a few rounds after one that only warms up.</summary>
    public static Timing Measure(SourceSet source)
    {
        var trees = source.Files.Select((text, i) => CSharpSyntaxTree.ParseText(text, new CSharpParseOptions(LanguageVersion.Preview), $"File{i}.cs")).ToArray();
        int lines = source.Files.Sum(f => f.Count(c => c == '\n'));
        var compiler = new TimeSpan[Rounds];
        var analyzer = new TimeSpan[Rounds];
        int findings = 0, errors = 0;
        for (int round = -1; round < Rounds; round++)
        {
            var (bound, wrong, analysed, found) = Once(trees);
            if (round < 0)
                continue;
            (compiler[round], errors, analyzer[round], findings) = (bound, wrong, analysed, found);
        }

        Array.Sort(compiler);
        Array.Sort(analyzer);
        return new Timing(source.Name, lines, compiler[Rounds / 2], analyzer[Rounds / 2], findings, errors);
    }

    private static (TimeSpan Compiler, int Errors, TimeSpan Analyzer, int Findings) Once(SyntaxTree[] trees)
    {
        var options = new CSharpCompilationOptions(OutputKind.DynamicallyLinkedLibrary, concurrentBuild: false);
        var watch = Stopwatch.StartNew();
        var errors = CSharpCompilation.Create("Bound", trees, References, options).GetDiagnostics().Count(d => d.Severity == DiagnosticSeverity.Error);
        var bound = watch.Elapsed;

        // A compilation of its own, so that what the compiler has bound is not had for nothing.
        var host = new TareAnalyzer();
        var driver = CSharpCompilation.Create("Analysed", trees, References, options).WithAnalyzers(
            [host],
            new CompilationWithAnalyzersOptions(
                new AnalyzerOptions([]), null, concurrentAnalysis: false, logAnalyzerExecutionTime: true, reportSuppressedDiagnostics: false,
                static exception => throw new InvalidOperationException("The analyzer threw.", exception)));
        var result = driver.GetAnalysisResultAsync(default).GetAwaiter().GetResult();
        return (bound, errors, result.AnalyzerTelemetryInfo[host].ExecutionTime, result.GetAllDiagnostics().Length);
    }
}
