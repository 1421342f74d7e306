namespace Tare;

/// <summary>Declares the member of a row type that says which rows belong together, such as the kiln load of a board: a split must not part them.</summary>
/// <remarks>It only declares; it changes nothing at run time. The analyzer matches it by full name, so a project may declare its own copy instead of referencing this package.</remarks>
[AttributeUsage(AttributeTargets.Property | AttributeTargets.Field | AttributeTargets.Parameter)]
public sealed class GroupKeyAttribute : Attribute
{
}
