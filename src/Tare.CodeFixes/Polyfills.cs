namespace System.Runtime.CompilerServices
{
    /// <summary>Compiler support type that netstandard2.0 lacks.</summary>
    internal static class IsExternalInit;
}
