namespace Tare;

/// <summary>Declares a number computed from rows for a candidate, such as an accuracy, a loss or a profit.</summary>
/// <remarks>It only declares; it changes nothing at run time. The analyzer matches it by full name, so a project may declare its own copy instead of referencing this package.</remarks>
[AttributeUsage(AttributeTargets.ReturnValue | AttributeTargets.Property | AttributeTargets.Field | AttributeTargets.Parameter)]
public sealed class ScoreAttribute : Attribute
{
}
