using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;

namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>Runs the analyzer over test programs.</summary>
internal static class Analysis
{
    /// <summary>Findings in a program of one file, in the order of their places.</summary>
    public static Task<ImmutableArray<Diagnostic>> FindAsync(string source) => FindAsync(new TestProgram(source));

    /// <summary>Findings in a program, in the order of their places.</summary>
    public static Task<ImmutableArray<Diagnostic>> FindAsync(TestProgram program) =>
        FindAsync(program.ToProject(), program.AllowErrors);

    /// <summary>Findings in a project, in the order of their places.</summary>
    public static async Task<ImmutableArray<Diagnostic>> FindAsync(Project project, bool allowErrors = false)
    {
        var compilation = await project.GetCompilationAsync() ?? throw new InvalidOperationException("no compilation");
        if (!allowErrors)
            AssertCompiles(compilation);
        return InOrder(await Driver(compilation, project.AnalyzerOptions).GetAnalyzerDiagnosticsAsync());
    }

    /// <summary>Findings when every document is asked for by itself, each with a fresh driver, as an editor does.</summary>
    public static async Task<ImmutableArray<Diagnostic>> FindByDocumentAsync(Project project)
    {
        var compilation = await project.GetCompilationAsync() ?? throw new InvalidOperationException("no compilation");
        var found = new List<Diagnostic>();
        foreach (var tree in compilation.SyntaxTrees)
        {
            // A fresh compilation too: nothing may depend on what an earlier document left behind.
            var fresh = compilation.Clone();
            var driver = Driver(fresh, project.AnalyzerOptions);
            found.AddRange(await driver.GetAnalyzerSyntaxDiagnosticsAsync(tree, default));
            found.AddRange(await driver.GetAnalyzerSemanticDiagnosticsAsync(fresh.GetSemanticModel(tree), null, default));
        }

        return InOrder(found);
    }

    /// <summary>Runs the analyzer over a compilation that may hold errors; an exception in it is thrown.</summary>
    public static Task<ImmutableArray<Diagnostic>> FindInCompilationAsync(Compilation compilation, AnalyzerOptions options, CancellationToken cancel = default) =>
        Driver(compilation, options).GetAnalyzerDiagnosticsAsync(cancel);

    /// <summary>Fails with the errors of a compilation if it has any.</summary>
    public static void AssertCompiles(Compilation compilation)
    {
        var errors = compilation.GetDiagnostics().Where(d => d.Severity == DiagnosticSeverity.Error).ToArray();
        Assert.True(errors.Length == 0, "The program does not compile:\n" + string.Join("\n", errors.Take(10).Select(e => e.ToString())));
    }

    private static CompilationWithAnalyzers Driver(Compilation compilation, AnalyzerOptions options) =>
        compilation.WithAnalyzers([new TareAnalyzer()], new CompilationWithAnalyzersOptions(
            options,
            onAnalyzerException: null,
            concurrentAnalysis: false,
            logAnalyzerExecutionTime: false,
            reportSuppressedDiagnostics: false,
            // Otherwise the driver turns an exception into AD0001, which a test can overlook.
            analyzerExceptionFilter: static exception => throw new InvalidOperationException("The analyzer threw: " + exception, exception)));

    private static ImmutableArray<Diagnostic> InOrder(IEnumerable<Diagnostic> found)
    {
        var ordered = found
            .OrderBy(d => d.Location.GetLineSpan().Path, StringComparer.Ordinal)
            .ThenBy(d => d.Location.SourceSpan.Start)
            .ThenBy(d => d.Id, StringComparer.Ordinal)
            .ToImmutableArray();
        Assert.DoesNotContain(ordered, d => d.Id == "AD0001");
        return ordered;
    }
}
