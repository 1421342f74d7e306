using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.CodeFixes;

/// <summary>A finding in its document, with what the analyzer said about it.</summary>
internal sealed class Place
{
    public Place(CompilationUnitSyntax root, SemanticModel model, Diagnostic diagnostic, TareLibrary library, CancellationToken cancel)
    {
        Root = root;
        Model = model;
        Diagnostic = diagnostic;
        Library = library;
        Cancel = cancel;
    }

    public CompilationUnitSyntax Root { get; }

    public SemanticModel Model { get; }

    public Diagnostic Diagnostic { get; }

    public TareLibrary Library { get; }

    public CancellationToken Cancel { get; }

    /// <summary>The syntax that the finding marks.</summary>
    public SyntaxNode Node => Root.FindNode(Diagnostic.Location.SourceSpan, getInnermostNodeForTie: true);

    /// <summary>A fact such as <c>count</c>, or null when the analyzer does not know it.</summary>
    public string? Fact(string name) =>
        Diagnostic.Properties.TryGetValue("tare." + name, out string? value) && !string.IsNullOrEmpty(value) ? value : null;

    /// <summary>The first place with a label such as <c>family</c>, if it lies in this document.</summary>
    public SyntaxNode? Labelled(string label)
    {
        string[] labels = Fact("places")?.Split(',') ?? [];
        for (int i = 0; i < labels.Length && i < Diagnostic.AdditionalLocations.Count; i++)
        {
            var location = Diagnostic.AdditionalLocations[i];
            if (labels[i] == label && location.SourceTree == Root.SyntaxTree)
                return Root.FindNode(location.SourceSpan, getInnermostNodeForTie: true);
        }

        return null;
    }

    /// <summary>What an expression would mean at a place of this document.</summary>
    public ISymbol? SymbolAt(int position, ExpressionSyntax expression) =>
        Model.GetSpeculativeSymbolInfo(position, expression, SpeculativeBindingOption.BindAsExpression).Symbol;

    public ITypeSymbol? TypeAt(int position, ExpressionSyntax expression) =>
        Model.GetSpeculativeTypeInfo(position, expression, SpeculativeBindingOption.BindAsExpression).Type;
}
