namespace Tare.Tool.Printing;

/// <summary>What a piece of output is, so that colour can follow.</summary>
internal enum Tone
{
    Plain,
    Muted,
    Strong,
    Error,
    Warning,
    Info,
    Path,
    Added,
    Removed,
}
