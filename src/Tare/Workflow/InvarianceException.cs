namespace Tare;

/// <summary>The winner moved when only test rows changed: the choice reads them.</summary>
public sealed class InvarianceException : Exception
{
    /// <summary>Makes one with a message.</summary>
    /// <param name="message">What moved.</param>
    public InvarianceException(string message)
        : base(message)
    {
    }
}
