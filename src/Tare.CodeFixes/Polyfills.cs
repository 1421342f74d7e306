namespace System.Runtime.CompilerServices
{
    /// <summary>Compiler support type that netstandard2.0 lacks.</summary>
    internal static class IsExternalInit;
}

namespace System
{
    /// <summary>What list patterns count with; netstandard2.0 lacks it.</summary>
    internal readonly struct Index(int value, bool fromEnd = false)
    {
        public int GetOffset(int length) => fromEnd ? length - value : value;

        public static implicit operator Index(int value) => new(value);
    }
}
