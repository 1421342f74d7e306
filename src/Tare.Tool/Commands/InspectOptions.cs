namespace Tare.Tool.Commands;

/// <summary>What `tare inspect` was asked.</summary>
internal sealed record InspectOptions(string Path, FailOn FailOn, string[] Rules, string? Sarif);
