namespace Tare;

/// <summary>Declares rows that still hold training, validation and test rows together.</summary>
/// <remarks>It only declares; it changes nothing at run time. The analyzer matches it by full name, so a project may declare its own copy instead of referencing this package.</remarks>
[AttributeUsage(AttributeTargets.Parameter | AttributeTargets.ReturnValue | AttributeTargets.Field | AttributeTargets.Property
    | AttributeTargets.Class | AttributeTargets.Struct | AttributeTargets.Interface)]
public sealed class UnsplitRowsAttribute : Attribute
{
}
