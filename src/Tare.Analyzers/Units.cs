using System.Runtime.CompilerServices;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

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
    private readonly Gate _gate;
    private readonly Lazy<IReadOnlyList<SyntaxTree>> _telling;

    public Units(Compilation compilation, Gate gate)
    {
        _compilation = compilation;
        _gate = gate;
        _telling = new Lazy<IReadOnlyList<SyntaxTree>>(() => _compilation.SyntaxTrees.Where(t => _gate.MayMatter(t, default)).ToArray());
    }

    /// <summary>
    /// The types to walk for a document's findings: none when no text of the compilation says anything that could matter,
    /// or when no telling document leads here.
    /// </summary>
    public IReadOnlyList<INamedTypeSymbol> LeadingTo(SyntaxTree tree, CancellationToken cancellation)
    {
        var telling = _telling.Value;
        if (telling.Count == 0)
            return Array.Empty<INamedTypeSymbol>();
        var trees = new List<SyntaxTree> { tree };
        var known = new HashSet<SyntaxTree> { tree };
        for (int i = 0; i < trees.Count; i++)
        {
            cancellation.ThrowIfCancellationRequested();
            var here = Of(trees[i]);
            foreach (var other in telling)
            {
                if (!known.Contains(other) && (Of(other).Mentions.Overlaps(here.Declares) || Of(other).Types.Overlaps(here.Types)))
                {
                    known.Add(other);
                    trees.Add(other);
                }
            }
        }

        // a document that says nothing itself is spoken of by those that lead to it
        if (!_gate.MayMatter(tree, cancellation))
            trees.Remove(tree);
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
        private readonly SyntaxTree _tree;
        private HashSet<string>? _mentions;

        public Lexical(SyntaxTree tree)
        {
            _tree = tree;
            foreach (var node in tree.GetRoot().DescendantNodes(n => n is CompilationUnitSyntax or BaseNamespaceDeclarationSyntax or TypeDeclarationSyntax or BaseFieldDeclarationSyntax or VariableDeclarationSyntax or ParameterListSyntax))
            {
                switch (node)
                {
                    case MethodDeclarationSyntax method:
                        Declares.Add(method.Identifier.ValueText);
                        break;
                    case PropertyDeclarationSyntax property:
                        Declares.Add(property.Identifier.ValueText);
                        break;
                    case VariableDeclaratorSyntax field:
                        Declares.Add(field.Identifier.ValueText);
                        break;
                    case BaseTypeDeclarationSyntax type:
                        Declares.Add(type.Identifier.ValueText);
                        Types.Add(type.Identifier.ValueText);
                        break;
                    case ParameterSyntax parameter:
                        Declares.Add(parameter.Identifier.ValueText);
                        break;
                }
            }
        }

        public HashSet<string> Declares { get; } = new(StringComparer.Ordinal);

        public HashSet<string> Types { get; } = new(StringComparer.Ordinal);

        /// <summary>Every name in the document; only telling documents are asked.</summary>
        public HashSet<string> Mentions
        {
            get
            {
                if (_mentions is not null)
                    return _mentions;
                var mentions = new HashSet<string>(StringComparer.Ordinal);
                foreach (var node in _tree.GetRoot().DescendantNodes())
                {
                    if (node is SimpleNameSyntax name)
                        mentions.Add(name.Identifier.ValueText);
                }

                return _mentions = mentions;
            }
        }
    }
}
