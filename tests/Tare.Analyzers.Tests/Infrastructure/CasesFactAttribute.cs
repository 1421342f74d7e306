namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>A test over the labelled programs; shown as skipped when there are none.</summary>
[AttributeUsage(AttributeTargets.Method)]
internal sealed class CasesFactAttribute : FactAttribute
{
    public CasesFactAttribute() => Skip = Cases.SkipReason;
}
