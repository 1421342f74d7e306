using System.Collections.Immutable;
using System.Reflection;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.Diagnostics;
using Tare.Analyzers;

namespace Tare.Tool.Analysis;

/// <summary>The analyzers and fixes of a run.</summary>
internal sealed class RulePack(ImmutableArray<DiagnosticAnalyzer> analyzers, ImmutableArray<CodeFixProvider> fixes)
{
    public ImmutableArray<DiagnosticAnalyzer> Analyzers { get; } = analyzers;

    /// <summary>In the order in which they are tried.</summary>
    public ImmutableArray<CodeFixProvider> Fixes { get; } = fixes;

    public ImmutableArray<DiagnosticDescriptor> Descriptors { get; } =
        [.. analyzers.SelectMany(analyzer => analyzer.SupportedDiagnostics).DistinctBy(rule => rule.Id).OrderBy(rule => rule.Id, StringComparer.Ordinal)];

    public ImmutableArray<string> Ids => [.. Descriptors.Select(rule => rule.Id)];

    /// <summary>The analyzer and every fix that editors load too.</summary>
    public static RulePack Shipped() => new([new TareAnalyzer()], FixesOf(Assembly.Load("Tare.CodeFixes")));

    private static ImmutableArray<CodeFixProvider> FixesOf(Assembly assembly) =>
    [
        .. assembly.GetTypes()
            .Where(type => type.GetCustomAttribute<ExportCodeFixProviderAttribute>() != null)
            .OrderBy(type => type.FullName, StringComparer.Ordinal)
            .Select(type => (CodeFixProvider)Activator.CreateInstance(type, nonPublic: true)!),
    ];
}
