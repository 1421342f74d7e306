using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using Tare.Analyzers.Knowledge;
using Tare.Analyzers.Rules;

namespace Tare.Analyzers;

/// <summary>The one analyzer: it computes the flow that leads to a document once and lets every rule read it.</summary>
[DiagnosticAnalyzer(LanguageNames.CSharp)]
public sealed class TareAnalyzer : DiagnosticAnalyzer
{
    /// <inheritdoc/>
    public override ImmutableArray<DiagnosticDescriptor> SupportedDiagnostics => AllRules.Descriptors;

    /// <inheritdoc/>
    public override void Initialize(AnalysisContext context)
    {
        context.EnableConcurrentExecution();
        context.ConfigureGeneratedCodeAnalysis(GeneratedCodeAnalysisFlags.None);
        context.RegisterCompilationStartAction(start =>
        {
            var settings = Settings.Of(start.Options, start.Compilation, start.CancellationToken);
            var session = new Session(start.Compilation, settings, start.CancellationToken);
            start.RegisterSemanticModelAction(model =>
            {
                foreach (var finding in session.FindingsIn(model.SemanticModel, model.CancellationToken))
                    model.ReportDiagnostic(finding.ToDiagnostic());
            });
        });
    }
}
