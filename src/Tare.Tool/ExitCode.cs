namespace Tare.Tool;

/// <summary>What the process hands to the shell.</summary>
internal static class ExitCode
{
    /// <summary>Nothing at or above the level that fails.</summary>
    public const int Clean = 0;

    /// <summary>Something was found (inspect), or is left to mend by hand (mend).</summary>
    public const int Found = 1;

    /// <summary>The call or the code could not be read, so nothing is known.</summary>
    public const int Failed = 2;
}
