using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Flow;

/// <summary>A call that is being followed, or the root.</summary>
internal sealed class Frame
{
    public Frame(Frame? parent, IMethodSymbol? method, SyntaxNode? call, bool isFunction)
    {
        Parent = parent;
        Method = method;
        Call = call;
        IsFunction = isFunction;
        Chain = parent is null ? 17 : unchecked((parent.Chain * 31) + (call?.SpanStart ?? 0) + (call?.SyntaxTree.GetHashCode() ?? 0));
        Level = parent is null ? 0 : parent.Level + 1;
    }

    public Frame? Parent { get; }

    public IMethodSymbol? Method { get; }

    /// <summary>The call in the parent's body.</summary>
    public SyntaxNode? Call { get; }

    /// <summary>A lambda or local function: what it captures belongs to the frame around it.</summary>
    public bool IsFunction { get; }

    /// <summary>Tells chains of calls apart.</summary>
    public int Chain { get; }

    public int Level { get; }

    public Value This { get; set; } = Value.Empty;

    public Value? Return { get; set; }

    public HeapObject? Yields { get; set; }

    public int LoopDepth { get; set; }

    public int GuardDepth { get; set; }

    /// <summary>Rows that came in through parameters whose names say nothing about them.</summary>
    public IdSet NeutralRows { get; set; }

    /// <summary>Rows that came in through a declared or telling parameter, or through <c>this</c>.</summary>
    public IdSet EvidentRows { get; set; }
}

/// <summary>Two quantities held against each other.</summary>
internal sealed record Comparison(int Id, IOperation Operation, Value Left, Value Right, string? LeftName, string? RightName, bool LeftSmaller, Frame Frame, int LoopDepth, bool Equality);

internal enum ChoiceKind
{
    /// <summary>A comparison decides which candidate survives.</summary>
    Comparison,

    /// <summary>A call returns the extreme element.</summary>
    Call,

    /// <summary>Only the extreme score is kept.</summary>
    Extreme,
}

/// <summary>A candidate taken because of its score.</summary>
internal sealed class Choice
{
    public Choice(int id, ChoiceKind kind, SyntaxNode place, Frame frame, int order)
    {
        Id = id;
        Kind = kind;
        Place = place;
        Frame = frame;
        Order = order;
    }

    public int Id { get; }

    public ChoiceKind Kind { get; set; }

    public SyntaxNode Place { get; set; }

    public Frame Frame { get; }

    public int Order { get; set; }

    /// <summary>The origins whose candidates are compared; empty for two candidates in a straight line.</summary>
    public IdSet Family { get; set; }

    /// <summary>Origins that differ only in what they index: candidates when a fitted model is involved.</summary>
    public IdSet Weak { get; set; }

    /// <summary>Rows over which the score was computed.</summary>
    public IdSet Rows { get; set; }

    public IdSet Sites { get; set; }

    /// <summary>Origins by which only the rows differ.</summary>
    public IdSet RowFamily { get; set; }

    /// <summary>Something beside the score survives.</summary>
    public bool Kept { get; set; }

    public bool LowerWins { get; set; }

    public string? ScoreName { get; set; }

    public int StraightCount { get; set; }

    public double? Size { get; set; }

    public bool IsPValue { get; set; }

    /// <summary>Loops still running around the place whose origins the rows differ with.</summary>
    public IdSet Running { get; set; }
}

/// <summary>A value that leaves the program.</summary>
internal sealed record Claim(SyntaxNode Place, Value Value, Frame Frame, int Order, IdSet Running, string? Name);

/// <summary>A model learned from some rows is applied to others.</summary>
internal sealed record Meeting(int Fitted, int Scored, IdSet Varies, IdSet Wins, int Order, bool Stored);

/// <summary>A quantity over rows came into being.</summary>
internal sealed record Birth(int Site, SyntaxNode Place, int Rows, IdSet Wins, int Order, Frame Frame);

/// <summary>A p-value held against a level.</summary>
internal sealed record LevelTest(SyntaxNode Place, Value P, Value Level, IdSet Family, Frame Frame, string? PName, string? LevelName, int Order)
{
    public bool Conjunction { get; set; }

    public bool Kept { get; set; }
}
