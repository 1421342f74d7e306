namespace Tare;

/// <summary>Declares a p-value: candidates' p-values form a family, and a level for one of them must be corrected.</summary>
/// <remarks>It only declares; it changes nothing at run time. The analyzer matches it by full name, so a project may declare its own copy instead of referencing this package.</remarks>
[AttributeUsage(AttributeTargets.ReturnValue | AttributeTargets.Property | AttributeTargets.Field | AttributeTargets.Parameter)]
public sealed class PValueAttribute : Attribute
{
}
