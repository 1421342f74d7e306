using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.Text;
using Tare.Tool.Analysis;
using Tare.Tool.Loading;

namespace Tare.Tool.Mending;

/// <summary>Applies fixes, provider by provider and rule by rule, and analyses again, until nothing is left that a fix takes.</summary>
internal sealed class Mender(RulePack rules)
{
    // A fix that brings its own finding back would go on for ever.
    private const int MaxRounds = 10;

    private readonly Inspector _inspector = new(rules);

    /// <param name="wanted">Which findings to mend.</param>
    public async Task<MendResult> MendAsync(LoadedCode code, Func<Finding, bool> wanted, Action<string> progress, CancellationToken cancel)
    {
        var solution = code.Solution;
        var first = await _inspector.InspectAsync(code, solution, progress, cancel);
        var found = first.Findings.Where(wanted).ToArray();
        var left = found;
        var errors = first.CompileErrors;
        var refused = new HashSet<(CodeFixProvider Provider, string Rule, string? Key)>();
        var refusals = new HashSet<Refusal>();
        var changed = true;
        for (var round = 0; round < MaxRounds && changed && left.Length > 0; round++)
        {
            changed = false;
            foreach (var provider in rules.Fixes.Where(provider => provider.GetFixAllProvider() != null))
            {
                foreach (var rule in provider.FixableDiagnosticIds)
                {
                    progress($"Mending {rule}");
                    foreach (var group in await ProposalsAsync(provider, rule, left, solution, refusals, cancel))
                    {
                        if (refused.Contains((provider, rule, group.Key)))
                        {
                            continue;
                        }

                        var (next, refusal) = await ApplyAsync(provider, rule, group, solution, cancel);
                        Inspection? after = null;
                        if (next != null)
                        {
                            after = await _inspector.InspectAsync(code, next, progress, cancel);
                            if (after.CompileErrors > errors)
                            {
                                refusal = new Refusal(rule, "because the code would no longer compile");
                            }
                        }

                        if (refusal != null)
                        {
                            refused.Add((provider, rule, group.Key));
                            refusals.Add(refusal);
                        }

                        if (next == null || refusal != null)
                        {
                            continue;
                        }

                        (solution, errors, changed) = (next, after!.CompileErrors, true);
                        left = [.. after.Findings.Where(wanted)];

                        // The other groups speak of trees that are gone; the next round makes them anew.
                        break;
                    }
                }
            }
        }

        return new MendResult(
            await ChangesAsync(code.Solution, solution, cancel),
            found.Length,
            [.. left],
            [.. refusals.OrderBy(refusal => refusal.Rule, StringComparer.Ordinal).ThenBy(refusal => refusal.Reason, StringComparer.Ordinal)],
            first);
    }

    /// <summary>The first action for each finding, by what kind of action it is.</summary>
    private static async Task<IReadOnlyList<IGrouping<string?, Proposal>>> ProposalsAsync(
        CodeFixProvider provider, string rule, IEnumerable<Finding> findings, Solution solution, HashSet<Refusal> refusals, CancellationToken cancel)
    {
        var proposals = new List<Proposal>();
        foreach (var finding in findings.Where(finding => finding.Id == rule))
        {
            try
            {
                if (await Proposal.OfAsync(provider, finding.Diagnostic, solution, cancel) is { } proposal)
                {
                    proposals.Add(proposal);
                }
            }
            catch (Exception fault) when (fault is not OperationCanceledException)
            {
                refusals.Add(Failed(rule, fault));
            }
        }

        return [.. proposals.GroupBy(proposal => proposal.Action.EquivalenceKey)];
    }

    private static async Task<(Solution? Next, Refusal? Refusal)> ApplyAsync(
        CodeFixProvider provider, string rule, IGrouping<string?, Proposal> group, Solution solution, CancellationToken cancel)
    {
        try
        {
            var context = new FixAllContext(
                group.First().Document, provider, FixAllScope.Solution, group.Key!, [rule], new KnownDiagnostics(group), cancel);
            if (await provider.GetFixAllProvider()!.GetFixAsync(context) is not { } action
                || await Proposal.OutcomeOf(action, cancel) is not { } outcome)
            {
                return default;
            }

            var next = await ShareAsync(solution, outcome, cancel);
            return (next == solution ? null : next, null);
        }
        catch (Exception fault) when (fault is not OperationCanceledException)
        {
            return (null, Failed(rule, fault));
        }
    }

    private static Refusal Failed(string rule, Exception fault) =>
        new(rule, $"because it failed ({fault.GetType().Name}: {fault.Message.Split('\n', 2)[0].TrimEnd()})");

    /// <summary>Takes over what a fix changed, once a file: every project that compiles the file gets the same text, and generated files stay.</summary>
    private static async Task<Solution> ShareAsync(Solution before, Solution after, CancellationToken cancel)
    {
        var next = before;
        var taken = new HashSet<string>(StringComparer.Ordinal);
        foreach (var project in after.GetChanges(before).GetProjectChanges())
        {
            foreach (var id in project.GetChangedDocuments(onlyGetDocumentsWithTextChanges: true))
            {
                var path = after.GetDocument(id)!.FilePath;
                if (path == null || GeneratedCode.Is(path))
                {
                    continue;
                }

                var text = await after.GetDocument(id)!.GetTextAsync(cancel);
                var old = await before.GetDocument(id)!.GetTextAsync(cancel);
                if (!text.ContentEquals(old) && taken.Add(path))
                {
                    next = next.WithDocumentText(before.GetDocumentIdsWithFilePath(path), text);
                }
            }

            foreach (var id in project.GetAddedDocuments())
            {
                var added = after.GetDocument(id)!;
                var path = added.FilePath ?? PathOf(added);
                if (!taken.Add(path))
                {
                    continue;
                }

                // Every target of the project compiles the file, as the build will.
                foreach (var target in before.Projects.Where(target => target.Id == added.Project.Id || (target.FilePath != null && target.FilePath == added.Project.FilePath)))
                {
                    next = next.AddDocument(
                        DocumentId.CreateNewId(target.Id), added.Name, await added.GetTextAsync(cancel), added.Folders, path);
                }
            }
        }

        return next;
    }

    private static string PathOf(Document document) =>
        Path.Combine([Path.GetDirectoryName(document.Project.FilePath) ?? "", .. document.Folders, document.Name]);

    private static async Task<ImmutableArray<FileChange>> ChangesAsync(Solution before, Solution after, CancellationToken cancel)
    {
        var changes = new SortedDictionary<string, FileChange>(StringComparer.Ordinal);
        foreach (var project in after.GetChanges(before).GetProjectChanges())
        {
            foreach (var id in project.GetChangedDocuments(onlyGetDocumentsWithTextChanges: true))
            {
                var document = after.GetDocument(id)!;
                var old = await before.GetDocument(id)!.GetTextAsync(cancel);
                var text = TextShape.Keep(old.ToString(), (await document.GetTextAsync(cancel)).ToString());
                if (text != old.ToString())
                {
                    changes.TryAdd(document.FilePath!, new FileChange(document.FilePath!, old.ToString(), text, old.Encoding));
                }
            }

            foreach (var id in project.GetAddedDocuments())
            {
                var document = after.GetDocument(id)!;
                changes.TryAdd(document.FilePath!, new FileChange(document.FilePath!, null, (await document.GetTextAsync(cancel)).ToString(), null));
            }
        }

        return [.. changes.Values];
    }
}
