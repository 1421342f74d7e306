using System.Collections.Immutable;
using Microsoft.CodeAnalysis.Text;

namespace Tare.CodeFixes;

/// <summary>What one finding changes in its document.</summary>
internal sealed class Edit
{
    public Edit(params TextChange[] changes)
    {
        Changes = changes.ToImmutableArray();
    }

    public ImmutableArray<TextChange> Changes { get; }

    /// <summary>The new code names a type of the runtime library by its short name.</summary>
    public bool NeedsUsing { get; set; }

    public bool Overlaps(Edit other) =>
        Changes.Any(a => other.Changes.Any(b => a.Span.OverlapsWith(b.Span) || (a.Span.IsEmpty && b.Span.IsEmpty && a.Span == b.Span)));
}
