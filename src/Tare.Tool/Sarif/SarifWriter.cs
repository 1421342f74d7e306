using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Text;
using Tare.Tool.Analysis;
using Tare.Tool.Commands;
using Tare.Tool.Loading;
using Tare.Tool.Mending;

namespace Tare.Tool.Sarif;

/// <summary>Writes findings as SARIF: OASIS, "Static Analysis Results Interchange Format (SARIF) Version 2.1.0", 2020.</summary>
internal sealed class SarifWriter(RulePack rules)
{
    // Paths are relative to what was inspected, so that the file means the same on another machine.
    private const string RootId = "SRCROOT";

    private static readonly JsonSerializerOptions Format = new() { WriteIndented = true, Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    /// <exception cref="ToolException">The file cannot be written; then an older one stays as it was.</exception>
    public async Task WriteAsync(string file, LoadedCode code, IReadOnlyList<Finding> findings, CancellationToken cancel)
    {
        var text = (await LogAsync(code, findings, cancel)).ToJsonString(Format) + "\n";
        var temporary = $"{file}.{Guid.NewGuid():N}.tmp";
        try
        {
            await File.WriteAllTextAsync(temporary, text, cancel);
            File.Move(temporary, file, overwrite: true);
        }
        catch (Exception problem) when (problem is IOException or UnauthorizedAccessException)
        {
            throw new ToolException($"the SARIF file cannot be written: {problem.Message}");
        }
        finally
        {
            if (Directory.Exists(Path.GetDirectoryName(file)))
            {
                File.Delete(temporary);
            }
        }
    }

    private async Task<JsonObject> LogAsync(LoadedCode code, IReadOnlyList<Finding> findings, CancellationToken cancel)
    {
        var results = new JsonArray();
        foreach (var finding in findings)
        {
            results.Add(await ResultAsync(code, finding, cancel));
        }

        return new JsonObject
        {
            ["$schema"] = "https://docs.oasis-open.org/sarif/sarif/v2.1.0/os/schemas/sarif-schema-2.1.0.json",
            ["version"] = "2.1.0",
            ["runs"] = new JsonArray(new JsonObject
            {
                ["tool"] = new JsonObject
                {
                    ["driver"] = new JsonObject
                    {
                        ["name"] = "tare",
                        ["version"] = CommandLine.Version,
                        ["rules"] = new JsonArray([.. rules.Descriptors.Select(RuleOf)]),
                    },
                },
                ["originalUriBaseIds"] = new JsonObject
                {
                    [RootId] = new JsonObject { ["description"] = Text("The folder that was inspected, or that holds the inspected file.") },
                },
                ["columnKind"] = "utf16CodeUnits",
                ["results"] = results,
            }),
        };
    }

    private static JsonNode RuleOf(DiagnosticDescriptor rule)
    {
        var node = new JsonObject
        {
            ["id"] = rule.Id,
            ["shortDescription"] = Text(rule.Title.ToString(System.Globalization.CultureInfo.InvariantCulture)),
            ["defaultConfiguration"] = new JsonObject { ["level"] = LevelOf(rule.DefaultSeverity) },
            ["properties"] = new JsonObject { ["category"] = rule.Category },
        };
        if (rule.Description.ToString(System.Globalization.CultureInfo.InvariantCulture) is { Length: > 0 } description)
        {
            node["fullDescription"] = Text(description);
        }

        if (rule.HelpLinkUri.Length > 0)
        {
            node["helpUri"] = rule.HelpLinkUri;
        }

        return node;
    }

    private async Task<JsonObject> ResultAsync(LoadedCode code, Finding finding, CancellationToken cancel)
    {
        var result = new JsonObject
        {
            ["ruleId"] = finding.Id,
            ["ruleIndex"] = rules.Descriptors.IndexOf(rules.Descriptors.First(rule => rule.Id == finding.Id)),
            ["level"] = LevelOf(finding.Severity),
            ["message"] = Text(finding.Message),
        };
        if (finding.Places.IsEmpty)
        {
            return result;
        }

        result["locations"] = new JsonArray(LocationOf(code.Root, finding.Places[0]));
        if (finding.Places.Length > 1)
        {
            var related = new JsonArray();
            foreach (var place in finding.Places.Skip(1))
            {
                var location = LocationOf(code.Root, place);
                location["id"] = related.Count + 1;
                if (place.Label.Length > 0)
                {
                    location["message"] = Text(place.Label);
                }

                related.Add(location);
            }

            result["relatedLocations"] = related;
        }

        if (await FixAsync(code, finding, cancel) is { } fix)
        {
            result["fixes"] = new JsonArray(fix);
        }

        return result;
    }

    private async Task<JsonObject?> FixAsync(LoadedCode code, Finding finding, CancellationToken cancel)
    {
        foreach (var provider in rules.Fixes)
        {
            if (await Proposal.OfAsync(provider, finding.Diagnostic, code.Solution, cancel) is not { } proposal
                || await Proposal.OutcomeOf(proposal.Action, cancel) is not { } outcome)
            {
                continue;
            }

            var changes = new JsonArray();
            var seen = new HashSet<string>(StringComparer.Ordinal);
            foreach (var id in outcome.GetChanges(code.Solution).GetProjectChanges().SelectMany(project => project.GetChangedDocuments()))
            {
                var (before, after) = (code.Solution.GetDocument(id)!, outcome.GetDocument(id)!);
                if (before.FilePath == null || GeneratedCode.Is(before.FilePath) || !seen.Add(before.FilePath))
                {
                    continue;
                }

                var text = await before.GetTextAsync(cancel);
                var replacements = (await after.GetTextChangesAsync(before, cancel)).Select(change => ReplacementOf(text, change)).ToArray();
                if (replacements.Length > 0)
                {
                    changes.Add(new JsonObject
                    {
                        ["artifactLocation"] = ArtifactOf(code.Root, before.FilePath),
                        ["replacements"] = new JsonArray(replacements),
                    });
                }
            }

            if (changes.Count > 0)
            {
                return new JsonObject { ["description"] = Text(proposal.Action.Title), ["artifactChanges"] = changes };
            }
        }

        return null;
    }

    private static JsonNode ReplacementOf(SourceText text, TextChange change)
    {
        var node = new JsonObject { ["deletedRegion"] = RegionOf(text.Lines.GetLinePositionSpan(change.Span)) };
        if (!string.IsNullOrEmpty(change.NewText))
        {
            node["insertedContent"] = new JsonObject { ["text"] = change.NewText };
        }

        return node;
    }

    private static JsonObject LocationOf(string root, Place place) => new()
    {
        ["physicalLocation"] = new JsonObject { ["artifactLocation"] = ArtifactOf(root, place.Path), ["region"] = RegionOf(place.Lines) },
    };

    private static JsonObject ArtifactOf(string root, string path)
    {
        var relative = Path.GetRelativePath(root, path);
        if (relative.StartsWith("..", StringComparison.Ordinal) || Path.IsPathRooted(relative))
        {
            // A file shared from outside the inspected folder has no relative path that a reader could follow.
            return new JsonObject { ["uri"] = new Uri(path).AbsoluteUri };
        }

        var uri = string.Join('/', relative.Split(Path.DirectorySeparatorChar).Select(Uri.EscapeDataString));
        return new JsonObject { ["uri"] = uri, ["uriBaseId"] = RootId };
    }

    // Lines and columns count from one; the end column is the one behind the last character.
    private static JsonObject RegionOf(LinePositionSpan lines) => new()
    {
        ["startLine"] = lines.Start.Line + 1,
        ["startColumn"] = lines.Start.Character + 1,
        ["endLine"] = lines.End.Line + 1,
        ["endColumn"] = lines.End.Character + 1,
    };

    private static JsonObject Text(string text) => new() { ["text"] = text };

    private static string LevelOf(DiagnosticSeverity severity) => severity switch
    {
        DiagnosticSeverity.Error => "error",
        DiagnosticSeverity.Warning => "warning",
        _ => "note",
    };
}
