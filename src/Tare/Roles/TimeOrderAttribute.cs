namespace Tare;

/// <summary>Declares the member of a row type that puts rows in time order: a split must cut by it, not at random.</summary>
/// <remarks>It only declares; it changes nothing at run time. The analyzer matches it by full name, so a project may declare its own copy instead of referencing this package.</remarks>
[AttributeUsage(AttributeTargets.Property | AttributeTargets.Field | AttributeTargets.Parameter)]
public sealed class TimeOrderAttribute : Attribute
{
}
