using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.CodeFixes.Choosing;

/// <summary>One part of what became of a candidate: the candidate itself, its model, its score.</summary>
internal sealed class SequencePart
{
    public SequencePart(string? member, ExpressionSyntax value, string? access, bool depends, bool onTest)
    {
        Member = member;
        Value = value;
        Access = access;
        Depends = depends;
        OnTest = onTest;
    }

    public string? Member { get; }

    public ExpressionSyntax Value { get; }

    /// <summary>Code that reads the part of the winner; null when nothing does.</summary>
    public string? Access { get; }

    /// <summary>Whether it changes with the rows, so that it is made anew for the winner.</summary>
    public bool Depends { get; }

    /// <summary>Whether it comes from the test rows: a score.</summary>
    public bool OnTest { get; }

    /// <summary>The part is the whole element, made by one call.</summary>
    public bool IsWhole { get; init; }

    /// <summary>The variable that holds the part made anew.</summary>
    public string? Name { get; set; }

    public bool Written { get; set; }
}
