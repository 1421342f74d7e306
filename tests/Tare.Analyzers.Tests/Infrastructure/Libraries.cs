namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>What a test program may use beside the base library.</summary>
[Flags]
public enum Libraries
{
    /// <summary>The base library alone.</summary>
    None = 0,
    MicrosoftML = 1,
    DataFrames = 2,
    MathNet = 4,
    TorchSharp = 8,
    Extensions = 16,
    Xunit = 32,

    /// <summary>The runtime library of this repository and its Microsoft.ML part.</summary>
    Tare = 64,

    /// <summary>All that labelled programs are compiled with: everything but Tare.</summary>
    ThirdParty = MicrosoftML | DataFrames | MathNet | TorchSharp | Extensions | Xunit,
    All = ThirdParty | Tare,
}
