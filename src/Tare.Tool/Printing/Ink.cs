namespace Tare.Tool.Printing;

/// <summary>Paints text for a terminal, or leaves it as it is.</summary>
/// <param name="colour">Whether the reader is a terminal that takes colour.</param>
internal sealed class Ink(bool colour)
{
    private const string Reset = "\u001b[0m";

    public string Paint(string text, Tone tone)
    {
        if (!colour || text.Length == 0 || CodeOf(tone) is not { } code)
        {
            return text;
        }

        return $"\u001b[{code}m{text}{Reset}";
    }

    // The sixteen basic colours follow the reader's own theme, light or dark.
    private static string? CodeOf(Tone tone) => tone switch
    {
        Tone.Muted => "90",
        Tone.Strong => "1",
        Tone.Error => "1;31",
        Tone.Warning => "1;33",
        Tone.Info => "1;36",
        Tone.Path => "36",
        Tone.Added => "32",
        Tone.Removed => "31",
        _ => null,
    };
}
