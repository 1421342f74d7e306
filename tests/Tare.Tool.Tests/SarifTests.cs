using System.Text.Json.Nodes;

namespace Tare.Tool.Tests;

public class SarifTests
{
    /// <summary>
    /// Required properties of the objects this tool writes: OASIS, "Static Analysis Results Interchange Format (SARIF) Version 2.1.0",
    /// sections 3.13, 3.14, 3.18, 3.19, 3.27, 3.30, 3.49, 3.55, 3.56 and 3.57.
    /// </summary>
    private static readonly Dictionary<string, string[]> Required = new()
    {
        ["log"] = ["version", "runs"],
        ["run"] = ["tool"],
        ["tool"] = ["driver"],
        ["driver"] = ["name"],
        ["rule"] = ["id"],
        ["result"] = ["message"],
        ["fix"] = ["artifactChanges"],
        ["artifactChange"] = ["artifactLocation", "replacements"],
        ["replacement"] = ["deletedRegion"],
        ["message"] = ["text"],
    };

    [Fact]
    public async Task The_log_has_what_the_standard_requires()
    {
        using var folder = new Folder().With("a.cs", "class A { int originRows; void M() { int bad = 1; } }\n");

        var log = await LogAsync(folder);

        Require(log, "log");
        Assert.Equal("2.1.0", (string?)log["version"]);
        var run = log["runs"]!.AsArray().Single()!;
        Require(run, "run");
        Require(run["tool"]!, "tool");
        Require(run["tool"]!["driver"]!, "driver");
        Assert.All(run["tool"]!["driver"]!["rules"]!.AsArray(), rule => Require(rule!, "rule"));
        var result = run["results"]!.AsArray().Single()!;
        Require(result, "result");
        Require(result["message"]!, "message");
        Assert.Equal("TEST001", (string?)run["tool"]!["driver"]!["rules"]![(int)result["ruleIndex"]!]!["id"]);
        var fix = result["fixes"]!.AsArray().Single()!;
        Require(fix, "fix");
        var change = fix["artifactChanges"]!.AsArray().Single()!;
        Require(change, "artifactChange");
        Assert.All(change["replacements"]!.AsArray(), replacement => Require(replacement!, "replacement"));
        Assert.DoesNotContain(folder.Path, log.ToJsonString());
    }

    [Fact]
    public async Task Places_are_regions_relative_to_what_was_inspected()
    {
        using var folder = new Folder()
            .With("a file.cs", "class A { void M() { int bad = B.originRows; } }\n")
            .With("sub/b.cs", "class B { public static int originRows; }\n");

        var log = await LogAsync(folder);

        var result = log["runs"]![0]!["results"]![0]!;
        Assert.True(JsonNode.DeepEquals(
            JsonNode.Parse("""{"physicalLocation":{"artifactLocation":{"uri":"a%20file.cs","uriBaseId":"SRCROOT"},"region":{"startLine":1,"startColumn":26,"endLine":1,"endColumn":29}}}"""),
            result["locations"]![0]), result.ToJsonString());
        Assert.True(JsonNode.DeepEquals(
            JsonNode.Parse("""{"id":1,"physicalLocation":{"artifactLocation":{"uri":"sub/b.cs","uriBaseId":"SRCROOT"},"region":{"startLine":1,"startColumn":29,"endLine":1,"endColumn":39}},"message":{"text":"test rows come from here"}}"""),
            result["relatedLocations"]![0]), result.ToJsonString());
        Assert.NotNull(log["runs"]![0]!["originalUriBaseIds"]!["SRCROOT"]);
    }

    [Fact]
    public async Task The_replacements_of_a_fix_give_the_mended_file()
    {
        const string Source = "class A\n{\n    void M()\n    {\n        int bad = 1;\n        bad++;\n    }\n}\n";
        using var folder = new Folder().With("a.cs", Source);

        var log = await LogAsync(folder);
        await Run.InAsync(folder, "mend", "a.cs", "--write");

        var replacements = log["runs"]![0]!["results"]![0]!["fixes"]![0]!["artifactChanges"]![0]!["replacements"]!.AsArray();
        var text = Source;
        foreach (var replacement in replacements.Reverse())
        {
            var region = replacement!["deletedRegion"]!;
            var (start, end) = (Offset(region, "startLine", "startColumn"), Offset(region, "endLine", "endColumn"));
            text = text[..start] + (string?)replacement["insertedContent"]?["text"] + text[end..];
        }

        Assert.Equal(folder.Read("a.cs"), text);
        static int Offset(JsonNode region, string line, string column) =>
            Source.Split('\n').Take((int)region[line]! - 1).Sum(l => l.Length + 1) + (int)region[column]! - 1;
    }

    [Fact]
    public async Task Info_is_a_note_and_a_finding_without_fix_has_none()
    {
        using var folder = new Folder().With("a.cs", "int hint = 1;");

        var log = await LogAsync(folder);

        Assert.Equal("note", (string?)log["runs"]![0]!["results"]![0]!["level"]);
        Assert.Null(log["runs"]![0]!["results"]![0]!["fixes"]);
    }

    [Fact]
    public async Task A_file_that_cannot_be_written_is_a_bad_call()
    {
        using var folder = new Folder().With("a.cs", "int bad = 1;");

        var run = await Run.InAsync(folder, "inspect", "a.cs", "--sarif", "gone/out.sarif");

        Assert.Equal((2, ""), (run.Exit, run.Output));
        Assert.StartsWith("tare: the SARIF file cannot be written: ", run.Error);
    }

    private static async Task<JsonNode> LogAsync(Folder folder)
    {
        var run = await Run.InAsync(folder, "inspect", ".", "--sarif", "out.sarif");
        Assert.Equal("", run.Error);
        return JsonNode.Parse(folder.Read("out.sarif"))!;
    }

    private static void Require(JsonNode node, string kind) => Assert.All(Required[kind], name => Assert.NotNull(node[name]));
}
