using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Flow;

/// <summary>Everything that one walk found out.</summary>
internal sealed class Facts
{
    private readonly Dictionary<(SyntaxNode, int), int> _sites = new();
    private readonly Dictionary<(SyntaxNode, int, int), HeapObject> _objectsBySite = new();
    private readonly Dictionary<SyntaxNode, Origin> _originsBySyntax = new();
    private readonly Dictionary<(int, string), RowSet> _parts = new();
    private readonly HashSet<(int, int)> _met = new();
    private readonly Dictionary<(SyntaxNode, int), Choice> _choicesByPlace = new();
    private readonly Dictionary<(SyntaxNode, int), LevelTest> _levelTests = new();
    private readonly Dictionary<(SyntaxNode, int), int> _comparisons = new();

    public List<Origin> Origins { get; } = new();

    public List<RowSet> Rows { get; } = new();

    public List<HeapObject> Objects { get; } = new();

    public List<Choice> Choices { get; } = new();

    public List<Comparison> Comparisons { get; } = new();

    public Dictionary<SyntaxNode, Claim> Claims { get; } = new();

    public List<Meeting> Meetings { get; } = new();

    public List<Birth> Births { get; } = new();

    public IEnumerable<LevelTest> LevelTests => _levelTests.Values;

    public HashSet<ISymbol> Reached { get; } = new(SymbolEqualityComparer.Default);

    public bool OverBudget { get; set; }

    public int Order { get; set; }

    public Origin OriginOf(SyntaxNode syntax)
    {
        if (!_originsBySyntax.TryGetValue(syntax, out var origin))
            _originsBySyntax[syntax] = origin = NewOrigin(syntax);
        return origin;
    }

    public Origin NewOrigin(SyntaxNode? syntax)
    {
        var origin = new Origin(Origins.Count, syntax);
        Origins.Add(origin);
        return origin;
    }

    public RowSet NewRows(Source source, RowSet? parent, SyntaxNode? syntax)
    {
        var rows = new RowSet(Rows.Count, source, parent, syntax);
        Rows.Add(rows);
        return rows;
    }

    /// <summary>The part of a parent with these bounds or this predicate: asked for twice, it is the same part.</summary>
    public RowSet PartOf(RowSet parent, string key, SyntaxNode? syntax)
    {
        if (!_parts.TryGetValue((parent.Id, key), out var part))
        {
            part = NewRows(Source.Part, parent, syntax);
            part.Key = key;
            part.Varies = parent.Varies;
            part.Shuffled = parent.Shuffled;
            _parts[(parent.Id, key)] = part;
        }

        return part;
    }

    public HeapObject ObjectAt(SyntaxNode site, int chain, ITypeSymbol? type, int depth, int slot = 0)
    {
        if (!_objectsBySite.TryGetValue((site, chain, slot), out var o))
        {
            o = new HeapObject(Objects.Count, site, type) { Depth = depth };
            Objects.Add(o);
            _objectsBySite[(site, chain, slot)] = o;
        }

        return o;
    }

    public HeapObject NewObject(SyntaxNode? site, ITypeSymbol? type)
    {
        var o = new HeapObject(Objects.Count, site, type);
        Objects.Add(o);
        return o;
    }

    public int SiteOf(SyntaxNode syntax, int chain)
    {
        if (!_sites.TryGetValue((syntax, chain), out int id))
            _sites[(syntax, chain)] = id = _sites.Count;
        return id;
    }

    public bool Meet(int fitted, int scored, IdSet varies, IdSet wins, bool stored)
    {
        _met.Add((fitted, scored));
        if (Meetings.Count > 20000)
            return false;
        for (int i = Meetings.Count - 1; i >= 0 && i >= Meetings.Count - 60; i--)
        {
            var m = Meetings[i];
            if (m.Fitted == fitted && m.Scored == scored && m.Varies.ContainsAll(varies) && m.Wins.ContainsAll(wins) && m.Stored == stored)
                return false;
        }

        Meetings.Add(new Meeting(fitted, scored, varies, wins, Order++, stored));
        return true;
    }

    public Choice ChoiceAt(SyntaxNode place, Frame frame, ChoiceKind kind)
    {
        if (!_choicesByPlace.TryGetValue((place, frame.Chain), out var choice))
        {
            choice = new Choice(Choices.Count, kind, place, frame, Order++);
            Choices.Add(choice);
            _choicesByPlace[(place, frame.Chain)] = choice;
        }

        return choice;
    }

    public int Compare(SyntaxNode place, Frame frame, Func<int, Comparison> make)
    {
        var key = (place, frame.Chain);
        if (_comparisons.TryGetValue(key, out int id))
        {
            Comparisons[id] = make(id);
            return id;
        }

        id = Comparisons.Count;
        _comparisons[key] = id;
        Comparisons.Add(make(id));
        return id;
    }

    public LevelTest Test(LevelTest test)
    {
        var key = (test.Place, test.Frame.Chain);
        if (_levelTests.TryGetValue(key, out var old))
            test = test with { Conjunction = test.Conjunction || old.Conjunction, Kept = test.Kept || old.Kept };
        _levelTests[key] = test;
        return test;
    }

    public LevelTest? TestAt(SyntaxNode place, Frame frame) => _levelTests.TryGetValue((place, frame.Chain), out var t) ? t : null;

    public void Claim(Claim claim)
    {
        if (Claims.TryGetValue(claim.Place, out var old))
            claim = claim with { Value = old.Value.Join(claim.Value), Running = old.Running.Intersect(claim.Running) };
        Claims[claim.Place] = claim;
    }
}
