using System.Collections.Concurrent;
using System.Runtime.CompilerServices;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers;

/// <summary>
/// Which types' walks can lead to a document, by names alone: the types declared in it, and those whose source mentions
/// a member that one of these declares.
/// </summary>
internal sealed class Units
{
    // lexical facts only: strings, no symbols; they go when the tree goes
    private static readonly ConditionalWeakTable<SyntaxTree, Lexical> Facts = new();

    private readonly Compilation _compilation;
    private readonly Vocabulary _vocabulary;

    public Units(Compilation compilation, Vocabulary vocabulary)
    {
        _compilation = compilation;
        _vocabulary = vocabulary;
    }

    public IReadOnlyList<INamedTypeSymbol> LeadingTo(SyntaxTree tree, CancellationToken cancellation)
    {
        var trees = new List<SyntaxTree> { tree };
        var known = new HashSet<SyntaxTree> { tree };
        for (int i = 0; i < trees.Count; i++)
        {
            cancellation.ThrowIfCancellationRequested();
            var declared = Of(trees[i]).Declares;
            foreach (var other in _compilation.SyntaxTrees)
            {
                if (known.Contains(other) || !Gate.MayMatter(other, _vocabulary, cancellation))
                    continue;
                if (Of(other).Mentions.Overlaps(declared) || Of(other).Types.Overlaps(Of(trees[i]).Types))
                {
                    known.Add(other);
                    trees.Add(other);
                }
            }
        }

        trees.Sort((a, b) => string.CompareOrdinal(a.FilePath, b.FilePath));
        var types = new List<INamedTypeSymbol>();
        foreach (var t in trees)
        {
            foreach (var type in TypesIn(t, cancellation))
            {
                if (!types.Contains(type, SymbolEqualityComparer.Default))
                    types.Add(type);
            }
        }

        return types;
    }

    public static IEnumerable<IMethodSymbol> MethodsOf(INamedTypeSymbol type)
    {
        foreach (var member in type.GetMembers())
        {
            if (member is IMethodSymbol { IsAbstract: false } method && method.DeclaringSyntaxReferences.Length > 0 && method.AssociatedSymbol is null or IMethodSymbol { MethodKind: MethodKind.PropertyGet, DeclaringSyntaxReferences.Length: > 0 })
                yield return (IMethodSymbol)member;
        }
    }

    private IEnumerable<INamedTypeSymbol> TypesIn(SyntaxTree tree, CancellationToken cancellation)
    {
#pragma warning disable RS1030 // see Bodies.ModelOf: declarations of a document that leads here
        var model = _compilation.GetSemanticModel(tree);
#pragma warning restore RS1030
        var root = tree.GetRoot(cancellation);
        if (root is CompilationUnitSyntax unit && unit.Members.Any(m => m is GlobalStatementSyntax)
            && model.GetDeclaredSymbol(unit, cancellation) is IMethodSymbol main)
            yield return main.ContainingType;
        foreach (var declaration in root.DescendantNodes(n => n is CompilationUnitSyntax or BaseNamespaceDeclarationSyntax or TypeDeclarationSyntax).OfType<TypeDeclarationSyntax>())
        {
            if (model.GetDeclaredSymbol(declaration, cancellation) is INamedTypeSymbol type)
                yield return type;
        }
    }

    private static Lexical Of(SyntaxTree tree) => Facts.GetValue(tree, t => new Lexical(t));

    private sealed class Lexical
    {
        public Lexical(SyntaxTree tree)
        {
            var root = tree.GetRoot();
            foreach (var node in root.DescendantNodes())
            {
                switch (node)
                {
                    case SimpleNameSyntax name:
                        Mentions.Add(name.Identifier.ValueText);
                        break;
                    case MethodDeclarationSyntax method:
                        Declares.Add(method.Identifier.ValueText);
                        break;
                    case PropertyDeclarationSyntax property:
                        Declares.Add(property.Identifier.ValueText);
                        break;
                    case VariableDeclaratorSyntax { Parent.Parent: FieldDeclarationSyntax } field:
                        Declares.Add(field.Identifier.ValueText);
                        break;
                    case BaseTypeDeclarationSyntax type:
                        Declares.Add(type.Identifier.ValueText);
                        Types.Add(type.Identifier.ValueText);
                        break;
                    case ParameterSyntax { Parent.Parent: TypeDeclarationSyntax } parameter:
                        Declares.Add(parameter.Identifier.ValueText);
                        break;
                }
            }
        }

        public HashSet<string> Declares { get; } = new(StringComparer.Ordinal);

        public HashSet<string> Mentions { get; } = new(StringComparer.Ordinal);

        public HashSet<string> Types { get; } = new(StringComparer.Ordinal);
    }
}
