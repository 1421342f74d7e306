namespace Tare.Tool;

/// <summary>The run cannot go on; the message is one sentence for the user that says what to do.</summary>
internal sealed class ToolException(string message) : Exception(message);
