using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>A choice between two candidates in straight-line code: <c>accA > accB ? a : b</c>, or the same as an <c>if</c>.</summary>
internal sealed class StraightChoice
{
    private readonly Scene _scene;
    private readonly Edits _edits;
    private readonly Winner _winner;
    private readonly Renderer _renderer;
    private readonly TwoWays _ways;

    private StraightChoice(Scene scene, Edits edits, TwoWays ways)
    {
        _scene = scene;
        _edits = edits;
        _winner = new Winner(scene, edits);
        _renderer = _winner.Renderer;
        _ways = ways;
    }

    public static string? Rewrite(Scene scene, Edits edits) => TwoWays.Of(scene) is { } ways ? new StraightChoice(scene, edits, ways).Rewrite() : null;

    private string? Rewrite()
    {
        var statement = _ways.Statement;
        if (Code.Siblings(statement).Count == 0)
            return null;
        var both = SliceOf(new SyntaxNode[] { _ways.ScoreIfTrue, _ways.ScoreIfFalse }.Concat(_ways.Values.SelectMany(v => new SyntaxNode[] { v.IfTrue, v.IfFalse })));
        var turn = both.Nodes.Where(UsesRows).ToList();
        if (InCondition())
            turn.Add(_ways.Condition);
        if (turn.Count == 0 || RowsPlan.Of(_scene, turn) is not { } plan)
            return null;
        foreach (var node in turn)
            plan.Replace(_scene, node, _edits);
        if (plan.HoldsOut && UsedLater(both))
            return null;
        var first = turn.OfType<StatementSyntax>().Where(n => plan.HoldsOut && _scene.Mentions(n, RowsRole.Training)).FirstOrDefault() ?? statement;

        // What depends on the rows has to be made anew; the rest of the winner stays.
        var lines = new List<string>();
        var anew = _ways.Values.Where(v => Changes(v.IfTrue, plan.HoldsOut) || Changes(v.IfFalse, plan.HoldsOut)).ToList();
        string scoreName = _ways.Values.FirstOrDefault(IsScore)?.Target ?? CommonName(_ways.ScoreIfTrue.ToString(), _ways.ScoreIfFalse.ToString());
        string test = _scene.Names.Free(Winner.TestName(scoreName, _ways.ScoreIfTrue));
        string type = _scene.Model.GetTypeInfo(_ways.ScoreIfTrue).Type!.ToMinimalDisplayString(_scene.Model, statement.SpanStart);
        string condition = InCondition() ? "" : _ways.ConditionText;
        if (condition.Length == 0)
            return null;
        var models = anew.Where(v => !IsScore(v)).ToList();
        string? yes = Inline(_ways.ScoreIfTrue, models, v => v.IfTrue, plan.HoldsOut), no = Inline(_ways.ScoreIfFalse, models, v => v.IfFalse, plan.HoldsOut);
        var made = models.Select(m => (m.Target, Yes: Inline(m.IfTrue, [], v => v.IfTrue, plan.HoldsOut), No: Inline(m.IfFalse, [], v => v.IfFalse, plan.HoldsOut))).ToList();
        if (yes is not null && no is not null && made.All(m => m.Yes is not null && m.No is not null))
        {
            foreach (var (target, ifTrue, ifFalse) in made)
                lines.Add($"{target} = {condition} ? {ifTrue} : {ifFalse};");
            lines.Add(yes == no ? $"{type} {test} = {yes};" : $"{type} {test} = {condition} ? {yes} : {no};");
        }
        else
        {
            string indent = Code.IndentOf(statement);
            lines.Add($"{type} {test};");
            lines.Add($"if ({condition})");
            Block(_ways.ScoreIfTrue, models.Select(m => (m.Target, m.IfTrue)), test, indent, plan.HoldsOut, lines);
            lines.Add("else");
            Block(_ways.ScoreIfFalse, models.Select(m => (m.Target, m.IfFalse)), test, indent, plan.HoldsOut, lines);
        }

        foreach (var score in _ways.Values.Where(IsScore))
        {
            if (score.Symbol is ILocalSymbol local)
                _winner.RenameLater(local, statement, test);
            else
                lines.Add($"{score.Target} = {test};");
        }

        ReplaceExtremes(test);
        _winner.InsertBefore(first, plan.Lines);
        _winner.InsertAfter(statement, lines);
        if (plan.Using is { } needed)
            _edits.Usings.Add(needed);
        return plan.Title;
    }

    private bool UsesRows(SyntaxNode node) => _scene.RowsIn(node).Any(r => r.Rows.Role is RowsRole.Test or RowsRole.Training) && !DeclaresRows(node);

    // Cutting rows is no turn of a candidate.
    private bool DeclaresRows(SyntaxNode node) => node is LocalDeclarationStatementSyntax declaration
        && declaration.Declaration.Variables.Any(v => _scene.Model.GetDeclaredSymbol(v) is { } s && _scene.RowsNamed(s) is not null);

    private bool InCondition() => _scene.RowsIn(_ways.Condition).Any();

    private Slice SliceOf(IEnumerable<SyntaxNode> values)
    {
        var slice = new Slice(_scene, static _ => false);
        foreach (var value in values)
            slice.Need(value);
        slice.Back(_ways.Statement, _scene.Frame);
        return slice;
    }

    private bool Changes(ExpressionSyntax value, bool refit) =>
        SliceOf(new[] { value }).Nodes.Append(value).Where(n => n == value || UsesRows(n)).SelectMany(_scene.RowsIn).Any(r => r.Rows.Role == RowsRole.Test || (refit && r.Rows.Role == RowsRole.Training));

    private bool IsScore(TwoWaysValue value) => Code.Key(value.IfTrue) == Code.Key(_ways.ScoreIfTrue) && Code.Key(value.IfFalse) == Code.Key(_ways.ScoreIfFalse);

    /// <summary>Statements that run again for a value: those that rows reach.</summary>
    private List<SyntaxNode> TurnOf(ExpressionSyntax value, bool refit)
    {
        var slice = SliceOf(new[] { value });
        var moved = new HashSet<ISymbol>(SymbolEqualityComparer.Default);
        foreach (var node in slice.Nodes)
        {
            bool rows = !DeclaresRows(node) && _scene.RowsIn(node).Any(r => r.Rows.Role == RowsRole.Test || (refit && r.Rows.Role == RowsRole.Training));
            var reads = new Slice(_scene, static _ => false);
            reads.Need(node);
            if (rows || reads.Needed.Any(moved.Contains))
                moved.UnionWith(slice.Defines(node).Where(d => d is not IFieldSymbol));
        }

        return slice.Nodes.Where(n => slice.Defines(n).Any(moved.Contains)).ToList();
    }

    /// <summary>The value as one expression; null when it takes statements.</summary>
    private string? Inline(ExpressionSyntax value, List<TwoWaysValue> models, Func<TwoWaysValue, ExpressionSyntax> way, bool refit)
    {
        var renderer = new Renderer(_scene);
        foreach (var model in models)
            renderer.Expressions[Code.Key(way(model))] = model.Target;
        foreach (var node in TurnOf(value, refit))
        {
            if (node is not LocalDeclarationStatementSyntax { UsingKeyword.RawKind: 0 } declaration)
                return null;
            foreach (var variable in declaration.Declaration.Variables)
            {
                if (variable.Initializer is null || _scene.Model.GetDeclaredSymbol(variable) is not { } symbol)
                    return null;
                if (renderer.Expressions.ContainsKey(symbol.Name))
                    continue;
                string text = renderer.Text(variable.Initializer.Value);
                renderer.Symbols[symbol] = variable.Initializer.Value is InvocationExpressionSyntax or IdentifierNameSyntax or MemberAccessExpressionSyntax or LiteralExpressionSyntax or ObjectCreationExpressionSyntax ? text : $"({text})";
                if (_scene.RowsIn(variable).Any() && TurnOf(value, refit).Append(value).Sum(n => n.DescendantNodesAndSelf().OfType<IdentifierNameSyntax>().Count(i => SymbolEqualityComparer.Default.Equals(_scene.Model.GetSymbolInfo(i).Symbol, symbol))) > 1)
                    return null;
            }
        }

        string result = renderer.Text(value);
        return result.IndexOf('\n') < 0 ? result : null;
    }

    private void Block(ExpressionSyntax score, IEnumerable<(string Target, ExpressionSyntax Value)> models, string test, string indent, bool refit, List<string> lines)
    {
        string inner = indent + _scene.Step, step = _scene.Step;
        var turn = TurnOf(score, refit);
        var wanted = models.ToList();
        foreach (var node in wanted.SelectMany(m => TurnOf(m.Value, refit)))
        {
            if (!turn.Contains(node))
                turn.Add(node);
        }

        turn.Sort((a, b) => a.SpanStart.CompareTo(b.SpanStart));
        var slice = SliceOf(new SyntaxNode[] { score }.Concat(wanted.Select(m => (SyntaxNode)m.Value)));
        var renderer = new Renderer(_scene)
        {
            // In a loop that scores both candidates only the winner's part is left.
            Drops = slice.IsIdle,
        };
        lines.Add("{");
        foreach (var node in turn)
        {
            var symbols = slice.Defines(node).Where(d => d is ILocalSymbol or IMethodSymbol { MethodKind: MethodKind.LocalFunction } && !renderer.Symbols.ContainsKey(d) && d.DeclaringSyntaxReferences[0].Span.IntersectsWith(node.Span) && IsTop(d, node)).ToList();
            if (node is LocalDeclarationStatementSyntax declaration)
            {
                foreach (var variable in declaration.Declaration.Variables)
                {
                    if (_scene.Model.GetDeclaredSymbol(variable) is not { } symbol || !slice.IsNeeded(symbol))
                        continue;
                    string? value = variable.Initializer is { } initializer ? renderer.Text(initializer.Value, inner) : null;
                    renderer.Symbols[symbol] = _winner.NameFor(symbol, variable.Initializer?.Value);
                    lines.Add(step + $"{declaration.Declaration.Type} {renderer.Symbols[symbol]}{(value is null ? "" : " = " + value)};");
                }

                continue;
            }

            foreach (var symbol in symbols)
                renderer.Symbols[symbol] = symbol is IMethodSymbol ? _scene.Names.Free("Winner" + RowsName.Upper(symbol.Name)) : _winner.NameFor(symbol, null);
            lines.Add(step + renderer.Text(node, inner));
        }

        foreach (var (target, value) in wanted)
            lines.Add(step + $"{target} = {renderer.Text(value, inner)};");
        lines.Add(step + $"{test} = {renderer.Text(score, inner)};");
        lines.Add("}");
    }

    private static bool IsTop(ISymbol symbol, SyntaxNode node) =>
        node is not (ForStatementSyntax or CommonForEachStatementSyntax) && symbol.DeclaringSyntaxReferences[0].GetSyntax() is var syntax && (syntax == node || syntax.FirstAncestorOrSelf<StatementSyntax>() == node);

    /// <summary>Something fitted here that is used after the choice, other than as the winner, would stay fitted on fewer rows.</summary>
    private bool UsedLater(Slice both)
    {
        var fitted = new HashSet<ISymbol>(both.Nodes.Where(n => !DeclaresRows(n) && _scene.Mentions(n, RowsRole.Training) && !_scene.Mentions(n, RowsRole.Test)).SelectMany(both.Defines).Where(d => d is not IFieldSymbol), SymbolEqualityComparer.Default);
        return _scene.Frame.DescendantNodes().OfType<IdentifierNameSyntax>()
            .Any(i => i.SpanStart > _ways.Statement.Span.End && _scene.Model.GetSymbolInfo(i).Symbol is { } symbol && fitted.Contains(symbol));
    }

    /// <summary>The better score, where it is taken once more: <c>Math.Max(accA, accB)</c>.</summary>
    private void ReplaceExtremes(string test)
    {
        string a = Code.Key(_ways.ScoreIfTrue), b = Code.Key(_ways.ScoreIfFalse);
        foreach (var expression in _scene.Frame.DescendantNodes().OfType<ExpressionSyntax>())
        {
            if (expression.SpanStart < _ways.Statement.Span.End)
                continue;
            string key = Code.Key(expression);
            if (key == $"Math.Max({a},{b})" || key == $"Math.Max({b},{a})" || key == $"Math.Min({a},{b})" || key == $"Math.Min({b},{a})"
                || expression is ConditionalExpressionSyntax other && (Code.Key(other.WhenTrue), Code.Key(other.WhenFalse)) is var two && (two == (a, b) || two == (b, a)))
                _edits.Replace(expression, test);
        }
    }

    /// <summary>What the names of both scores share: <c>accuracy</c> of accuracyA and accuracyB.</summary>
    private static string CommonName(string a, string b)
    {
        var shared = RowsName.Words(a).Intersect(RowsName.Words(b), StringComparer.OrdinalIgnoreCase).ToList();
        return string.Concat(shared.Select((w, i) => i == 0 ? RowsName.Lower(w) : RowsName.Upper(w)));
    }
}
