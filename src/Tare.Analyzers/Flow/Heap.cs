using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Flow;

/// <summary>An abstract object: everything made at one place by one chain of calls. Its contents only grow.</summary>
internal sealed class HeapObject
{
    public HeapObject(int id, SyntaxNode? site, ITypeSymbol? type)
    {
        Id = id;
        Site = site;
        Type = type;
    }

    public int Id { get; }

    public SyntaxNode? Site { get; }

    public ITypeSymbol? Type { get; }

    /// <summary>The rows that it holds, when it is known to hold rows.</summary>
    public RowSet? Rows { get; set; }

    /// <summary>One abstract element of a collection.</summary>
    public Value Element { get; set; } = Value.Empty;

    /// <summary>One abstract key of a dictionary.</summary>
    public Value Key { get; set; } = Value.Empty;

    /// <summary>State that has no name here: what was handed to an object without visible source.</summary>
    public Value Content { get; set; } = Value.Empty;

    public Dictionary<string, Value>? Fields { get; set; }

    /// <summary>Origins that tell the elements apart: the loops in which they were stored.</summary>
    public IdSet Per { get; set; }

    /// <summary>The origin that stands for this collection's own elements, made on demand.</summary>
    public Origin? Own { get; set; }

    /// <summary>How many loops were running when it was made.</summary>
    public int Depth { get; set; }

    public bool IsCollection { get; set; }

    public double? Count { get; set; }

    public string? CountText { get; set; }

    /// <summary>What the size differs with: `new double[features]`, `Range(0, factors)`.</summary>
    public IdSet SizeVaries { get; set; }

    /// <summary>Places that add one element each, outside any loop.</summary>
    public HashSet<SyntaxNode>? AddSites { get; set; }

    /// <summary>The key by which the elements stand in order.</summary>
    public Value? SortKey { get; set; }

    public SyntaxNode? SortPlace { get; set; }

    public bool Descending { get; set; }

    /// <summary>A window that moves with the rows: belongs to one row each time.</summary>
    public bool IsWindow { get; set; }

    /// <summary>Rows that were read alongside when this was computed row by row: labels beside features.</summary>
    public IdSet Along { get; set; }

    /// <summary>Called p-values: its numbers are.</summary>
    public bool HoldsPValues { get; set; }

    /// <summary>A half of a split by an API: the part of <see cref="Rows"/> that a property gives.</summary>
    public bool IsSplit { get; set; }

    /// <summary>Something else holds it, so that making another at the same place must not take its contents away.</summary>
    public bool Escaped { get; set; }

    /// <summary>Made anew: what the one before it held is gone, unless that one is still held.</summary>
    public void Renew()
    {
        if (Escaped)
            return;
        Element = Value.Empty;
        Key = Value.Empty;
        Content = Value.Empty;
        Fields?.Clear();
        SortKey = null;
        SortPlace = null;
    }

    public Value? Field(string name) => Fields is not null && Fields.TryGetValue(name, out var value) ? value : null;

    /// <summary>Adds to a field; true when that told something new.</summary>
    public bool Store(string name, Value value)
    {
        Fields ??= new Dictionary<string, Value>(StringComparer.Ordinal);
        if (!Fields.TryGetValue(name, out var old))
        {
            Fields[name] = value;
            return true;
        }

        var joined = old.Join(value);
        if (joined.Same(old))
            return false;
        Fields[name] = joined;
        return true;
    }
}
