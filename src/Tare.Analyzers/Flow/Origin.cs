using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Flow;

/// <summary>Something that candidates differ with: a loop, or the elements of a sequence.</summary>
internal sealed class Origin
{
    public Origin(int id, SyntaxNode? syntax)
    {
        Id = id;
        Syntax = syntax;
    }

    public int Id { get; }

    public SyntaxNode? Syntax { get; }

    /// <summary>Rows that it goes through, so that it is a loop over rows and not over candidates for them.</summary>
    public IdSet Rows { get; set; }

    /// <summary>How many there are, when the code shows it.</summary>
    public double? Size { get; set; }

    /// <summary>C# text that computes the size.</summary>
    public string? CountText { get; set; }

    /// <summary>The user's name for what is gone through.</summary>
    public string? Name { get; set; }
}
