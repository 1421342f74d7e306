using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Flow;

internal enum Role
{
    /// <summary>Nothing is known: rows that a caller we cannot see hands over.</summary>
    Unknown,
    Training,
    Validation,
    Test,
    Unsplit,
    None,
}

internal enum Evidence
{
    None,
    Named,
    Known,
    Declared,
}

/// <summary>Where rows come from.</summary>
internal enum Source
{
    Fresh,
    Loaded,
    Parameter,
    Field,
    Part,
    Folds,
}

/// <summary>How a part was cut off its parent.</summary>
internal enum Cut
{
    None,
    Head,
    Tail,
    Middle,
    Filter,
    Half,
}

/// <summary>A set of rows: a root (loaded, made or handed over) or a part of another set.</summary>
internal sealed class RowSet
{
    public RowSet(int id, Source source, RowSet? parent, SyntaxNode? syntax)
    {
        Id = id;
        Source = source;
        Parent = parent;
        Syntax = syntax;
    }

    public int Id { get; }

    public Source Source { get; set; }

    public RowSet? Parent { get; }

    public SyntaxNode? Syntax { get; }

    public Cut Cut { get; set; }

    /// <summary>What tells it from other parts of the parent: bounds or predicate, as normalised text.</summary>
    public string? Key { get; set; }

    /// <summary>The key of the part that holds the other rows, when one can be written.</summary>
    public string? OtherKey { get; set; }

    /// <summary>Names it is known by, with the symbol that carries each.</summary>
    public List<RowName> Names { get; } = new();

    public Role DeclaredRole { get; set; }

    public Evidence DeclaredEvidence { get; set; }

    /// <summary>The split API says which half this is.</summary>
    public Role KnownRole { get; set; }

    /// <summary>Origins with which the rows themselves differ: a split drawn in a loop, a file a loop.</summary>
    public IdSet Varies { get; set; }

    /// <summary>Row sets that these rows, being indices, point into.</summary>
    public IdSet PointsInto { get; set; }

    /// <summary>Cut at random (after a shuffle) rather than in order.</summary>
    public bool Shuffled { get; set; }

    public RowSet Root => Parent?.Root ?? this;

    public bool IsWithin(RowSet other)
    {
        for (var r = this; r is not null; r = r.Parent)
        {
            if (r == other)
                return true;
        }

        return false;
    }

    public void AddName(string name, ISymbol? symbol, Role role, bool isPath = false, bool isEval = false)
    {
        foreach (var known in Names)
        {
            if (known.Name == name && SymbolEqualityComparer.Default.Equals(known.Symbol, symbol))
                return;
        }

        if (Names.Count < 24)
            Names.Add(new RowName(name, symbol, role, isPath, isEval));
    }
}

/// <summary>A name for rows and the role its words say.</summary>
internal sealed record RowName(string Name, ISymbol? Symbol, Role Role, bool IsPath, bool IsEval);
