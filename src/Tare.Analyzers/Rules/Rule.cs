using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Rules;

/// <summary>Builds every descriptor, so that category and help link follow from the id.</summary>
internal static class Rule
{
    public const string Version = "0.1.0";

    public static DiagnosticDescriptor Describe(
        string id, string title, string message, string description, DiagnosticSeverity severity = DiagnosticSeverity.Warning, params string[] tags) =>
        new(id, title, message, CategoryOf(id), severity, isEnabledByDefault: true, description, HelpLink(id), tags);

    public static string CategoryOf(string id) => id[4] switch
    {
        '1' => "Choice",
        '2' => "Threshold",
        '3' => "Split",
        '4' => "Contract",
        _ => "Input",
    };

    private static string HelpLink(string id) => $"https://tare.example/rules/v{Version}/{id}.md";
}
