namespace Tare.Tool.Commands;

/// <summary>What `tare mend` was asked.</summary>
internal sealed record MendOptions(string Path, FailOn FailOn, string[] Rules, bool Write);
