namespace Tare.Tool.Tests;

public class InspectTests
{
    [Fact]
    public async Task A_finding_is_shown_with_its_place_and_the_way_to_it()
    {
        using var folder = new Folder().With("a.cs", """
            class A
            {
                int originRows = 1;

                void M()
                {
                    // far
                    // away
                    var bad = 2;
                }
            }
            """);

        var run = await Run.InAsync(folder, "inspect", "a.cs");

        Assert.Equal(1, run.Exit);
        Assert.StartsWith("""
            a.cs(9,13): warning TEST001: 'bad' is marked
              3 │     int originRows = 1;
                │         ────────── test rows come from here
              … │
              9 │         var bad = 2;
                │             ^^^

            1 finding (1 warning) in 1 document, 
            """, run.Output);
        Assert.Equal("", run.Error);
    }

    [Fact]
    public async Task Nothing_found_says_so_and_exits_with_0()
    {
        using var folder = new Folder().With("a.cs", "class A { }\n");

        var run = await Run.InAsync(folder, "inspect", ".");

        Assert.Equal(0, run.Exit);
        Assert.Matches(@"\Ano findings in 1 document, \d+\.\d s\n\z", run.Output);
    }

    [Fact]
    public async Task Additional_places_in_another_file_stand_under_its_name()
    {
        using var folder = new Folder()
            .With("a.cs", "class A { void M() { var bad = B.originRows; } }\n")
            .With("sub/b.cs", "class B\n{\n    public static int originRows = 1;\n}\n");

        var run = await Run.InAsync(folder, "inspect", ".");

        Assert.StartsWith("""
            a.cs(1,26): warning TEST001: 'bad' is marked
                ── a.cs
              1 │ class A { void M() { var bad = B.originRows; } }
                │                          ^^^
                ── sub/b.cs
              3 │     public static int originRows = 1;
                │                       ────────── test rows come from here

            """, run.Output);
    }

    [Fact]
    public async Task Two_findings_on_one_line_are_two_findings_in_column_order()
    {
        using var folder = new Folder().With("a.cs", "int bad1 = 1, bad2 = 2;\n");

        var run = await Run.InAsync(folder, "inspect", "a.cs");

        Assert.Equal(["a.cs(1,5): warning TEST001: 'bad1' is marked", "a.cs(1,15): warning TEST001: 'bad2' is marked"], Heads(run));
        Assert.Contains("2 findings (2 warnings)", run.Output);
    }

    [Theory]
    [InlineData("int hint = 1;", null, 0)]
    [InlineData("int hint = 1;", "info", 1)]
    [InlineData("int bad = 1;", "warning", 1)]
    [InlineData("int bad = 1;", "error", 0)]
    [InlineData("int bad = 1;", "never", 0)]
    public async Task The_level_that_fails_decides_the_exit_code(string code, string? level, int exit)
    {
        using var folder = new Folder().With("a.cs", code);

        var run = await Run.InAsync(folder, level == null ? ["inspect", "a.cs"] : ["inspect", "a.cs", "--fail-on", level]);

        Assert.Equal(exit, run.Exit);
        Assert.Single(Heads(run));
    }

    [Fact]
    public async Task A_rule_filter_hides_the_others()
    {
        using var folder = new Folder().With("a.cs", "int bad = 1; int stuck = 2;");

        var run = await Run.InAsync(folder, "inspect", "a.cs", "--rule", "TEST002");

        Assert.Equal(["a.cs(1,18): warning TEST002: 'stuck' is marked"], Heads(run));
    }

    [Fact]
    public async Task Severity_comes_from_the_editorconfig_beside_the_file()
    {
        using var folder = new Folder()
            .With(".editorconfig", "root = true\n[*.cs]\ndotnet_diagnostic.TEST001.severity = error\n[quiet/*.cs]\ndotnet_diagnostic.TEST001.severity = none\n")
            .With("a.cs", "class A { void M() { int bad = 1; } }")
            .With("quiet/b.cs", "class B { void M() { int bad = 1; } }");

        var run = await Run.InAsync(folder, "inspect", ".", "--fail-on", "error");

        Assert.Equal(1, run.Exit);
        Assert.Equal(["a.cs(1,26): error TEST001: 'bad' is marked"], Heads(run));
        Assert.Contains("1 finding (1 error)", run.Output);
    }

    [Fact]
    public async Task Programs_in_one_folder_are_compiled_each_on_its_own()
    {
        using var folder = new Folder()
            .With("a.cs", "int bad = 1; record Twin(int A);")
            .With("b.cs", "int bad = 2; record Twin(int A);")
            .With("c.cs", "static class Program { static void Main() { int bad = 3; } }");

        var run = await Run.InAsync(folder, "inspect", ".");

        Assert.Equal("", run.Error);
        Assert.Equal(3, Heads(run).Length);
        Assert.Contains(" in 3 documents, ", run.Output);
    }

    [Fact]
    public async Task A_program_sees_the_other_files_of_its_folder_and_the_implicit_usings()
    {
        using var folder = new Folder()
            .With("a.cs", "Console.WriteLine(new List<int> { Helper.One }.Sum());")
            .With("helper.cs", "static class Helper { public const int One = 1; }");

        var run = await Run.InAsync(folder, "inspect", ".");

        Assert.Equal("", run.Error);
        Assert.Equal(0, run.Exit);
    }

    [Fact]
    public async Task Compile_errors_are_counted_in_one_line_and_the_rest_is_analysed()
    {
        using var folder = new Folder().With("a.cs", "int bad = 1; Missing.Thing(); Other.Thing();");

        var run = await Run.InAsync(folder, "inspect", "a.cs");

        Assert.Equal("tare: 2 compile errors; analysed as far as the code binds.\n", run.Error);
        Assert.Single(Heads(run));
    }

    [Fact]
    public async Task Generated_files_are_left_alone()
    {
        using var folder = new Folder().With("a.g.cs", "class A { void M() { int bad = 1; } }").With("b.cs", "class B { }");

        var run = await Run.InAsync(folder, "inspect", ".");

        Assert.Equal(0, run.Exit);
        Assert.StartsWith("no findings in 1 document", run.Output);
    }

    [Fact]
    public async Task An_analyzer_that_throws_is_no_clean_result()
    {
        using var folder = new Folder().With("a.cs", "int crash = 1;");

        var run = await Run.InAsync(folder, "inspect", "a.cs");

        Assert.Equal(2, run.Exit);
        Assert.Contains("tare: an analyzer failed, so findings may be missing: ", run.Error);
        Assert.Contains("marker crash", run.Error);
    }

    [Theory]
    [InlineData("there is nothing at 'gone'", "inspect", "gone")]
    [InlineData("Required argument", "inspect")]
    [InlineData("neither a C# file", "inspect", "note.txt")]
    [InlineData("holds no C# file", "inspect", "empty")]
    [InlineData("holds several solutions (a.sln, b.slnx); name one", "inspect", "two")]
    [InlineData("'soon'", "inspect", ".", "--fail-on", "soon")]
    [InlineData("there is no rule 'TEST009'", "inspect", ".", "--rule", "TEST009")]
    [InlineData("Unrecognized", "inspect", ".", "--nonsense")]
    [InlineData("Required command", "")]
    public async Task A_bad_call_is_one_sentence_and_exit_code_2(string expected, params string[] args)
    {
        using var folder = new Folder().With("note.txt", "").With("a.cs", "int bad = 1;").With("empty/note.txt", "").With("two/a.sln", "").With("two/b.slnx", "");

        var run = await Run.InAsync(folder, args.Where(arg => arg.Length > 0).ToArray());

        Assert.Equal(2, run.Exit);
        Assert.Equal("", run.Output);
        Assert.StartsWith("tare: ", run.Error);
        Assert.Contains(expected, run.Error);
        Assert.Single(run.Error.TrimEnd('\n').Split('\n'));
    }

    [Theory]
    [InlineData("--help", "tare inspect .")]
    [InlineData("inspect --help", "tare inspect . --fail-on info")]
    [InlineData("mend --help", "tare mend . --write")]
    public async Task Help_shows_examples(string args, string example)
    {
        using var folder = new Folder();

        var run = await Run.InAsync(folder, args.Split(' '));

        Assert.Equal(0, run.Exit);
        Assert.Contains("Examples:", run.Output);
        Assert.Contains(example, run.Output);
    }

    [Fact]
    public async Task Version_is_the_tools_own()
    {
        using var folder = new Folder();

        var run = await Run.InAsync(folder, "--version");

        Assert.Equal(0, run.Exit);
        Assert.Equal(typeof(Application).Assembly.GetName().Version!.ToString(3), run.Output.Trim());
    }

    private static string[] Heads(Run run) => [.. run.Output.Split('\n').Where(line => line.Contains(" TEST0", StringComparison.Ordinal))];
}
