using System.Collections.Immutable;

namespace Tare.Tool.Analysis;

/// <summary>What an analysis of the loaded code gave.</summary>
/// <param name="Findings">By file, line, column and rule.</param>
/// <param name="CompileErrors">Errors of the compiler, each place once.</param>
/// <param name="Crashes">Exceptions of an analyzer: what they hide is unknown.</param>
internal sealed record Inspection(ImmutableArray<Finding> Findings, int CompileErrors, ImmutableArray<string> Crashes);
