using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using Tare.Tool.Loading;

namespace Tare.Tool.Analysis;

/// <summary>Runs the analyzers over loaded code.</summary>
internal sealed class Inspector(RulePack rules)
{
    // The id under which Roslyn reports that an analyzer threw.
    private const string AnalyzerThrew = "AD0001";

    /// <summary>Analyses every project of <paramref name="code"/> in the state that <paramref name="solution"/> has.</summary>
    public async Task<Inspection> InspectAsync(LoadedCode code, Solution solution, Action<string> progress, CancellationToken cancel)
    {
        var findings = new Dictionary<(string, string, Microsoft.CodeAnalysis.Text.TextSpan, string), Finding>();
        var crashes = new SortedSet<string>(StringComparer.Ordinal);
        var errors = new HashSet<(string, string, int, int)>();
        foreach (var id in code.Projects)
        {
            var project = solution.GetProject(id)!;
            progress($"Following the values in {project.Name}");
            var compilation = await project.GetCompilationAsync(cancel)
                ?? throw new ToolException($"{project.Name} is no project that can be compiled.");
            CollectErrors(compilation, errors, cancel);
            var options = new CompilationWithAnalyzersOptions(
                project.AnalyzerOptions, onAnalyzerException: null, concurrentAnalysis: true, logAnalyzerExecutionTime: false, reportSuppressedDiagnostics: false);
            var diagnostics = await compilation.WithAnalyzers(rules.Analyzers, options).GetAnalyzerDiagnosticsAsync(cancel);
            var others = new Lazy<ImmutableDictionary<string, TextDocument>>(() => TextFilesOf(project));
            foreach (var diagnostic in diagnostics)
            {
                if (diagnostic.Id == AnalyzerThrew)
                {
                    crashes.Add(FirstLine(diagnostic.GetMessage(System.Globalization.CultureInfo.InvariantCulture)));
                    continue;
                }

                // Hidden ones feed editors; suppressed ones were answered.
                if (diagnostic.Severity == DiagnosticSeverity.Hidden || diagnostic.IsSuppressed)
                {
                    continue;
                }

                var finding = new Finding(diagnostic, id, await PlacesOf(diagnostic, others, cancel));
                if (code.Covers(finding.Places.IsEmpty ? null : finding.Places[0].Path))
                {
                    findings.TryAdd(finding.Identity, finding);
                }
            }
        }

        return new Inspection(
            [
                .. findings.Values
                    .OrderBy(f => f.Identity.Path, StringComparer.Ordinal)
                    .ThenBy(f => f.Identity.Span.Start)
                    .ThenBy(f => f.Id, StringComparer.Ordinal)
                    .ThenBy(f => f.Message, StringComparer.Ordinal),
            ],
            errors.Count,
            [.. crashes]);
    }

    /// <summary>Adds the compiler's errors; an error in a file of several targets counts once.</summary>
    public static void CollectErrors(Compilation compilation, HashSet<(string Id, string Path, int Line, int Column)> errors, CancellationToken cancel)
    {
        foreach (var error in compilation.GetDiagnostics(cancel))
        {
            if (error.Severity == DiagnosticSeverity.Error && !error.IsWarningAsError)
            {
                var at = error.Location.GetLineSpan();
                errors.Add((error.Id, at.Path ?? "", at.StartLinePosition.Line, at.StartLinePosition.Character));
            }
        }
    }

    private static async Task<ImmutableArray<Place>> PlacesOf(
        Diagnostic diagnostic, Lazy<ImmutableDictionary<string, TextDocument>> others, CancellationToken cancel)
    {
        if (await PlaceOf(diagnostic.Location, Labels.Own(diagnostic.Id), others, cancel) is not { } own)
        {
            return [];
        }

        var places = ImmutableArray.CreateBuilder<Place>();
        places.Add(own);
        var labels = Labels.OfOthers(diagnostic);
        for (var i = 0; i < diagnostic.AdditionalLocations.Count; i++)
        {
            if (await PlaceOf(diagnostic.AdditionalLocations[i], labels[i], others, cancel) is { } place)
            {
                places.Add(place);
            }
        }

        return places.ToImmutable();
    }

    private static async Task<Place?> PlaceOf(
        Location location, string label, Lazy<ImmutableDictionary<string, TextDocument>> others, CancellationToken cancel)
    {
        if (location.SourceTree is { } tree)
        {
            return new Place(tree.FilePath, await tree.GetTextAsync(cancel), location.SourceSpan, label);
        }

        // A place in a catalogue or a settings file has a path and no tree.
        var path = location.GetLineSpan().Path;
        if (location.Kind != LocationKind.ExternalFile || !others.Value.TryGetValue(path, out var document))
        {
            return null;
        }

        var text = await document.GetTextAsync(cancel);
        return location.SourceSpan.End <= text.Length ? new Place(path, text, location.SourceSpan, label) : null;
    }

    private static ImmutableDictionary<string, TextDocument> TextFilesOf(Project project) => project.AdditionalDocuments
        .Concat(project.AnalyzerConfigDocuments)
        .Where(document => document.FilePath != null)
        .GroupBy(document => document.FilePath!)
        .ToImmutableDictionary(group => group.Key, group => group.First());

    private static string FirstLine(string text) => text.Split('\n', 2)[0].TrimEnd();
}
