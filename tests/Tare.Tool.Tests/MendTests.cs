using System.Text;

namespace Tare.Tool.Tests;

public class MendTests
{
    private const string Source = "class A\n{\n    void M()\n    {\n        int bad = 1;\n        bad++;\n    }\n}\n";
    private const string Mended = "class A\n{\n    void M()\n    {\n        // mended\n        int good = 1;\n        good++;\n    }\n}\n";

    [Fact]
    public async Task The_change_is_shown_and_the_file_stays()
    {
        using var folder = new Folder().With("a.cs", Source);

        var run = await Run.InAsync(folder, "mend", "a.cs");

        Assert.Equal(0, run.Exit);
        Assert.Equal(
            "--- a/a.cs\n+++ b/a.cs\n@@ -2,7 +2,8 @@\n {\n     void M()\n     {\n-        int bad = 1;\n-        bad++;\n+        // mended\n+        int good = 1;\n+        good++;\n     }\n }\n",
            run.Output);
        Assert.Equal("tare: would mend 1 of 1 finding in 1 file; run again with --write to apply.\n", run.Error);
        Assert.Equal(Source, folder.Read("a.cs"));
    }

    [Fact]
    public async Task Write_changes_the_file_and_names_it()
    {
        using var folder = new Folder().With("src/a.cs", Source);

        var run = await Run.InAsync(folder, "mend", ".", "--write");

        Assert.Equal(0, run.Exit);
        Assert.Equal("mended src/a.cs\n", run.Output);
        Assert.Equal("tare: mended 1 of 1 finding in 1 file.\n", run.Error);
        Assert.Equal(Mended, folder.Read("src/a.cs"));
        Assert.Single(Directory.GetFileSystemEntries(folder["src"]));
    }

    [Fact]
    public async Task The_printed_diff_turns_the_old_file_into_the_written_one()
    {
        using var folder = new Folder().With("a.cs", Source);

        var shown = await Run.InAsync(folder, "mend", "a.cs");
        await Run.InAsync(folder, "mend", "a.cs", "--write");

        Assert.Equal(folder.Read("a.cs"), Patch.Apply(Source, shown.Output));
    }

    // git is the reader that counts: `git apply` refuses a hunk that is off by one line or one character.
    [Theory]
    [InlineData("a.cs", "\n", true)]
    [InlineData("with blank.cs", "\r\n", false)]
    [InlineData("gr\u00f6\u00dfe.cs", "\n", false)]
    public async Task Git_applies_the_printed_diff(string name, string ending, bool ended)
    {
        var source = (ended ? Source : Source.TrimEnd('\n')).Replace("\n", ending);
        using var folder = new Folder().With(name, source);

        var shown = await Run.InAsync(folder, "mend", name);
        folder.With("mend.diff", shown.Output);
        using var git = System.Diagnostics.Process.Start(new System.Diagnostics.ProcessStartInfo("git", ["-c", "core.autocrlf=false", "apply", "mend.diff"])
        {
            WorkingDirectory = folder.Path,
            RedirectStandardError = true,
        })!;
        var error = await git.StandardError.ReadToEndAsync();
        await git.WaitForExitAsync();

        Assert.True(git.ExitCode == 0, error);
        Assert.Equal((ended ? Mended : Mended.TrimEnd('\n')).Replace("\n", ending), folder.Read(name));
    }

    // The fix puts a line in that ends with \n alone, as fixes do that are written on another system.
    [Theory]
    [InlineData(false, true)]
    [InlineData(true, true)]
    [InlineData(true, false)]
    [InlineData(false, false)]
    public async Task Line_endings_mark_and_end_of_file_stay_as_they_were(bool mark, bool ended)
    {
        static byte[] Bytes(string text, bool mark, bool ended) =>
            [.. mark ? new UTF8Encoding(true).GetPreamble() : [], .. Encoding.UTF8.GetBytes((ended ? text : text.TrimEnd('\n')).Replace("\n", "\r\n").Replace("class A", "/* é良 */ class A"))];
        using var folder = new Folder().With("a.cs", Bytes(Source, mark, ended));

        var shown = await Run.InAsync(folder, "mend", "a.cs");
        await Run.InAsync(folder, "mend", "a.cs", "--write");

        Assert.Equal(Bytes(Mended, mark, ended), File.ReadAllBytes(folder["a.cs"]));
        Assert.Contains("+        // mended\r\n", shown.Output);
    }

    [Fact]
    public async Task Utf16_stays_utf16()
    {
        var encoding = new UnicodeEncoding(bigEndian: false, byteOrderMark: true);
        using var folder = new Folder().With("a.cs", [.. encoding.GetPreamble(), .. encoding.GetBytes(Source)]);

        await Run.InAsync(folder, "mend", "a.cs", "--write");

        Assert.Equal([.. encoding.GetPreamble(), .. encoding.GetBytes(Mended)], File.ReadAllBytes(folder["a.cs"]));
    }

    [Fact]
    public async Task Latin1_stays_latin1()
    {
        using var folder = new Folder().With("a.cs", Encoding.Latin1.GetBytes("// caf\u00e9\n" + Source));

        var run = await Run.InAsync(folder, "mend", ".", "--write");

        Assert.Equal("mended a.cs\n", run.Output);
        Assert.Equal(Encoding.Latin1.GetBytes("// caf\u00e9\n" + Mended), File.ReadAllBytes(folder["a.cs"]));
    }

    // A project's files are decoded by the build's own loader, which puts marks for bytes it cannot read.
    [Fact]
    public async Task A_file_of_a_project_that_is_no_utf8_is_not_rewritten()
    {
        var bytes = Encoding.Latin1.GetBytes("// caf\u00e9\n" + Source);
        using var folder = new Folder().With("a.cs", bytes).With("p.csproj", Projects.Library("net10.0")).Restored("p.csproj");

        var run = await Run.InAsync(folder, "mend", ".", "--write");

        Assert.True(run.Exit == 2 ? run.Error.Contains("save it as UTF-8 first") : run.Output == "mended a.cs\n", run.Error);
        Assert.StartsWith("// caf\u00e9\n", Encoding.Latin1.GetString(File.ReadAllBytes(folder["a.cs"])));
    }

    [Fact]
    public async Task A_file_that_mixes_line_endings_keeps_them_in_lines_the_fix_leaves_alone()
    {
        using var folder = new Folder().With("a.cs", "class A\r\n{\n    void M()\r\n    {\n        int bad = 1;\r\n    }\n}\n");

        await Run.InAsync(folder, "mend", "a.cs", "--write");

        Assert.Equal("class A\r\n{\n    void M()\r\n    {\n        // mended\n        int good = 1;\r\n    }\n}\n", folder.Read("a.cs"));
    }

    [Fact]
    public async Task Several_findings_in_several_files_are_all_mended()
    {
        using var folder = new Folder()
            .With("a.cs", "class A\n{\n    void M()\n    {\n        int bad1 = 1;\n        int bad2 = 2;\n    }\n}\n")
            .With("b.cs", Source.Replace("class A", "class B"));

        var run = await Run.InAsync(folder, "mend", ".", "--write");

        Assert.Equal(0, run.Exit);
        Assert.Equal("tare: mended 3 of 3 findings in 2 files.\n", run.Error);
        Assert.DoesNotContain("bad", folder.Read("a.cs") + folder.Read("b.cs"));
    }

    [Theory]
    [InlineData("int stuck = 1;", 1)]
    [InlineData("int hint = 1;", 0)]
    public async Task What_no_fix_takes_is_listed_and_decides_the_exit_code(string code, int exit)
    {
        using var folder = new Folder().With("a.cs", code);

        var run = await Run.InAsync(folder, "mend", "a.cs");

        Assert.Equal(exit, run.Exit);
        Assert.Equal("", run.Output);
        Assert.Contains("a.cs(1,5): ", run.Error);
        Assert.Contains("tare: mended 0 of 1 finding; 1 left to mend by hand.\n", run.Error);
    }

    [Fact]
    public async Task A_fix_that_would_not_compile_is_left_out_and_the_others_are_applied()
    {
        using var folder = new Folder().With("a.cs", "int trap = 1;\ntrap++;\nint bad = 1;\n");

        var run = await Run.InAsync(folder, "mend", "a.cs", "--write");

        Assert.Equal(1, run.Exit);
        Assert.Equal("int trap = 1;\ntrap++;\n// mended\nint good = 1;\n", folder.Read("a.cs"));
        Assert.Contains("a fix of TEST004 was left out because the code would no longer compile", run.Error);
    }

    [Fact]
    public async Task A_fix_that_throws_is_told_and_the_others_are_applied()
    {
        using var folder = new Folder().With("a.cs", "int bomb = 1;\nint bad = 1;\n");

        var run = await Run.InAsync(folder, "mend", "a.cs", "--write");

        Assert.Equal(1, run.Exit);
        Assert.Equal("int bomb = 1;\n// mended\nint good = 1;\n", folder.Read("a.cs"));
        Assert.Contains("a fix of TEST005 was left out because it failed (", run.Error);
    }

    [Fact]
    public async Task A_fix_that_brings_its_finding_back_comes_to_an_end()
    {
        using var folder = new Folder().With("a.cs", "int again = 1;\n");

        var run = await Run.InAsync(folder, "mend", "a.cs", "--write");

        Assert.Equal(1, run.Exit);
        Assert.Equal("int again" + string.Concat(Enumerable.Repeat("again", 10)) + " = 1;\n", folder.Read("a.cs"));
        Assert.Contains("mended 0 of 1 finding in 1 file; 1 left to mend by hand", run.Error);
    }

    [Fact]
    public async Task A_rule_filter_leaves_other_rules_alone()
    {
        using var folder = new Folder().With("a.cs", "int bad = 1;\nint trap = 1;\n");

        var run = await Run.InAsync(folder, "mend", "a.cs", "--rule", "TEST004", "--write");

        Assert.Equal(0, run.Exit);
        Assert.Equal("int bad = 1;\nint xtrap = 1;\n", folder.Read("a.cs"));
    }

    [Fact]
    public async Task Nothing_to_mend_says_so()
    {
        using var folder = new Folder().With("a.cs", "int fine = 1;\n");

        var run = await Run.InAsync(folder, "mend", "a.cs");

        Assert.Equal((0, "", "tare: no findings, nothing to mend.\n"), (run.Exit, run.Output, run.Error));
    }

    [Fact]
    public async Task A_link_stays_a_link_and_a_mode_stays_a_mode()
    {
        if (OperatingSystem.IsWindows())
        {
            return; // Neither is common there.
        }

        using var folder = new Folder().With("real/a.cs", Source);
        File.SetUnixFileMode(folder["real/a.cs"], UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.UserExecute);
        Directory.CreateDirectory(folder["link"]);
        File.CreateSymbolicLink(folder["link/a.cs"], folder["real/a.cs"]);

        await Run.InAsync(folder, "mend", "link", "--write");

        Assert.NotNull(new FileInfo(folder["link/a.cs"]).LinkTarget);
        Assert.Equal(Mended, folder.Read("real/a.cs"));
        Assert.Equal(UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.UserExecute, File.GetUnixFileMode(folder["real/a.cs"]));
    }
}
