#if NETSTANDARD2_0
namespace System.Runtime.CompilerServices;

/// <summary>The compiler asks for this type when a property has an init accessor; older targets lack it.</summary>
[System.ComponentModel.EditorBrowsable(System.ComponentModel.EditorBrowsableState.Never)]
internal static class IsExternalInit
{
}
#endif
