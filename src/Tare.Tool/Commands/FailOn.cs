using Microsoft.CodeAnalysis;

namespace Tare.Tool.Commands;

/// <summary>The lowest severity that makes a run fail.</summary>
internal enum FailOn
{
    Info,
    Warning,
    Error,
    Never,
}

/// <summary>Compares severities with the level that fails.</summary>
internal static class FailOnExtensions
{
    public static bool Fails(this FailOn level, DiagnosticSeverity severity) => level switch
    {
        FailOn.Info => severity >= DiagnosticSeverity.Info,
        FailOn.Warning => severity >= DiagnosticSeverity.Warning,
        FailOn.Error => severity >= DiagnosticSeverity.Error,
        _ => false,
    };
}
