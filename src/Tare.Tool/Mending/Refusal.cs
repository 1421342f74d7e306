namespace Tare.Tool.Mending;

/// <summary>A fix that was not applied.</summary>
/// <param name="Rule">Its rule.</param>
/// <param name="Reason">A clause that begins with "because".</param>
internal sealed record Refusal(string Rule, string Reason);
