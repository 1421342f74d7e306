using System.Collections.Immutable;
using System.Reflection;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeActions;
using Microsoft.CodeAnalysis.CodeFixes;

namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>Applies the repository's fixes as an editor or <c>dotnet format analyzers</c> would.</summary>
internal static class Fixes
{
    /// <summary>The providers of Tare.CodeFixes; the one that only declares roles comes last.</summary>
    public static ImmutableArray<CodeFixProvider> All { get; } =
    [
        .. Assembly.Load("Tare.CodeFixes").GetTypes()
            .Where(t => !t.IsAbstract && t.GetCustomAttributes<ExportCodeFixProviderAttribute>().Any())
            .OrderBy(t => t.Name.Contains("Declare", StringComparison.Ordinal))
            .ThenBy(t => t.FullName, StringComparer.Ordinal)
            .Select(t => (CodeFixProvider)Activator.CreateInstance(t)!),
    ];

    /// <summary>The actions offered for a finding, in the order in which they are offered.</summary>
    public static async Task<ImmutableArray<CodeAction>> OfferedAsync(Project project, Diagnostic finding)
    {
        var document = project.Solution.GetDocument(finding.Location.SourceTree)
            ?? throw new InvalidOperationException("The finding stands in no document.");
        var offered = ImmutableArray.CreateBuilder<CodeAction>();
        foreach (var provider in All.Where(p => p.FixableDiagnosticIds.Contains(finding.Id)))
            await provider.RegisterCodeFixesAsync(new CodeFixContext(document, finding, (action, _) => offered.Add(action), default));
        return offered.ToImmutable();
    }

    /// <summary>The project after an action.</summary>
    public static async Task<Project> ApplyAsync(Project project, CodeAction action)
    {
        var operations = await action.GetOperationsAsync(default);
        var changed = operations.OfType<ApplyChangesOperation>().Single().ChangedSolution;
        return changed.GetProject(project.Id) ?? throw new InvalidOperationException("The fix removed the project.");
    }

    /// <summary>Applies the first action to the first finding of a rule, again and again, until none is left.</summary>
    /// <param name="equivalenceKey">Take the action with this key rather than the first.</param>
    public static async Task<Project> ApplyFirstAsync(Project project, string rule, string? equivalenceKey = null)
    {
        // Each finding is fixed once; a fix that leaves its finding in place must not run for ever.
        int atMost = (await Analysis.FindAsync(project)).Count(d => d.Id == rule);
        for (int round = 0; round < atMost; round++)
        {
            var finding = (await Analysis.FindAsync(project)).FirstOrDefault(d => d.Id == rule);
            if (finding is null)
                break;
            var offered = await OfferedAsync(project, finding);
            var action = equivalenceKey is null ? offered.FirstOrDefault() : offered.FirstOrDefault(a => a.EquivalenceKey == equivalenceKey);
            Assert.True(action is not null, $"No fix is offered for {finding}");
            project = await ApplyAsync(project, action);
        }

        return project;
    }

    /// <summary>Applies the first action to all findings of a rule at once.</summary>
    public static async Task<Project> ApplyToAllAsync(Project project, string rule, FixAllScope scope = FixAllScope.Project)
    {
        var findings = (await Analysis.FindAsync(project)).Where(d => d.Id == rule).ToImmutableArray();
        Assert.NotEmpty(findings);
        var first = (await OfferedAsync(project, findings[0])).FirstOrDefault();
        Assert.True(first is not null, $"No fix is offered for {findings[0]}");
        var provider = All.First(p => p.FixableDiagnosticIds.Contains(rule));
        var fixAll = provider.GetFixAllProvider();
        Assert.True(fixAll is not null, $"{provider.GetType().Name} has no FixAll.");
        var document = project.Solution.GetDocument(findings[0].Location.SourceTree)!;
        var context = new FixAllContext(document, provider, scope, first.EquivalenceKey!, [rule], new Findings(findings), default);
        var action = await fixAll.GetFixAsync(context);
        Assert.True(action is not null, "FixAll did nothing.");
        return await ApplyAsync(project, action);
    }

    /// <summary>The text of one document.</summary>
    public static async Task<string> TextAsync(Project project, string document = "Program.cs") =>
        (await project.Documents.Single(d => d.Name == document).GetTextAsync()).ToString();

    private sealed class Findings(ImmutableArray<Diagnostic> all) : FixAllContext.DiagnosticProvider
    {
        public override Task<IEnumerable<Diagnostic>> GetAllDiagnosticsAsync(Project project, CancellationToken cancel) =>
            Task.FromResult<IEnumerable<Diagnostic>>(all);

        public override Task<IEnumerable<Diagnostic>> GetDocumentDiagnosticsAsync(Document document, CancellationToken cancel) =>
            Task.FromResult(all.Where(d => d.Location.SourceTree?.FilePath == document.FilePath));

        public override Task<IEnumerable<Diagnostic>> GetProjectDiagnosticsAsync(Project project, CancellationToken cancel) =>
            Task.FromResult<IEnumerable<Diagnostic>>([]);
    }
}
