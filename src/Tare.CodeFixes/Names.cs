using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;

namespace Tare.CodeFixes;

/// <summary>Names that nothing in a method, nor anything it can see by a simple name, has yet.</summary>
internal sealed class Names
{
    private readonly HashSet<string> _taken;

    public Names(SyntaxNode frame, SemanticModel model)
    {
        _taken = new HashSet<string>(frame.DescendantTokens().Where(t => t.IsKind(SyntaxKind.IdentifierToken)).Select(t => t.ValueText), StringComparer.Ordinal);
        foreach (var symbol in model.LookupSymbols(frame.SpanStart))
        {
            if (symbol is ILocalSymbol or IParameterSymbol or IFieldSymbol or IPropertySymbol)
                _taken.Add(symbol.Name);
        }
    }

    public string Free(params string[] wanted)
    {
        foreach (string name in wanted)
        {
            if (SyntaxFacts.GetKeywordKind(name) == SyntaxKind.None && _taken.Add(name))
                return name;
        }

        for (int i = 2; ; i++)
        {
            if (_taken.Add(wanted[0] + i))
                return wanted[0] + i;
        }
    }

    /// <summary>Several names that go together: all get the same ending where one is taken.</summary>
    public string[] FreeTogether(IReadOnlyList<string> wanted)
    {
        for (int i = 1; ; i++)
        {
            var names = wanted.Select(w => i == 1 ? w : w + i).ToArray();
            if (names.Distinct().Count() != names.Length || names.Any(n => _taken.Contains(n) || SyntaxFacts.GetKeywordKind(n) != SyntaxKind.None))
                continue;
            _taken.UnionWith(names);
            return names;
        }
    }
}
