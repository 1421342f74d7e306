using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

/// <summary>
/// Follows values through a method and the methods it calls: a structured walk over operations, two passes a loop,
/// joins at branches, called bodies evaluated in place with their actual arguments.
/// </summary>
internal sealed partial class Walker
{
    private const int MaxCallDepth = 24;
    private const int MostRows = 300;
    private const int MostObjects = 3000;
    private const int MaxStackDepth = 220;

    private readonly Bodies _bodies;
    private readonly Catalogue _catalogue;
    private readonly Vocabulary _vocabulary;
    private readonly Facts _facts;
    private readonly List<LoopScope> _loops = new();
    private readonly List<Guard> _guards = new();
    private readonly Dictionary<ISymbol, Value> _statics = new(SymbolEqualityComparer.Default);
    private readonly Dictionary<ISymbol, int> _declaredAt = new(SymbolEqualityComparer.Default);
    private readonly List<Closure> _closures = new();
    private readonly Dictionary<SyntaxNode, int> _closureIds = new();
    private readonly Stack<Value> _conditionalReceivers = new();
    private readonly Stack<Value> _initialised = new();
    private readonly HashSet<int> _begun = new();
    private readonly int _budget;

    private State _state = new();
    private Frame _frame;
    private int _visits;
    private int _depth;
    private int _changes;
    private SyntaxNode? _placeOverride;

    public Walker(Bodies bodies, Catalogue catalogue, Vocabulary vocabulary, Facts facts, int budget)
    {
        _bodies = bodies;
        _catalogue = catalogue;
        _vocabulary = vocabulary;
        _facts = facts;
        _budget = budget;
        _frame = new Frame(null, null, null, false);
    }

    /// <summary>Only effects on objects are wanted, no events: the method was already followed from its callers.</summary>
    public bool Silent { get; set; }

    public Facts Facts => _facts;

    private bool Spent => _visits > _budget;

    /// <summary>Walks a method that nothing visible calls: its parameters are whatever a caller hands over.</summary>
    public void Root(IMethodSymbol method, Value instance)
    {
        if (_bodies.Of(method) is not { } body)
            return;
        _frame = new Frame(null, method, null, false) { This = instance };
        _frame.EvidentRows = RowsOf(Deep(instance));
        foreach (var parameter in method.Parameters)
            _state.Set(parameter, RootParameter(parameter));
        foreach (var part in body)
            Statement(part);
        _loops.Clear();
        _guards.Clear();
    }

    public HeapObject InstanceOf(INamedTypeSymbol type)
    {
        var syntax = type.DeclaringSyntaxReferences[0].GetSyntax();
        var o = _facts.ObjectAt(syntax, 0, type, 0);
        if (_begun.Add(o.Id))
        {
            var self = Ref(o);
            InitialiseMembers(o, self, type);
            foreach (var constructor in type.InstanceConstructors)
            {
                if (constructor.DeclaringSyntaxReferences.Length == 0 || constructor.DeclaringSyntaxReferences[0].GetSyntax() is not TypeDeclarationSyntax)
                    continue;
                var values = constructor.Parameters.Select(RootParameter).ToArray();
                Primary(o, type, constructor, values, syntax);
            }
        }

        return o;
    }

    private Value RootParameter(IParameterSymbol parameter)
    {
        // the command line's arguments are no rows
        if (parameter.DeclaringSyntaxReferences.Length == 0 || parameter.ContainingSymbol is IMethodSymbol { Name: "Main", IsStatic: true } && parameter.Type is IArrayTypeSymbol)
            return Value.Empty;
        return Unseen(parameter, parameter.Type, parameter.DeclaringSyntaxReferences[0].GetSyntax(), Source.Parameter);
    }

    /// <summary>The value of a parameter or field that is set where we cannot see.</summary>
    private Value Unseen(ISymbol symbol, ITypeSymbol type, SyntaxNode syntax, Source source)
    {
        if (RowsTypes.IsTask(type, out var result) && result is not null)
            type = result;
        if (RowsTypes.IsRowsLike(type))
        {
            var o = _facts.ObjectAt(syntax, source == Source.Field ? -1 : 0, type, 0);
            o.IsCollection = RowsTypes.IsCollection(type) || type is not INamedTypeSymbol || !RowsTypes.IsRowsLike(type) || type.DeclaringSyntaxReferences.Length == 0;
            // a list of numbers or settings that a caller hands over is rows only if its name says so
            if (!IsGrid(type, symbol.Name))
                o.Rows ??= _facts.NewRows(source, null, syntax);
            Name(o, symbol.Name, symbol, syntax);
            return new Value { Objects = IdSet.Of(o.Id) };
        }

        var traits = Traits.None;
        if (RowsTypes.IsReal(type))
        {
            if (Vocabulary.SaysPValue(symbol.Name))
                traits |= Traits.PValue;
            else if (Vocabulary.SaysLevel(symbol.Name))
                traits |= Traits.NamedLevel;
        }

        if (type is INamedTypeSymbol named && !RowsTypes.IsScalar(type) && type.TypeKind != TypeKind.Delegate)
        {
            var o = _facts.ObjectAt(syntax, source == Source.Field ? -1 : 0, named, 0);
            return new Value { Objects = IdSet.Of(o.Id), Traits = traits };
        }

        return traits == Traits.None ? Value.Empty : new Value { Traits = traits };
    }

    private bool IsGrid(ITypeSymbol type, string name)
    {
        if (_vocabulary.RoleOf(name, out _) != Role.Unknown)
            return false;
        var element = ElementType(type);
        return element is not null && (RowsTypes.IsScalar(element) || element.TypeKind is TypeKind.Delegate or TypeKind.Interface || Vocabulary.SaysCandidate(element.Name)) || Vocabulary.SaysCandidate(name);
    }

    private bool Enter()
    {
        if (++_visits > _budget || _facts.Rows.Count > MostRows || _facts.Objects.Count > MostObjects)
        {
            _facts.OverBudget = true;
            return false;
        }

        if (_depth >= MaxStackDepth)
            return false;
        _depth++;
        return true;
    }

    private void Leave() => _depth--;

    private SyntaxNode Place(SyntaxNode syntax) => _placeOverride ?? syntax;

    private IdSet RunningOrigins(int from = 0)
    {
        var origins = IdSet.Empty;
        for (int i = from; i < _loops.Count; i++)
            origins = origins.Union(_loops[i].Origins);
        return origins;
    }

    /// <summary>A loop, or the implied loop of a call that runs a function for every element.</summary>
    private sealed class LoopScope
    {
        public IdSet Origins { get; set; }

        public IdSet Rows { get; set; }

        public State Layer { get; set; } = null!;

        public HashSet<(HeapObject Object, string Member)> Written { get; } = new();

        public SyntaxNode Syntax { get; set; } = null!;

        /// <summary>The first round through a loop does not know yet which rows the loop goes through.</summary>
        public bool IsFirst { get; set; }

        public bool Again { get; set; }

        /// <summary>What the number of rounds differs with.</summary>
        public IdSet Bound { get; set; }

        public Frame Frame { get; set; } = null!;
    }

    /// <summary>A condition under which statements run.</summary>
    private sealed class Guard
    {
        public Value Condition { get; set; } = Value.Empty;

        public int LoopDepth { get; set; }

        public bool Negated { get; set; }

        public SyntaxNode Syntax { get; set; } = null!;

        /// <summary>The branch that this guard keeps out leaves the loop or the method.</summary>
        public bool OtherExits { get; set; }
    }

    private sealed record Closure(IMethodSymbol Symbol, IOperation? Body, Value Instance, SyntaxNode Syntax);
}
