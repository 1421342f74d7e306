using System.Collections.Immutable;

namespace Tare.Analyzers.Flow;

[Flags]
internal enum Traits
{
    None = 0,

    /// <summary>A p-value, or a tail probability that stands for one.</summary>
    PValue = 1,

    /// <summary>Corrected for the number of comparisons: an adjusted p-value, or a level derived from a count.</summary>
    Corrected = 2,

    /// <summary>A level by its name, whatever its value.</summary>
    NamedLevel = 4,

    /// <summary>Drawn at random where it stands.</summary>
    Random = 8,

    /// <summary>A tail or cumulative probability of a distribution.</summary>
    Tail = 16,

    /// <summary>Text made for a reader.</summary>
    Text = 32,

    /// <summary>The smallest or largest of a family.</summary>
    Extreme = 64,

    /// <summary>Came out of an array, a field or an object, as what was learned does; a passing statistic does not.</summary>
    Stored = 128,
}

/// <summary>What is known of one value. Immutable; <see cref="Join"/> gives what holds on either path.</summary>
internal sealed record Value
{
    private const int MostSites = 32;
    private const int MostTags = 64;

    public static readonly Value Empty = new();

    /// <summary>Rows it depends on (<see cref="Tag"/>).</summary>
    public IdSet Tags { get; init; }

    /// <summary>Origins (loops, sequences) it differs with as a candidate does.</summary>
    public IdSet Varies { get; init; }

    /// <summary>Origins it differs with only because they index into rows.</summary>
    public IdSet Indexed { get; init; }

    /// <summary>Choices that it won.</summary>
    public IdSet Wins { get; init; }

    /// <summary>Where scores that it depends on were computed.</summary>
    public IdSet Sites { get; init; }

    /// <summary>Heap objects it may be.</summary>
    public IdSet Objects { get; init; }

    /// <summary>Models a prediction was made with, so that a step of learning finds them.</summary>
    public IdSet Models { get; init; }

    /// <summary>Functions it may be.</summary>
    public IdSet Closures { get; init; }

    /// <summary>Comparisons whose outcome it is.</summary>
    public IdSet Compares { get; init; }

    public Traits Traits { get; init; }

    /// <summary>The constant it is, when it is one.</summary>
    public double? Number { get; init; }

    /// <summary>When it is the size of something: the C# text that computes it.</summary>
    public string? CountText { get; init; }

    /// <summary>The text it is, when it is a short constant.</summary>
    public string? Label { get; init; }

    /// <summary>Members held by value: tuple elements, anonymous members.</summary>
    public ImmutableDictionary<string, Value>? Fields { get; init; }

    public bool IsEmpty =>
        ReferenceEquals(this, Empty)
        || (Tags.IsEmpty && Varies.IsEmpty && Indexed.IsEmpty && Wins.IsEmpty && Sites.IsEmpty && Objects.IsEmpty && Models.IsEmpty
            && Closures.IsEmpty && Compares.IsEmpty && Traits == Traits.None && Number is null && CountText is null && Label is null && Fields is null);

    public bool Has(Traits trait) => (Traits & trait) != 0;

    public Value With(
        IdSet? tags = null, IdSet? varies = null, IdSet? indexed = null, IdSet? wins = null, IdSet? sites = null, IdSet? objects = null,
        IdSet? models = null, IdSet? closures = null, IdSet? compares = null, Traits? traits = null, ImmutableDictionary<string, Value>? fields = null) =>
        this with
        {
            Tags = tags ?? Tags,
            Varies = varies ?? Varies,
            Indexed = indexed ?? Indexed,
            Wins = wins ?? Wins,
            Sites = sites ?? Sites,
            Objects = objects ?? Objects,
            Models = models ?? Models,
            Closures = closures ?? Closures,
            Compares = compares ?? Compares,
            Traits = traits ?? Traits,
            Fields = fields ?? Fields,
        };

    /// <summary>Without the members held by value.</summary>
    public Value Flat() => Fields is null ? this : this with { Fields = null };

    /// <summary>The same data without what it may be called or compared as.</summary>
    public Value Data() => Closures.IsEmpty && Compares.IsEmpty && Number is null && CountText is null
        ? this
        : this with { Closures = IdSet.Empty, Compares = IdSet.Empty, Number = null, CountText = null, Label = null };

    public Value Join(Value other)
    {
        if (ReferenceEquals(this, other) || other.IsEmpty)
            return other.IsEmpty && Number is not null && !ReferenceEquals(this, other) ? WithoutNumber() : this;
        if (IsEmpty)
            return other.Number is not null ? other.WithoutNumber() : other;
        return new Value
        {
            Tags = Tags.Union(other.Tags).AtMost(MostTags),
            Varies = Varies.Union(other.Varies),
            Indexed = Indexed.Union(other.Indexed),
            Wins = Wins.Union(other.Wins),
            Sites = Sites.Union(other.Sites).AtMost(MostSites),
            Objects = Objects.Union(other.Objects),
            Models = Models.Union(other.Models).AtMost(MostSites),
            Closures = Closures.Union(other.Closures),
            Over = Over.Union(other.Over),
            Compares = Compares.Union(other.Compares),
            Traits = (Traits | other.Traits) & ~Traits.Corrected | (Traits & other.Traits & Traits.Corrected),
            Number = Number == other.Number ? Number : null,
            CountText = CountText == other.CountText ? CountText : null,
            Label = Label == other.Label ? Label : null,
            Fields = JoinFields(Fields, other.Fields),
        };
    }

    /// <summary>A value computed from both.</summary>
    public Value Combine(Value other)
    {
        if (ReferenceEquals(this, Empty))
            return other.Data();
        if (ReferenceEquals(other, Empty))
            return Data();
        return new Value
        {
            Tags = Tags.Union(other.Tags).AtMost(MostTags),
            Varies = Varies.Union(other.Varies),
            Indexed = Indexed.Union(other.Indexed),
            Wins = Wins.Union(other.Wins),
            Sites = Sites.Union(other.Sites).AtMost(MostSites),
            Models = Models.Union(other.Models).AtMost(MostSites),
            Over = Over.Union(other.Over),
            Traits = Traits | other.Traits,
        };
    }

    /// <summary>Adds origins to the value and to what it holds by value.</summary>
    public Value Varying(IdSet origins)
    {
        if (origins.IsEmpty || Varies.ContainsAll(origins) && Fields is null)
            return this;
        return With(varies: Varies.Union(origins), fields: Fields is null ? null : MapFields(f => f.Varying(origins)));
    }

    public Value Winning(IdSet choices)
    {
        if (choices.IsEmpty || Wins.ContainsAll(choices) && Fields is null)
            return this;
        return With(wins: Wins.Union(choices), fields: Fields is null ? null : MapFields(f => f.Winning(choices)));
    }

    public Value Tagged(IdSet tags) => Tags.ContainsAll(tags) ? this : With(tags: Tags.Union(tags));

    /// <summary>Marks the extreme of a family; <paramref name="over"/> is what it was the smallest over.</summary>
    public Value Extremal(IdSet over) => this with { Over = Over.Union(over), Traits = Traits | Traits.Extreme };

    public Value Labelled(string label) => this with { Label = label };

    public ImmutableDictionary<string, Value> MapFields(Func<Value, Value> map)
    {
        var builder = ImmutableDictionary.CreateBuilder<string, Value>(StringComparer.Ordinal);
        foreach (var pair in Fields!)
            builder[pair.Key] = map(pair.Value);
        return builder.ToImmutable();
    }

    /// <summary>Origins that an extreme was taken over.</summary>
    public IdSet Over { get; init; }

    public bool Same(Value other)
    {
        if (ReferenceEquals(this, other))
            return true;
        if (!Tags.Equals(other.Tags) || !Varies.Equals(other.Varies) || !Indexed.Equals(other.Indexed) || !Wins.Equals(other.Wins)
            || !Sites.Equals(other.Sites) || !Objects.Equals(other.Objects) || !Models.Equals(other.Models) || !Closures.Equals(other.Closures)
            || !Compares.Equals(other.Compares) || Traits != other.Traits || Number != other.Number || (Fields is null) != (other.Fields is null))
            return false;
        if (Fields is null)
            return true;
        if (Fields.Count != other.Fields!.Count)
            return false;
        foreach (var pair in Fields)
        {
            if (!other.Fields.TryGetValue(pair.Key, out var theirs) || !pair.Value.Same(theirs))
                return false;
        }

        return true;
    }

    private Value WithoutNumber() => this with { Number = null, Label = null };

    private static ImmutableDictionary<string, Value>? JoinFields(ImmutableDictionary<string, Value>? a, ImmutableDictionary<string, Value>? b)
    {
        if (a is null || b is null || ReferenceEquals(a, b))
            return a ?? b;
        foreach (var pair in b)
            a = a.SetItem(pair.Key, a.TryGetValue(pair.Key, out var mine) ? mine.Join(pair.Value) : pair.Value);
        return a;
    }
}
