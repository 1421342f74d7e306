using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Text;

namespace Tare.CodeFixes.Choosing;

/// <summary>Changes to one document, each place changed once.</summary>
internal sealed class Edits
{
    private readonly Dictionary<TextSpan, string> _replaced = new();
    private readonly SortedDictionary<int, List<string>> _inserted = new();

    public HashSet<string> Usings { get; } = new(StringComparer.Ordinal);

    public void Replace(SyntaxNode node, string text) => _replaced[node.Span] = text;

    public void Replace(TextSpan span, string text) => _replaced[span] = text;

    public bool Replaces(TextSpan span) => _replaced.ContainsKey(span);

    public void Insert(int position, string text)
    {
        if (!_inserted.TryGetValue(position, out var texts))
            _inserted[position] = texts = new List<string>();
        texts.Add(text);
    }

    /// <summary>The changes in order. Where one lies inside another, the outer one holds.</summary>
    public List<TextChange> Changes()
    {
        var changes = new List<TextChange>();
        foreach (var pair in _replaced)
        {
            if (!_replaced.Keys.Any(other => other != pair.Key && other.Contains(pair.Key)))
                changes.Add(new TextChange(pair.Key, pair.Value));
        }

        foreach (var pair in _inserted)
            changes.Add(new TextChange(new TextSpan(pair.Key, 0), string.Concat(pair.Value)));
        return changes.OrderBy(c => c.Span.Start).ThenBy(c => c.Span.End).ToList();
    }
}
