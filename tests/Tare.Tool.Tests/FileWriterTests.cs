using System.Text;
using Tare.Tool.Mending;

namespace Tare.Tool.Tests;

public class FileWriterTests
{
    [Fact]
    public void A_file_that_changed_meanwhile_stops_all_writing()
    {
        using var folder = new Folder().With("a.cs", "one").With("b.cs", "changed");

        var problem = Assert.Throws<ToolException>(() => FileWriter.WriteAll(
            [new(folder["a.cs"], "one", "ONE", Encoding.UTF8), new(folder["b.cs"], "two", "TWO", Encoding.UTF8)]));

        Assert.Contains("b.cs changed while it was read", problem.Message);
        Assert.Equal(("one", "changed"), (folder.Read("a.cs"), folder.Read("b.cs")));
        Assert.Equal(2, Directory.GetFiles(folder.Path).Length);
    }

    [Fact]
    public void A_character_that_the_files_encoding_lacks_is_refused()
    {
        using var folder = new Folder().With("a.cs", Encoding.Latin1.GetBytes("caf\u00e9"));

        var problem = Assert.Throws<ToolException>(() => FileWriter.WriteAll([new(folder["a.cs"], "caf\u00e9", "\u826f", Encoding.Latin1)]));

        Assert.Contains("encoding of a.cs lacks", problem.Message);
        Assert.Equal(Encoding.Latin1.GetBytes("caf\u00e9"), File.ReadAllBytes(folder["a.cs"]));
    }

    [Fact]
    public void Bytes_that_are_no_text_are_not_rewritten()
    {
        using var folder = new Folder().With("a.cs", [(byte)'a', 0xE9, (byte)'b']);

        var problem = Assert.Throws<ToolException>(() => FileWriter.WriteAll([new(folder["a.cs"], "a\ufffdb", "c\ufffdb", new UTF8Encoding(false))]));

        Assert.Contains("a.cs holds bytes that are no text", problem.Message);
        Assert.Equal([(byte)'a', 0xE9, (byte)'b'], File.ReadAllBytes(folder["a.cs"]));
    }

    [Fact]
    public void A_new_file_is_written_in_a_new_folder()
    {
        using var folder = new Folder();

        FileWriter.WriteAll([new(folder["new/a.cs"], null, "one\n", null)]);

        Assert.Equal("one\n", folder.Read("new/a.cs"));
    }
}
