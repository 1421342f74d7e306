using Tare.Tool.Analysis;
using Tare.Tool.Printing;

namespace Tare.Tool.Commands;

/// <summary>What the reader must know to judge how far the analysis went.</summary>
internal static class Notes
{
    public static void Write(TextWriter error, Inspection inspection)
    {
        if (inspection.CompileErrors > 0)
        {
            error.WriteLine($"tare: {Summary.Count(inspection.CompileErrors, "compile error")}; analysed as far as the code binds.");
        }

        foreach (var crash in inspection.Crashes)
        {
            error.WriteLine($"tare: an analyzer failed, so findings may be missing: {crash}");
        }
    }
}
