using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Diagnostics;

namespace Tare.Tool.Tests;

/// <summary>
/// Reports local variables by their names, with the fields called `origin…` as the place their rows come from:
/// `bad…` (warning, can be mended), `stuck…` (warning, cannot), `hint…` (info, cannot), `trap…` (warning, the fix does not compile), `bomb…` (warning, the fix throws),
/// `again…` (warning, the fix brings the finding back), `extra…` (warning, the fix adds a file).
/// In an additional file every line that begins with `stuck` is reported.
/// </summary>
#pragma warning disable RS1036, RS1038, RS1041, RS2008 // Rules about shipping an analyzer; this one is for tests.
[DiagnosticAnalyzer(LanguageNames.CSharp)]
public sealed class MarkerAnalyzer : DiagnosticAnalyzer
{
    public static readonly DiagnosticDescriptor Bad = Rule("TEST001", DiagnosticSeverity.Warning);
    public static readonly DiagnosticDescriptor Stuck = Rule("TEST002", DiagnosticSeverity.Warning);
    public static readonly DiagnosticDescriptor Hint = Rule("TEST003", DiagnosticSeverity.Info);
    public static readonly DiagnosticDescriptor Trap = Rule("TEST004", DiagnosticSeverity.Warning);
    public static readonly DiagnosticDescriptor Bomb = Rule("TEST005", DiagnosticSeverity.Warning);
    public static readonly DiagnosticDescriptor Again = Rule("TEST006", DiagnosticSeverity.Warning);
    public static readonly DiagnosticDescriptor Extra = Rule("TEST007", DiagnosticSeverity.Warning);

    public override ImmutableArray<DiagnosticDescriptor> SupportedDiagnostics => [Bad, Stuck, Hint, Trap, Bomb, Again, Extra];

    public override void Initialize(AnalysisContext context)
    {
        context.EnableConcurrentExecution();
        context.ConfigureGeneratedCodeAnalysis(GeneratedCodeAnalysisFlags.None);
        context.RegisterAdditionalFileAction(ReportLines);
        context.RegisterSyntaxNodeAction(Report, SyntaxKind.VariableDeclarator);
    }

    private static void Report(SyntaxNodeAnalysisContext context)
    {
        var variable = (VariableDeclaratorSyntax)context.Node;
        var name = variable.Identifier.Text;
        if (name.StartsWith("crash", StringComparison.Ordinal))
        {
            throw new InvalidOperationException("marker crash");
        }

        var rule = new[] { ("bad", Bad), ("stuck", Stuck), ("hint", Hint), ("trap", Trap), ("bomb", Bomb), ("again", Again), ("extra", Extra) }
            .FirstOrDefault(entry => name.StartsWith(entry.Item1, StringComparison.Ordinal)).Item2;
        if (rule == null)
        {
            return;
        }

        var origins = context.Compilation.GetSymbolsWithName(symbol => symbol.StartsWith("origin", StringComparison.Ordinal), SymbolFilter.Member)
            .SelectMany(symbol => symbol.Locations)
            .OrderBy(location => location.SourceTree!.FilePath, StringComparer.Ordinal)
            .ToArray();
        var properties = ImmutableDictionary<string, string?>.Empty.Add("tare.places", string.Join(",", origins.Select(_ => "rows")));
        context.ReportDiagnostic(Diagnostic.Create(rule, variable.Identifier.GetLocation(), origins, properties, name));
    }

    private static void ReportLines(AdditionalFileAnalysisContext context)
    {
        var text = context.AdditionalFile.GetText(context.CancellationToken)!;
        foreach (var line in text.Lines.Where(line => line.ToString().StartsWith("stuck", StringComparison.Ordinal)))
        {
            context.ReportDiagnostic(Diagnostic.Create(
                Stuck, Location.Create(context.AdditionalFile.Path, line.Span, text.Lines.GetLinePositionSpan(line.Span)), line.ToString()));
        }
    }

    private static DiagnosticDescriptor Rule(string id, DiagnosticSeverity severity) =>
        new(id, "Marker", "'{0}' is marked", "Test", severity, isEnabledByDefault: true, "A marker.", "https://tare.example/" + id);
}
