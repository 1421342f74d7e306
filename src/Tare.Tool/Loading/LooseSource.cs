using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Text;

namespace Tare.Tool.Loading;

/// <summary>A file without a project.</summary>
/// <param name="IsProgram">Whether it has top-level statements or a static method named Main.</param>
internal sealed record LooseSource(string Path, SourceText Text, CompilationUnitSyntax Root, bool IsProgram);
