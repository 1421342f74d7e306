using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>Which rows candidates are fitted and scored on from now on.</summary>
internal sealed class RowsPlan
{
    private readonly Dictionary<string, string> _replaced = new(StringComparer.Ordinal);

    /// <summary>Statements that hold the validation rows out; none when validation rows are there already.</summary>
    public List<string> Lines { get; } = new();

    public string? Using { get; private set; }

    public bool HoldsOut => Lines.Count > 0;

    public string Title { get; private set; } = "";

    /// <summary>Reads the rows of a choice off the code that fits and scores a candidate.</summary>
    public static RowsPlan? Of(Scene scene, IReadOnlyList<SyntaxNode> turn)
    {
        var rows = Distinct(turn.SelectMany(scene.RowsIn).Select(r => r.Rows));
        var test = rows.Where(r => r.Role == RowsRole.Test).ToList();
        var training = rows.Where(r => r.Role == RowsRole.Training).ToList();
        if (test.Count == 0)
            return null;
        var plan = new RowsPlan();
        var validation = Distinct(InScope(scene, turn[0], RowsRole.Validation));
        if (validation.Count > 0 && HeldOutRows.Pair(test, validation) is { } pairs)
        {
            foreach (var pair in pairs)
                plan._replaced[pair.Key.Text] = pair.Value.Text;
            plan.Title = $"Choose on validation rows '{pairs[test[0]].Text}'";
            return plan;
        }

        if (training.Count == 0)
            return null;

        // Parallel training rows stay parallel: what is cut with one of them is cut with all.
        foreach (var parallel in InScope(scene, turn[0], RowsRole.Training))
        {
            if (training.All(t => t.Text != parallel.Text) && test.Any(t => t.Stem == parallel.Stem) && training.All(t => t.Stem != parallel.Stem))
                training.Add(parallel);
        }

        if (HeldOutRows.Of(scene, training, test) is not { } held)
            return null;
        foreach (var pair in held.Fit.Concat(held.Valid))
            plan._replaced[pair.Key] = pair.Value;
        plan.Lines.AddRange(held.Lines);
        plan.Using = held.Using;
        plan.Title = $"Choose on rows held out of '{training[0].Text}'";
        return plan;
    }

    /// <summary>Exchanges the rows in a region for those that choose.</summary>
    public void Replace(Scene scene, SyntaxNode region, Edits edits)
    {
        foreach (var (syntax, rows) in scene.RowsIn(region))
        {
            if (_replaced.TryGetValue(rows.Text, out string? other))
                edits.Replace(syntax, other);
        }
    }

    private static List<RowsReference> Distinct(IEnumerable<RowsReference> rows) => rows.GroupBy(r => r.Text).Select(g => g.First()).ToList();

    /// <summary>Rows of a role that the method names before a place, or that its parameters and variables hold.</summary>
    private static List<RowsReference> InScope(Scene scene, SyntaxNode place, RowsRole role)
    {
        var found = scene.RowsIn(scene.Frame).Where(r => r.Rows.Role == role && IsSeen(scene, r.Rows, place)).Select(r => r.Rows).ToList();
        foreach (var symbol in scene.Model.LookupSymbols(place.SpanStart))
        {
            if (symbol is not (ILocalSymbol or IParameterSymbol or IFieldSymbol) || symbol is ILocalSymbol local && local.DeclaringSyntaxReferences[0].Span.Start > place.SpanStart)
                continue;
            if (scene.RowsNamed(symbol) is { } rows && rows.Role == role)
                found.Add(rows);
        }

        return Distinct(found);
    }

    private static bool IsSeen(Scene scene, RowsReference rows, SyntaxNode place) => rows.Symbol switch
    {
        ILocalSymbol or IParameterSymbol => scene.Model.LookupSymbols(place.SpanStart, name: rows.Symbol.Name).Contains(rows.Symbol, SymbolEqualityComparer.Default)
            && rows.Symbol.DeclaringSyntaxReferences[0].Span.Start < place.SpanStart,
        _ => rows.Text.Split('.') is { Length: > 1 } parts
            ? scene.Model.LookupSymbols(place.SpanStart, name: parts[0]).Any(s => s is not ILocalSymbol l || l.DeclaringSyntaxReferences[0].Span.Start < place.SpanStart) || parts[0] == "this"
            : true,
    };
}
