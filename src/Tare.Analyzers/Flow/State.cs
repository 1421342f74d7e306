using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Flow;

/// <summary>What the variables hold. A branch writes to a layer of its own, so that joining costs what the branch changed.</summary>
internal sealed class State
{
    private readonly State? _under;
    private readonly Dictionary<ISymbol, Value> _values = new(SymbolEqualityComparer.Default);

    public State(State? under = null) => _under = under;

    public State? Under => _under;

    public IEnumerable<KeyValuePair<ISymbol, Value>> Changes => _values;

    public Value? Get(ISymbol symbol)
    {
        for (var s = this; s is not null; s = s._under)
        {
            if (s._values.TryGetValue(symbol, out var value))
                return value;
        }

        return null;
    }

    public void Set(ISymbol symbol, Value value) => _values[symbol] = value;

    /// <summary>Takes a value away again, if this layer set it.</summary>
    public void Forget(ISymbol symbol) => _values.Remove(symbol);

    /// <summary>Merges layers that may have run, beside the path on which none did.</summary>
    public bool Merge(State layer, bool always = false)
    {
        bool changed = false;
        foreach (var pair in layer._values)
        {
            var before = Get(pair.Key);
            var after = always || before is null ? pair.Value : before.Join(pair.Value);
            // set even when it says nothing new: a loop closes what its body set
            changed |= before is null || !after.Same(before);
            _values[pair.Key] = after;
        }

        return changed;
    }

    /// <summary>Merges two alternatives of which exactly one ran.</summary>
    public void MergeEither(State a, State b)
    {
        foreach (var pair in a._values)
        {
            var other = b._values.TryGetValue(pair.Key, out var v) ? v : Get(pair.Key);
            _values[pair.Key] = other is null ? pair.Value : pair.Value.Join(other);
        }

        foreach (var pair in b._values)
        {
            if (a._values.ContainsKey(pair.Key))
                continue;
            var other = Get(pair.Key);
            _values[pair.Key] = other is null ? pair.Value : pair.Value.Join(other);
        }
    }
}
