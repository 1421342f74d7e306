using System.Collections.Concurrent;
using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.Analyzers.Flow;
using Tare.Analyzers.Knowledge;
using Tare.Analyzers.Rules;

namespace Tare.Analyzers;

/// <summary>
/// One compilation's analysis. A document's findings come from the walks of every unit (a type, or the top-level program)
/// whose names lead to the document; each unit is walked once.
/// </summary>
internal sealed class Session
{
    private const int Budget = 30_000;

    private readonly Bodies _bodies;
    private readonly Units _units;
    private readonly Catalogue _catalogue;
    private readonly Vocabulary _vocabulary;
    private readonly FlowOptions _options;
    private readonly ImmutableArray<IRule> _rules = AllRules.Create();
    private readonly ConcurrentDictionary<ISymbol, Lazy<UnitResult>> _results = new(SymbolEqualityComparer.Default);

    public Session(Compilation compilation, Settings settings, CancellationToken cancellation)
    {
        _catalogue = settings.Catalogue;
        _vocabulary = settings.Vocabulary;
        _options = settings.Options;
        _bodies = new Bodies(compilation, cancellation);
        _units = new Units(compilation, new Gate(_vocabulary, _catalogue));
    }

    public IReadOnlyList<Finding> FindingsIn(SemanticModel model, CancellationToken cancellation)
    {
        var relevant = _units.LeadingTo(model.SyntaxTree, cancellation);
        if (relevant.Count == 0)
            return Array.Empty<Finding>();
        _bodies.Use(model);
        var all = new List<Finding>();
        var reached = new HashSet<ISymbol>(SymbolEqualityComparer.Default);
        var done = new List<UnitResult>();
        foreach (var type in relevant)
        {
            cancellation.ThrowIfCancellationRequested();
            done.Add(Walk(type));
        }

        foreach (var result in done)
            reached.UnionWith(result.Reached);
        foreach (var result in done)
        {
            foreach (var (finding, root) in result.Findings)
            {
                // a method that was followed from its callers speaks through them
                if (root is not null && reached.Contains(root))
                    continue;
                if (finding.Place.SyntaxTree == model.SyntaxTree)
                    all.Add(finding);
            }
        }

        return Settle(all);
    }

    /// <summary>The facts that the walks leading to a document hold, for one line or all.</summary>
    public string Explain(SemanticModel model, int? line, CancellationToken cancellation)
    {
        _bodies.Use(model);
        var text = new System.Text.StringBuilder();
        bool Wanted(SyntaxNode node)
        {
            if (node.SyntaxTree != model.SyntaxTree)
                return false;
            var span = node.GetLocation().GetLineSpan();
            return line is null || (span.StartLinePosition.Line + 1 <= line && span.EndLinePosition.Line + 1 >= line);
        }

        foreach (var type in _units.LeadingTo(model.SyntaxTree, cancellation))
        {
            foreach (var reading in Walk(type).Readings)
            {
                string facts = Explanation.Of(reading, Wanted);
                if (facts.Length > 0)
                    text.AppendLine($"-- {type.Name}").Append(facts);
            }
        }

        return text.ToString();
    }

    /// <summary>One finding a place and rule; several rules at one place stay.</summary>
    private static List<Finding> Settle(List<Finding> findings)
    {
        var settled = new List<Finding>();
        foreach (var group in findings.GroupBy(f => (f.Rule.Id, f.Location.SourceSpan)).OrderBy(g => g.Key.SourceSpan.Start).ThenBy(g => g.Key.Id, StringComparer.Ordinal))
        {
            settled.Add(group.OrderByDescending(f => f.Properties.ContainsKey("tare.k")).ThenByDescending(f => double.TryParse(f.Properties.TryGetValue("tare.k", out var k) ? k : null, System.Globalization.NumberStyles.Float, System.Globalization.CultureInfo.InvariantCulture, out double v) ? v : 0).ThenBy(f => f.Message, StringComparer.Ordinal).First());
        }

        // where a claim on test rows stands, the weaker one does not
        settled.RemoveAll(f => f.Rule.Id == "TARE108" && settled.Any(o => o.Rule.Id == "TARE102" && o.Location.SourceSpan == f.Location.SourceSpan));
        return settled;
    }

    private UnitResult Walk(INamedTypeSymbol type) =>
        _results.GetOrAdd(type, t => new Lazy<UnitResult>(() => WalkUnit((INamedTypeSymbol)t))).Value;

    private UnitResult WalkUnit(INamedTypeSymbol type)
    {
        var result = new UnitResult();
        var methods = Units.MethodsOf(type).Where(m => _bodies.Of(m) is not null).ToList();
        // entry points stand for themselves: their state is their own
        foreach (var entry in methods.Where(IsEntry).ToList())
        {
            methods.Remove(entry);
            var facts = new Facts();
            var walker = new Walker(_bodies, _catalogue, _vocabulary, facts, Budget);
            walker.Root(entry, entry.IsStatic ? Value.Empty : Instance(walker, type));
            Read(facts, result, null);
        }

        var calledWithin = result.Reached;
        var rest = methods.Where(m => !calledWithin.Contains(m)).ToList();
        if (rest.Count == 0)
            return result;
        // the type as a whole: constructors first, then every method, twice, on one object that they share
        var order = rest.OrderBy(m => m.MethodKind == MethodKind.Constructor ? 0 : m.DeclaredAccessibility == Accessibility.Private ? 2 : 1).ToList();
        var found = new List<(Finding, ISymbol?)>();
        var seen = new HashSet<ISymbol>(SymbolEqualityComparer.Default);
        var shared = new Facts();
        var walk = new Walker(_bodies, _catalogue, _vocabulary, shared, Budget);
        var instance = Instance(walk, type);
        for (int pass = 0; pass < 2; pass++)
        {
            foreach (var method in order)
            {
                if (method.DeclaredAccessibility == Accessibility.Private && method.MethodKind != MethodKind.Constructor && shared.Reached.Contains(method))
                    continue;
                walk.Root(method, method.IsStatic ? Value.Empty : instance);
                seen.Add(method);
            }

            if (order.All(m => m.IsStatic) || type.IsStatic)
                break;
        }

        Read(shared, result, seen);
        return result;
    }

    private static Value Instance(Walker walker, INamedTypeSymbol type)
    {
        var o = walker.InstanceOf(type);
        return new Value { Objects = IdSet.Of(o.Id) };
    }

    private void Read(Facts facts, UnitResult result, HashSet<ISymbol>? roots)
    {
        result.Reached.UnionWith(facts.Reached);
        if (facts.OverBudget)
            result.OverBudget = true;
        var reading = new Reading(facts, _options);
        result.Readings.Add(reading);
        foreach (var rule in _rules)
        {
            foreach (var finding in rule.Find(reading))
                result.Findings.Add((finding, roots is null ? null : RootOf(finding, roots)));
        }
    }

    /// <summary>The root method that a finding's place stands in.</summary>
    private ISymbol? RootOf(Finding finding, HashSet<ISymbol> roots)
    {
        foreach (var root in roots)
        {
            foreach (var reference in root.DeclaringSyntaxReferences)
            {
                if (reference.SyntaxTree == finding.Place.SyntaxTree && reference.Span.Contains(finding.Place.Span))
                    return root;
            }
        }

        return null;
    }

    private static bool IsEntry(IMethodSymbol method)
    {
        if (method.Name is "Main" or "<Main>$" && method.IsStatic)
            return true;
        foreach (var attribute in method.GetAttributes())
        {
            if (attribute.AttributeClass?.Name is "FactAttribute" or "TheoryAttribute" or "TestAttribute" or "TestMethodAttribute" or "TestCaseAttribute" or "DataTestMethodAttribute" or "BenchmarkAttribute")
                return true;
        }

        return false;
    }

    private sealed class UnitResult
    {
        public List<(Finding Finding, ISymbol? Root)> Findings { get; } = new();

        public List<Reading> Readings { get; } = new();

        public HashSet<ISymbol> Reached { get; } = new(SymbolEqualityComparer.Default);

        public bool OverBudget { get; set; }
    }
}
