using System.Text;

namespace Tare.Tool.Printing;

/// <summary>Characters of a frame.</summary>
internal sealed record Glyphs(char Bar, char Line, string Gap, string File)
{
    /// <summary>Rich where the writer's encoding has them, plain where a code page would show question marks.</summary>
    public static Glyphs For(Encoding encoding) =>
        encoding.CodePage is 65001 or 1200 or 1201 or 12000 ? new('│', '─', "…", "──") : new('|', '-', "...", "--");
}
