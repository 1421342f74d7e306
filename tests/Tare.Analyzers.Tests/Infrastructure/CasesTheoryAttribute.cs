namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>A test for each labelled program; shown as skipped when there are none.</summary>
[AttributeUsage(AttributeTargets.Method)]
internal sealed class CasesTheoryAttribute : TheoryAttribute
{
    public CasesTheoryAttribute() => Skip = Cases.SkipReason;
}
