using System.Reflection;
using Microsoft.CodeAnalysis.CodeFixes;
using Tare.Analyzers;
using Tare.Tool.Analysis;

namespace Tare.Tool.Tests;

public class RulePackTests
{
    [Fact]
    public void The_shipped_rules_are_those_of_the_analyzer()
    {
        var expected = new TareAnalyzer().SupportedDiagnostics.Select(rule => rule.Id).Order(StringComparer.Ordinal);

        Assert.Equal(expected, RulePack.Shipped().Ids);
    }

    [Fact]
    public void Every_exported_fix_is_tried()
    {
        var exported = Assembly.Load("Tare.CodeFixes").GetTypes().Where(type => type.IsDefined(typeof(ExportCodeFixProviderAttribute)));

        Assert.Equal(exported.Select(type => type.FullName).Order(StringComparer.Ordinal), RulePack.Shipped().Fixes.Select(fix => fix.GetType().FullName));
    }

    [Fact]
    public async Task A_shipped_rule_can_be_asked_for_by_its_id()
    {
        using var folder = new Folder().With("a.cs", "Console.WriteLine(1);\n");

        var run = await Run.ShippedInAsync(folder, "inspect", "a.cs", "--rule", "TARE101");

        Assert.Equal((0, ""), (run.Exit, run.Error));
    }
}
