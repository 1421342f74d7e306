using System.Collections.Concurrent;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;

namespace Tare.Analyzers.Flow;

/// <summary>Bodies of the compilation's methods, accessors and initialisers as operations, each bound once.</summary>
internal sealed class Bodies
{
    private static readonly IReadOnlyList<IOperation> None = Array.Empty<IOperation>();

    private readonly Compilation _compilation;
    private readonly CancellationToken _cancellation;
    private readonly ConcurrentDictionary<ISymbol, IReadOnlyList<IOperation>> _bodies = new(SymbolEqualityComparer.Default);
    private readonly ConcurrentDictionary<SyntaxTree, SemanticModel> _models = new();
    private readonly ConcurrentDictionary<SyntaxNode, IReadOnlyCollection<ISymbol>> _reads = new();
    private readonly ConcurrentDictionary<ISymbol, IReadOnlyList<INamedTypeSymbol>> _types = new(SymbolEqualityComparer.Default);

    public Bodies(Compilation compilation, CancellationToken cancellation)
    {
        _compilation = compilation;
        _cancellation = cancellation;
    }

    public Compilation Compilation => _compilation;

    public CancellationToken Cancellation => _cancellation;

    /// <summary>The model of a document whose callee or caller is being read; the analysed document's own model is used when it is that one.</summary>
    public SemanticModel ModelOf(SyntaxTree tree)
    {
        // The one justified use: a finding depends on bodies in other documents, read on demand while its own is analysed.
#pragma warning disable RS1030
        return _models.GetOrAdd(tree, t => _compilation.GetSemanticModel(t));
#pragma warning restore RS1030
    }

    public void Use(SemanticModel model) => _models[model.SyntaxTree] = model;

    public IReadOnlyList<IOperation>? Of(IMethodSymbol method)
    {
        var definition = (method.PartialImplementationPart ?? method).OriginalDefinition;
        var body = _bodies.GetOrAdd(definition, d => Bind((IMethodSymbol)d));
        return body.Count == 0 ? null : body;
    }

    public IOperation? InitialiserOf(ISymbol member)
    {
        var body = _bodies.GetOrAdd(member, BindInitialiser);
        return body.Count == 0 ? null : body[0];
    }

    /// <summary>Locals and parameters that a body mentions.</summary>
    public IReadOnlyCollection<ISymbol> ReadBy(IOperation body) => _reads.GetOrAdd(body.Syntax, _ =>
    {
        var read = new HashSet<ISymbol>(SymbolEqualityComparer.Default);
        foreach (var operation in body.DescendantsAndSelf())
        {
            if (operation is ILocalReferenceOperation local)
                read.Add(local.Local);
            else if (operation is IParameterReferenceOperation parameter)
                read.Add(parameter.Parameter);
        }

        return read;
    });

    /// <summary>Classes and structs of the compilation that implement or derive from a type of it.</summary>
    public IReadOnlyList<INamedTypeSymbol> TypesOf(INamedTypeSymbol type) => _types.GetOrAdd(type.OriginalDefinition, t =>
    {
        var found = new List<INamedTypeSymbol>();
        Collect(_compilation.Assembly.GlobalNamespace, (INamedTypeSymbol)t, found);
        return found;
    });

    private static void Collect(INamespaceOrTypeSymbol container, INamedTypeSymbol wanted, List<INamedTypeSymbol> found)
    {
        foreach (var member in container.GetMembers())
        {
            if (found.Count >= 8)
                return;
            if (member is INamedTypeSymbol { TypeKind: TypeKind.Class or TypeKind.Struct } type && Derives(type, wanted))
                found.Add(type);
            if (member is INamespaceOrTypeSymbol inner)
                Collect(inner, wanted, found);
        }
    }

    private static bool Derives(INamedTypeSymbol type, INamedTypeSymbol wanted)
    {
        if (wanted.TypeKind == TypeKind.Interface)
        {
            foreach (var i in type.AllInterfaces)
            {
                if (SymbolEqualityComparer.Default.Equals(i.OriginalDefinition, wanted))
                    return true;
            }

            return false;
        }

        for (var t = type.BaseType; t is not null; t = t.BaseType)
        {
            if (SymbolEqualityComparer.Default.Equals(t.OriginalDefinition, wanted))
                return true;
        }

        return false;
    }

    private IReadOnlyList<IOperation> Bind(IMethodSymbol method)
    {
        if (method.DeclaringSyntaxReferences.Length == 0)
            return None;
        var syntax = method.DeclaringSyntaxReferences[0].GetSyntax(_cancellation);
        if (!_compilation.ContainsSyntaxTree(syntax.SyntaxTree))
            return None;
        var model = ModelOf(syntax.SyntaxTree);
        var operation = syntax switch
        {
            TypeDeclarationSyntax => null,
            ParameterSyntax => null,
            _ when Nesting.IsTooDeep(syntax) => null,
            _ => model.GetOperation(syntax, _cancellation),
        };
        switch (operation)
        {
            case IConstructorBodyOperation c:
                var parts = new List<IOperation>();
                if (c.Initializer is not null)
                    parts.Add(c.Initializer);
                if (c.BlockBody is not null)
                    parts.Add(c.BlockBody);
                if (c.ExpressionBody is not null)
                    parts.Add(c.ExpressionBody);
                return parts;
            case IMethodBodyOperation m:
                var chosen = m.BlockBody ?? m.ExpressionBody;
                return chosen is null ? None : new IOperation[] { chosen };
            case ILocalFunctionOperation l:
                return l.Body is null ? None : new IOperation[] { l.Body };
            case IBlockOperation b:
                return new IOperation[] { b };
            case null:
                return None;
            default:
                return new[] { operation };
        }
    }

    private IReadOnlyList<IOperation> BindInitialiser(ISymbol member)
    {
        foreach (var reference in member.DeclaringSyntaxReferences)
        {
            var syntax = reference.GetSyntax(_cancellation);
            if (!_compilation.ContainsSyntaxTree(syntax.SyntaxTree))
                continue;
            var value = syntax switch
            {
                VariableDeclaratorSyntax v => v.Initializer?.Value,
                PropertyDeclarationSyntax p => p.Initializer?.Value,
                _ => null,
            };
            if (value is not null && !Nesting.IsTooDeep(value) && ModelOf(syntax.SyntaxTree).GetOperation(value, _cancellation) is { } operation)
                return new[] { operation };
        }

        return None;
    }
}
