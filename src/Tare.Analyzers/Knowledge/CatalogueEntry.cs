using System.Collections.Immutable;

namespace Tare.Analyzers.Knowledge;

/// <summary>One line of a catalogue. Holds strings only, so it may outlive a compilation.</summary>
internal sealed class CatalogueEntry
{
    private readonly ImmutableArray<KeyValuePair<CatalogueKey, ImmutableArray<string>>> _keys;

    public CatalogueEntry(
        string id,
        string typeName,
        string memberName,
        bool allOverloads,
        CatalogueEffect effect,
        ImmutableArray<KeyValuePair<CatalogueKey, ImmutableArray<string>>> keys,
        int line)
    {
        Id = id;
        TypeName = typeName;
        MemberName = memberName;
        AllOverloads = allOverloads;
        Effect = effect;
        _keys = keys;
        Line = line;
    }

    /// <summary>The documentation-comment id as written, without a final <c>(*)</c>.</summary>
    public string Id { get; }

    /// <summary>Metadata name of the containing type (of the type itself for a <c>T:</c> line), such as <c>Module`2</c>.</summary>
    public string TypeName { get; }

    /// <summary>Metadata name of the member, <c>.ctor</c> for constructors, empty for a <c>T:</c> line.</summary>
    public string MemberName { get; }

    /// <summary>The line ends in <c>(*)</c>: it stands for every overload, whatever its type parameters.</summary>
    public bool AllOverloads { get; }

    public CatalogueEffect Effect { get; }

    /// <summary>Zero-based line in the text it was read from.</summary>
    public int Line { get; }

    /// <summary>Every key that the line gives, in the order written.</summary>
    public ImmutableArray<KeyValuePair<CatalogueKey, ImmutableArray<string>>> Keys => _keys;

    /// <summary>The line is about a whole type: it holds for each member that has no line of its own.</summary>
    public bool IsType => MemberName.Length == 0;

    /// <summary>The name a reader sees in code: the member's, or the type's for types and constructors.</summary>
    public string SimpleName
    {
        get
        {
            if (!IsType && MemberName != ".ctor")
                return MemberName;
            var tick = TypeName.IndexOf('`');
            return tick < 0 ? TypeName : TypeName.Substring(0, tick);
        }
    }

    /// <summary>The role of a <c>part</c>: training, validation or test; null for other effects.</summary>
    public string? Role => Word(CatalogueKey.Role);

    /// <summary>True if higher is better, false if lower is, null if the line does not say.</summary>
    public bool? HigherIsBetter => Word(CatalogueKey.Better) switch { "higher" => true, "lower" => false, _ => null };

    /// <summary>The names given for a key; empty when the line has no such key.</summary>
    public ImmutableArray<string> this[CatalogueKey key]
    {
        get
        {
            foreach (var pair in _keys)
            {
                if (pair.Key == key)
                    return pair.Value;
            }

            return ImmutableArray<string>.Empty;
        }
    }

    /// <summary>Whether the key names this parameter. Use the parameter of the member the line was found for.</summary>
    public bool Names(CatalogueKey key, string parameter) => this[key].Contains(parameter);

    /// <summary>Whether the key names the instance the member is called on.</summary>
    public bool NamesThis(CatalogueKey key) => Names(key, "this");

    /// <summary>Whether the key names the result.</summary>
    public bool NamesReturn(CatalogueKey key) => Names(key, "return");

    public override string ToString() => Id + (AllOverloads ? "(*)" : string.Empty) + " = " + CatalogueGrammar.NameOf(Effect);

    private string? Word(CatalogueKey key)
    {
        var words = this[key];
        return words.IsEmpty ? null : words[0];
    }
}
