using System.Reflection;
using System.Text.RegularExpressions;
using Microsoft.CodeAnalysis;
using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Conventions;

/// <summary>A rule is a folder with its decision and its document, a test file and a line in the release notes.</summary>
public class RuleConventionTests
{
    public static TheoryData<string> Rules => [.. Labelled.AllRules.Order(StringComparer.Ordinal)];

    [Theory]
    [MemberData(nameof(Rules))]
    public void EachRuleIsAFolder(string id)
    {
        string folder = FolderOf(id);
        string name = Path.GetFileName(folder);
        Assert.True(File.Exists(Path.Combine(folder, name + "Rule.cs")), $"{Repository.Relative(folder)} holds no {name}Rule.cs");
        Assert.Contains($"\"{id}\"", File.ReadAllText(Path.Combine(folder, name + "Rule.cs")));
        string family = Path.GetFileName(Path.GetDirectoryName(folder))!;
        Assert.Equal(DescriptorOf(id).Category, family);
    }

    [Theory]
    [MemberData(nameof(Rules))]
    public void EachRuleHasATestFile(string id)
    {
        string folder = FolderOf(id);
        string name = Path.GetFileName(folder);
        string family = Path.GetFileName(Path.GetDirectoryName(folder))!;
        string test = Repository.At("tests", "Tare.Analyzers.Tests", "Rules", family, name + "Tests.cs");
        Assert.True(File.Exists(test), $"There is no {Repository.Relative(test)}");
    }

    [Theory]
    [MemberData(nameof(Rules))]
    public void EachRuleStandsInTheReleaseNotes(string id)
    {
        string notes = string.Concat(new[] { "Shipped", "Unshipped" }.Select(n => File.ReadAllText(Repository.At("src", "Tare.Analyzers", $"AnalyzerReleases.{n}.md"))));
        var rule = DescriptorOf(id);
        Assert.Matches($@"(?m)^{id}\s*\|\s*{rule.Category}\s*\|\s*{rule.DefaultSeverity}\s*\|", notes);
    }

    [Theory]
    [MemberData(nameof(Rules))]
    public void HelpLinkNamesTheDocument(string id)
    {
        var rule = DescriptorOf(id);
        Assert.EndsWith($"/{id}.md", rule.HelpLinkUri);
        string document = Path.Combine(FolderOf(id), id + ".md");
        Assert.True(File.Exists(document));
        string text = File.ReadAllText(document);
        Assert.StartsWith($"# {id}: {rule.Title}", text);
        Assert.NotEmpty(rule.Description.ToString());
    }

    [Fact]
    public void EachRuleStandsInTheReadmeTable()
    {
        string readme = File.ReadAllText(Repository.At("README.md"));
        foreach (string id in Labelled.AllRules)
            Assert.Matches($@"(?m)^\|.*\b{id}\b.*\|\s*{DescriptorOf(id).DefaultSeverity.ToString().ToLowerInvariant()}\s*\|", readme);
    }

    [Fact]
    public void NoDocumentLacksItsRule()
    {
        var documented = Markdown.RuleDocuments().Select(f => Path.GetFileNameWithoutExtension(f)!);
        Assert.Equal(Labelled.AllRules.Order(StringComparer.Ordinal), documented.Order(StringComparer.Ordinal));
    }

    // The command-line compiler has no Workspaces: an analyzer that touches them fails there with AD0001.
    [Fact]
    public void AnalyzersReferenceNoWorkspacesAndHoldNoFix()
    {
        var analyzers = typeof(TareAnalyzer).Assembly;
        Assert.DoesNotContain(analyzers.GetReferencedAssemblies(), a => a.Name!.Contains("Workspaces", StringComparison.Ordinal));
        // Every type resolves without Workspaces, and none is a fix.
        Assert.DoesNotContain(analyzers.GetTypes(), t => t.Name.EndsWith("Fix", StringComparison.Ordinal) || t.BaseType?.Name == "CodeFixProvider");
    }

    [Fact]
    public void AnalyzersReferenceTheFloorCompilerOnly()
    {
        foreach (var assembly in new[] { typeof(TareAnalyzer).Assembly, Assembly.Load("Tare.CodeFixes") })
        {
            var roslyn = assembly.GetReferencedAssemblies().Where(a => a.Name!.StartsWith("Microsoft.CodeAnalysis", StringComparison.Ordinal));
            Assert.All(roslyn, a => Assert.Equal(new Version(4, 8, 0, 0), a.Version));
        }
    }

    // Facts must not depend on who reads them.
    [Theory]
    [InlineData("Flow", "Rules")]
    [InlineData("Knowledge", "Rules")]
    public void LowerLayersDoNotKnowHigherOnes(string lower, string higher)
    {
        var reference = new Regex($@"\b(Tare\.Analyzers\.)?{higher}\.[A-Z]|using\s+(static\s+)?Tare\.Analyzers\.{higher}\b");
        foreach (string file in Directory.EnumerateFiles(Repository.At("src", "Tare.Analyzers", lower), "*.cs", SearchOption.AllDirectories))
        {
            var lines = File.ReadLines(file).Where(l => !l.TrimStart().StartsWith("//", StringComparison.Ordinal));
            Assert.DoesNotContain(lines, l => reference.IsMatch(l));
        }
    }

    [Fact]
    public void FixesHaveFixAllAndBelongToARule()
    {
        foreach (var provider in Fixes.All)
        {
            Assert.NotEmpty(provider.FixableDiagnosticIds);
            Assert.All(provider.FixableDiagnosticIds, id => Assert.Contains(id, Labelled.AllRules));
            // The fix that writes attributes has no FixAll on purpose: dotnet format would apply it everywhere.
            if (!provider.GetType().Name.Contains("Declare", StringComparison.Ordinal))
                Assert.NotNull(provider.GetFixAllProvider());
        }
    }

    private static DiagnosticDescriptor DescriptorOf(string id) =>
        new TareAnalyzer().SupportedDiagnostics.Single(d => d.Id == id);

    private static string FolderOf(string id)
    {
        var documents = Markdown.RuleDocuments().Where(f => Path.GetFileNameWithoutExtension(f) == id).ToArray();
        Assert.True(documents.Length == 1, $"There is no {id}.md in a rule's folder, or more than one.");
        return Path.GetDirectoryName(documents[0])!;
    }
}
