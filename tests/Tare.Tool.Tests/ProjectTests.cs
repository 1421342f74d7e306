namespace Tare.Tool.Tests;

public class ProjectTests
{
    private const string Source = "class A\n{\n    void M()\n    {\n        int bad = 1;\n    }\n}\n";

    [Fact]
    public async Task A_file_of_two_targets_is_reported_once_and_mended_once()
    {
        using var folder = new Folder()
            .With("p.csproj", Projects.Library("net10.0;netstandard2.0")).With("a.cs", Source).Restored("p.csproj");

        var seen = await Run.InAsync(folder, "inspect", "p.csproj");
        var mended = await Run.InAsync(folder, "mend", ".", "--write");

        Assert.Equal("", seen.Error);
        Assert.Contains("a.cs(5,13): warning TEST001", seen.Output);
        Assert.Contains("\n1 finding (1 warning) in 1 project, 1 document, ", seen.Output);
        Assert.Equal("mended a.cs\n", mended.Output);
        Assert.Equal("tare: mended 1 of 1 finding in 1 file.\n", mended.Error);
        Assert.Equal(Source.Replace("int bad", "// mended\n        int good"), folder.Read("a.cs"));
    }

    [Fact]
    public async Task A_fix_that_breaks_another_target_is_left_out()
    {
        using var folder = new Folder()
            .With("p.csproj", Projects.Library("net10.0;netstandard2.0"))
            .With("a.cs", "class A\n{\n    void M()\n    {\n        int bad = 1;\n#if NETSTANDARD\n        int good = 2;\n#endif\n    }\n}\n")
            .Restored("p.csproj");

        var run = await Run.InAsync(folder, "mend", ".");

        Assert.Equal(1, run.Exit);
        Assert.Equal("", run.Output);
        Assert.Contains("would no longer compile", run.Error);
    }

    [Fact]
    public async Task A_file_that_a_fix_adds_belongs_to_every_target()
    {
        using var folder = new Folder()
            .With("src/p.csproj", Projects.Library("net10.0;netstandard2.0")).With("src/a.cs", "class A { void M() { int extra; } }\n").Restored("src/p.csproj");

        var shown = await Run.InAsync(folder, "mend", "src");
        var written = await Run.InAsync(folder, "mend", "src", "--write");

        Assert.Equal("""
            --- /dev/null
            +++ b/src/Added.cs
            @@ -0,0 +1 @@
            +static class Added { public const int One = 1; }
            --- a/src/a.cs
            +++ b/src/a.cs
            @@ -1 +1 @@
            -class A { void M() { int extra; } }
            +class A { void M() { int plain = Added.One; } }

            """, shown.Output);
        Assert.Equal("mended src/Added.cs\nmended src/a.cs\n", written.Output);
        Assert.Equal("static class Added { public const int One = 1; }\n", folder.Read("src/Added.cs"));
    }

    [Fact]
    public async Task Settings_and_additional_files_of_a_project_reach_the_analyzer()
    {
        using var folder = new Folder()
            .With(".editorconfig", "root = true\n[*.cs]\ndotnet_diagnostic.TEST001.severity = error\n")
            .With("p.csproj", Projects.Library("net10.0", "<AdditionalFiles Include=\"tare.catalogue.txt\" />"))
            .With("a.cs", Source)
            .With("tare.catalogue.txt", "fine\nstuck line\n")
            .Restored("p.csproj");

        var run = await Run.InAsync(folder, "inspect", ".", "--fail-on", "error");

        Assert.Equal(1, run.Exit);
        Assert.Contains("a.cs(5,13): error TEST001: 'bad' is marked", run.Output);
        Assert.Contains("""
            tare.catalogue.txt(2,1): warning TEST002: 'stuck line' is marked
              2 │ stuck line
                │ ^^^^^^^^^^
            """, run.Output);
    }

    [Fact]
    public async Task One_file_of_a_project_is_read_with_its_project_and_reported_alone()
    {
        using var folder = new Folder()
            .With("p.csproj", Projects.Library("net10.0"))
            .With("a.cs", "class A { int M() { int bad = B.One; return bad; } }")
            .With("b.cs", "class B { public static int One = 1; int M() { int bad = 1; return bad; } }")
            .Restored("p.csproj");

        var run = await Run.InAsync(folder, "inspect", "a.cs");

        Assert.Equal("", run.Error);
        Assert.Contains("1 finding (1 warning) in 1 project, 1 document, ", run.Output);
        Assert.StartsWith("a.cs(1,25)", run.Output);
    }

    [Fact]
    public async Task All_projects_of_a_folder_are_read_and_a_shared_file_counts_once()
    {
        using var folder = new Folder()
            .With("one/one.csproj", Projects.Library("net10.0", "<Compile Include=\"../shared/a.cs\" />"))
            .With("two/two.csproj", Projects.Library("net10.0", "<Compile Include=\"../shared/a.cs\" /><ProjectReference Include=\"../one/one.csproj\" />"))
            .With("shared/a.cs", Source)
            .With("two/b.cs", "class B { void M() { int stuck = 1; } }")
            .Restored("one/one.csproj", "two/two.csproj");

        var seen = await Run.InAsync(folder, "inspect", ".");
        var mended = await Run.InAsync(folder, "mend", ".", "--write");

        Assert.Contains("2 findings (2 warnings) in 2 projects, 2 documents, ", seen.Output);
        Assert.Equal("mended shared/a.cs\n", mended.Output);
        Assert.Equal(1, mended.Exit);
    }

    [Theory]
    [InlineData("all.slnx", "<Solution>\n  <Project Path=\"p.csproj\" />\n</Solution>\n")]
    [InlineData("all.sln", """
        Microsoft Visual Studio Solution File, Format Version 12.00
        Project("{FAE04EC0-301F-11D3-BF4B-00C04F79EFBC}") = "p", "p.csproj", "{545BADAE-7E52-4862-893F-93563B629F63}"
        EndProject
        Global
        EndGlobal

        """)]
    public async Task A_folder_with_a_solution_is_its_solution(string name, string solution)
    {
        using var folder = new Folder()
            .With("p.csproj", Projects.Library("net10.0")).With("a.cs", Source).With("other/q.csproj", "not read").With(name, solution).Restored("p.csproj");

        var run = await Run.InAsync(folder, "inspect", ".");

        Assert.Equal("", run.Error);
        Assert.Contains("1 finding (1 warning) in 1 project, 1 document, ", run.Output);
    }

    [Fact]
    public async Task A_project_that_is_not_restored_asks_for_the_restore()
    {
        using var folder = new Folder().With("p.csproj", Projects.Library("net10.0")).With("a.cs", Source);

        var run = await Run.InAsync(folder, "inspect", ".", "--sarif", "out.sarif");

        Assert.Equal((2, "", "tare: p.csproj is not restored; run `dotnet restore p.csproj` first.\n"), (run.Exit, run.Output, run.Error));
        Assert.False(File.Exists(folder["out.sarif"]));
    }

    [Fact]
    public async Task The_restore_it_asks_for_can_be_copied_from_where_the_user_stands()
    {
        using var folder = new Folder()
            .With("sub/one/one.csproj", Projects.Library("net10.0")).With("sub/one/a.cs", Source)
            .With("sub/two/two.csproj", Projects.Library("net10.0")).With("sub/two/b.cs", Source)
            .Restored("sub/one/one.csproj");

        var run = await Run.InAsync(folder, "inspect", "sub");

        Assert.Equal("tare: sub/two/two.csproj is not restored; run `dotnet restore sub/two/two.csproj` first.\n", run.Error);
    }

    [Theory]
    [InlineData("<Project Sdk=\"Microsoft.NET.Sdk\"><oops></Project>")]
    [InlineData("<Project Sdk=\"No.Such.Sdk\"></Project>")]
    public async Task A_project_that_does_not_load_says_why_in_one_line(string project)
    {
        using var folder = new Folder().With("p.csproj", project).With("a.cs", Source);

        var run = await Run.InAsync(folder, "inspect", ".");

        Assert.Equal((2, ""), (run.Exit, run.Output));
        Assert.StartsWith("tare: p.csproj does not load: ", run.Error);
        Assert.Single(run.Error.TrimEnd('\n').Split('\n'));
    }

    [Fact]
    public async Task A_project_without_a_file_is_no_clean_result()
    {
        using var folder = new Folder().With("p.csproj", Projects.Library("net10.0")).Restored("p.csproj");

        var run = await Run.InAsync(folder, "inspect", ".");

        Assert.Equal((2, "", "tare: p.csproj compiles no C# file.\n"), (run.Exit, run.Output, run.Error));
    }
}
