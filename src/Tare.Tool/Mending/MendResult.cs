using System.Collections.Immutable;
using Tare.Tool.Analysis;

namespace Tare.Tool.Mending;

/// <summary>What the fixes made of the code.</summary>
/// <param name="Changes">By path.</param>
/// <param name="Found">Findings before.</param>
/// <param name="Left">Findings after.</param>
/// <param name="Refused">Fixes that were not applied; their findings are among those left.</param>
/// <param name="First">The analysis before any fix.</param>
internal sealed record MendResult(
    ImmutableArray<FileChange> Changes, int Found, ImmutableArray<Finding> Left, ImmutableArray<Refusal> Refused, Inspection First);
