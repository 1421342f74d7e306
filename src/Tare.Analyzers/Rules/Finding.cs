using System.Collections.Immutable;
using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Rules;

/// <summary>A diagnostic before it is bound to a document.</summary>
internal sealed class Finding
{
    private readonly List<(string Label, SyntaxNode Syntax)> _places = new();

    public Finding(DiagnosticDescriptor rule, SyntaxNode place, string message)
    {
        Rule = rule;
        Place = place;
        Message = message;
    }

    public DiagnosticDescriptor Rule { get; }

    public SyntaxNode Place { get; }

    public string Message { get; }

    public Dictionary<string, string?> Properties { get; } = new(StringComparer.Ordinal);

    public Finding Beside(string label, SyntaxNode? syntax)
    {
        if (syntax is not null && !_places.Any(p => p.Label == label && p.Syntax == syntax))
            _places.Add((label, syntax));
        return this;
    }

    public Finding With(string key, string? value)
    {
        if (!string.IsNullOrEmpty(value))
            Properties["tare." + key] = value;
        return this;
    }

    public Location Location => Spot(Place);

    public Diagnostic ToDiagnostic()
    {
        Properties["tare.places"] = string.Join(",", _places.Select(p => p.Label));
        return Diagnostic.Create(Rule, Location, _places.Select(p => Spot(p.Syntax)), Properties.ToImmutableDictionary(), Message);
    }

    /// <summary>The narrowest telling span: a loop is marked at its keyword and header, a declaration at its name.</summary>
    private static Location Spot(SyntaxNode syntax) => Location.Create(syntax.SyntaxTree, Places.SpanOf(syntax));
}
