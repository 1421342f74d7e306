using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>A choice from a sequence of candidates or of what became of them: <c>results.OrderBy(r => r.Error).First()</c>.</summary>
internal sealed class SequenceChoice
{
    private readonly Scene _scene;
    private readonly Edits _edits;
    private readonly Pick _pick;
    private readonly Winner _winner;
    private readonly Renderer _renderer;
    private readonly List<SequencePart> _parts = new();

    private SequenceChoice(Scene scene, Edits edits, Pick pick)
    {
        _scene = scene;
        _edits = edits;
        _pick = pick;
        _winner = new Winner(scene, edits);
        _renderer = _winner.Renderer;
    }

    public static string? Rewrite(Scene scene, Edits edits) => Pick.Of(scene) is { } pick ? new SequenceChoice(scene, edits, pick).Rewrite() : null;

    private ElementTurn Turn => _pick.Turn;

    private string? Rewrite()
    {
        if (Turn.Region.FirstAncestorOrSelf<StatementSyntax>() is not { } family || Code.Siblings(family).Count == 0 || Code.Siblings(_pick.Statement).Count == 0)
            return null;
        var outside = _scene.Mentions(Turn.Region, RowsRole.Training) ? new List<StatementSyntax>() : _winner.FitsBefore(family);
        if (RowsPlan.Of(_scene, outside.Append(Turn.Region).ToList()) is not { } plan)
            return null;
        if (!plan.HoldsOut)
            outside.Clear();
        foreach (var region in outside.Append(Turn.Region))
            plan.Replace(_scene, region, _edits);
        var dependence = new Dependence(_scene, Turn.Anchor, Turn.Region, plan.HoldsOut, outside);
        var lines = new List<string>();
        foreach (var fit in outside)
        {
            if (_winner.Again(fit) is not { } again)
                return null;
            lines.AddRange(again);
        }

        var last = _pick.Statement;
        if (!Know(dependence, ref last))
            return null;
        if (_winner.RefitOfTheirOwn(last) is { } refit)
            _refit = refit;
        var slice = new Slice(_scene, e => _renderer.Expressions.ContainsKey(Code.Key(e)));
        var dependent = _parts.Where(p => p.Depends).ToList();
        if (dependent.Count == 0)
            return null;
        foreach (var part in dependent)
            slice.Need(part.Value);
        slice.Back(Turn.Anchor, Turn.Region);
        if (!IsResolved(slice))
            return null;
        Write(slice, dependent, lines);
        Rename(dependent, lines);
        var at = _refit is not null && lines.Any(l => _renderer.Computed.Values.Any(v => l.Contains(v))) ? _refit : last;
        _winner.InsertAfter(at, lines);
        _winner.InsertBefore(outside.Count > 0 ? outside[0] : family, plan.Lines);
        if (plan.Using is { } needed)
            _edits.Usings.Add(needed);
        return plan.Title;
    }

    private StatementSyntax? _refit;

    /// <summary>Finds out how the winner's candidate is named after the choice, and which parts of the winner have to be made anew.</summary>
    private bool Know(Dependence dependence, ref StatementSyntax last)
    {
        if (_pick.IsCandidate)
        {
            if (_pick.Winner is null || _pick.Member is not null || Turn.Candidate is null)
                return false;
            _renderer.Symbols[Turn.Candidate] = Sure(_pick.Winner);
            _parts.Add(new SequencePart(null, Turn.Element, null, true, true));
            return true;
        }

        if (_pick.IsIndex)
        {
            string at = _pick.Winner!;
            if (Turn.Key is { } key)
                _renderer.Expressions[Code.Key(key)] = at;
            else if ((Turn.Candidate, Turn.Source) is ({ } candidate, { } source) && source is IdentifierNameSyntax or MemberAccessExpressionSyntax)
                _renderer.Symbols[candidate] = Alias($"{source}[{at}]", ref last);
            else if (Turn.Region is ForEachStatementSyntax each && _scene.Model.GetDeclaredSymbol(each) is { } item && each.Expression is IdentifierNameSyntax or MemberAccessExpressionSyntax)
                _renderer.Symbols[item] = Alias($"{each.Expression}[{at}]", ref last);
            else if (Turn.Region is ForStatementSyntax { Declaration.Variables: [{ } counter], Condition: BinaryExpressionSyntax } loop && counter.Initializer?.Value.ToString() == "0" && _scene.Model.GetDeclaredSymbol(counter) is { } index && loop.Incrementors.Count == 1 && loop.Incrementors[0] is PostfixUnaryExpressionSyntax or PrefixUnaryExpressionSyntax)
                _renderer.Symbols[index] = at;
            else
                return false;
            _parts.Add(new SequencePart(null, Turn.Element, $"{_pick.Scores}[{at}]", true, true));
            return true;
        }

        var element = Made(Turn.Element);
        var found = Kept.Parts(element, _scene.Model).ToList();
        string? prefix = _pick.Winner;
        if (Turn.Key is { } dictionaryKey && _pick.Parts is null)
        {
            if (prefix is null)
                return false;
            string keyAccess = _pick.Member == "Key" ? prefix : _pick.Member is null ? prefix + ".Key" : "";
            if (keyAccess.Length > 0)
                _renderer.Expressions[Code.Key(dictionaryKey)] = keyAccess;
            if (found.Count == 0)
            {
                _parts.Add(new SequencePart("Value", Turn.Element, _pick.Member is null ? prefix + ".Value" : _pick.Member == "Value" ? prefix : null, true, true));
                return true;
            }

            prefix = _pick.Member is null ? prefix + ".Value" : null;
        }

        if (found.Count == 0)
            return KnowWhole(dependence);
        for (int i = 0; i < found.Count; i++)
        {
            var (member, value) = found[i];
            string? access = _pick.Parts is { } names ? (i < names.Count && names[i] != "_" ? names[i] : null)
                : _pick.Member is { } one && Turn.Key is null ? (one == member ? prefix : null)
                : prefix is null ? null : Sure(prefix) + "." + member;
            var (depends, onTest) = dependence.Of(value);
            _parts.Add(new SequencePart(member, value, access, depends, onTest));
            if (!depends && access is not null && value is not LiteralExpressionSyntax)
                _renderer.Expressions[Code.Key(value)] = access;
        }

        return true;
    }

    /// <summary>An element that some call made: its candidate is the member of the candidate's type.</summary>
    private bool KnowWhole(Dependence dependence)
    {
        if (_pick.Winner is not { } winner || _pick.Member is not null || _scene.Model.GetTypeInfo(Turn.Element).Type is not INamedTypeSymbol type)
            return false;
        foreach (var (symbol, candidateType) in Candidates())
        {
            var members = type.GetMembers().OfType<IPropertySymbol>().Where(p => SymbolEqualityComparer.Default.Equals(p.Type, candidateType)).ToList();
            var match = members.FirstOrDefault(m => m.Name.Equals(symbol.Name, StringComparison.OrdinalIgnoreCase)) ?? (members.Count == 1 && candidateType.SpecialType == SpecialType.None ? members[0] : null);
            if (match is not null)
                _renderer.Symbols[symbol] = Sure(winner) + "." + match.Name;
        }

        _parts.Add(new SequencePart(null, Turn.Element, winner, true, dependence.Of(Turn.Element).OnTest) { IsWhole = true });
        return true;
    }

    private IEnumerable<(ISymbol Symbol, ITypeSymbol Type)> Candidates()
    {
        if (Turn.Candidate is IParameterSymbol parameter)
            yield return (parameter, parameter.Type);
        foreach (var loop in Turn.Region.DescendantNodesAndSelf())
        {
            if (loop is ForEachStatementSyntax each && _scene.Model.GetDeclaredSymbol(each) is { } item)
                yield return (item, item.Type);
        }
    }

    private ExpressionSyntax Made(ExpressionSyntax element) =>
        element is IdentifierNameSyntax name && _scene.Model.GetSymbolInfo(name).Symbol is ILocalSymbol { DeclaringSyntaxReferences.Length: 1 } local
        && local.DeclaringSyntaxReferences[0].GetSyntax() is VariableDeclaratorSyntax { Initializer.Value: { } made } && Turn.Region.Span.Contains(made.Span)
            ? made
            : element;

    private bool IsResolved(Slice slice)
    {
        foreach (var symbol in slice.Needed)
        {
            if (_renderer.Symbols.ContainsKey(symbol) || symbol.DeclaringSyntaxReferences.Length != 1)
                continue;
            var declared = symbol.DeclaringSyntaxReferences[0].GetSyntax();
            if (Turn.Region.Span.Contains(declared.Span)
                ? !slice.Nodes.Any(n => n.Span.Contains(declared.Span)) && !_parts.Any(p => p.Depends && p.Value.Span.Contains(declared.Span))
                : slice.Defines(Turn.Region).Contains(symbol) && symbol is ILocalSymbol && !slice.Nodes.Any(n => slice.Defines(n).Contains(symbol)))
                return false;
        }

        return true;
    }

    private void Write(Slice slice, List<SequencePart> dependent, List<string> lines)
    {
        string indent = Code.IndentOf(_pick.Statement);
        bool isVar = _pick.Statement is LocalDeclarationStatementSyntax { Declaration.Type.IsVar: true } || _pick.Statement is ExpressionStatementSyntax;
        foreach (var part in dependent)
        {
            if (!part.IsWhole)
                part.Name = part.OnTest ? _scene.Names.Free(Winner.TestName(part.Member ?? Singular(_pick.Scores), part.Value)) : _scene.Names.Free("winner" + (part.Member is "Model" or null ? "" : part.Member), "winner" + part.Member);
        }

        foreach (var node in slice.Nodes)
        {
            IEnumerable<(ISymbol Symbol, ExpressionSyntax? Value, string Type)> declared = node switch
            {
                LocalDeclarationStatementSyntax local => local.Declaration.Variables.Select(v => (_scene.Model.GetDeclaredSymbol(v)!, v.Initializer?.Value, local.Declaration.Type.ToString())),
                LetClauseSyntax let => new[] { ((ISymbol)_scene.Model.GetDeclaredSymbol(let)!, (ExpressionSyntax?)let.Expression, "var") },
                _ => Enumerable.Empty<(ISymbol, ExpressionSyntax?, string)>(),
            };
            var list = declared.Where(d => slice.IsNeeded(d.Symbol)).ToList();
            if (node is not (LocalDeclarationStatementSyntax or LetClauseSyntax))
            {
                _winner.RenameDeclared(node);
                lines.Add(_renderer.Text(node, indent));
                continue;
            }

            foreach (var (symbol, value, type) in list)
            {
                string text = value is null ? "" : _renderer.Text(value, indent);
                var part = dependent.FirstOrDefault(p => !p.IsWhole && p.Value is IdentifierNameSyntax && SymbolEqualityComparer.Default.Equals(_scene.Model.GetSymbolInfo(p.Value).Symbol, symbol));
                if (_renderer.Computed.Values.Contains(text))
                {
                    _renderer.Symbols[symbol] = text;
                    if (part is not null)
                        (part.Name, part.Written) = (text, true);
                    continue;
                }

                string name = part?.Name ?? _winner.NameFor(symbol, value);
                if (part is not null)
                    part.Written = true;
                _renderer.Symbols[symbol] = name;
                lines.Add(text.Length == 0 ? $"{type} {name};" : $"{type} {name} = {text};");
            }
        }

        foreach (var part in dependent)
        {
            if (part.Written)
                continue;
            string text = _renderer.Text(part.Value, indent);
            string type = isVar ? "var" : _scene.Model.GetTypeInfo(part.Value).Type?.ToMinimalDisplayString(_scene.Model, _pick.Statement.SpanStart) ?? "var";
            if (part.IsWhole)
                lines.Add($"{part.Access} = {text};");
            else if (!part.OnTest && _renderer.Computed.Values.Contains(text))
                part.Name = text;
            else
                lines.Add($"{type} {part.Name} = {text};");
            if (!part.IsWhole)
                _renderer.Expressions[Code.Key(part.Value)] = part.Name!;
        }
    }

    /// <summary>What is read of the winner later is what the test rows say.</summary>
    private void Rename(List<SequencePart> dependent, List<string> lines)
    {
        int end = _pick.Statement.Span.End;
        bool whole = false;
        foreach (var use in _scene.Frame.DescendantNodes().OfType<ExpressionSyntax>())
        {
            if (use.SpanStart < end || use.Parent is MemberAccessExpressionSyntax inner && inner.Name == use)
                continue;
            string key = Code.Key(use);
            var part = dependent.FirstOrDefault(p => !p.IsWhole && p.Access is not null && (Code.Key(p.Access) == key || Code.Key(p.Access.Replace("!.", ".")) == key));
            if (part is not null)
            {
                Replace(use, part.Name!);
                continue;
            }

            if (_pick.Scores is { } scores && (key == Code.Key(scores) + ".Max()" || key == Code.Key(scores) + ".Min()") && dependent.Count == 1)
                Replace(use, dependent[0].Name!);
            else if (_pick.Winner is { } winner && !_pick.IsIndex && !_pick.IsCandidate && _pick.Member is null && key == winner && use.Parent is not MemberAccessExpressionSyntax && !(use.Parent is PostfixUnaryExpressionSyntax { Parent: MemberAccessExpressionSyntax }))
                whole = true;
        }

        // The best score in a variable of its own: the highest of all, taken before the winner was looked up by it.
        foreach (var variable in Code.Siblings(_pick.Statement).OfType<LocalDeclarationStatementSyntax>().SelectMany(s => s.Declaration.Variables))
        {
            if (variable.SpanStart < end && variable.Initializer?.Value is InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax { Name.Identifier.ValueText: "Max" or "Min" } taken } && ElementTurn.Of(_scene, taken.Expression)?.Region == Turn.Region
                && dependent.FirstOrDefault(p => p.OnTest && !p.IsWhole) is { Name: { } name } && _scene.Model.GetDeclaredSymbol(variable) is { } symbol)
                _winner.RenameLater(symbol, _pick.Statement, name);
        }

        if (whole && dependent.Any(p => !p.IsWhole))
            lines.Add($"{_pick.Winner} = {_renderer.Text(Made(Turn.Element), Code.IndentOf(_pick.Statement))};");
    }

    private void Replace(ExpressionSyntax use, string name)
    {
        bool member = use.Parent is AnonymousObjectMemberDeclaratorSyntax { NameEquals: null };
        string old = use is MemberAccessExpressionSyntax access ? access.Name.Identifier.Text : use.ToString();
        _edits.Replace(use, member ? $"{old} = {name}" : name);
    }

    private string Alias(string candidate, ref StatementSyntax last)
    {
        string key = Code.Key(candidate);
        foreach (var statement in Code.Siblings(_pick.Statement).SkipWhile(s => s != _pick.Statement).Skip(1).OfType<LocalDeclarationStatementSyntax>())
        {
            if (statement.Declaration.Variables is [{ Initializer.Value: { } value } variable] && Code.Key(value) == key)
            {
                last = statement;
                return variable.Identifier.Text;
            }
        }

        return candidate;
    }

    private static string Singular(ExpressionSyntax? scores)
    {
        string name = scores is IdentifierNameSyntax identifier ? identifier.Identifier.ValueText : "score";
        return name.EndsWith("ies", StringComparison.Ordinal) ? name.Substring(0, name.Length - 3) + "y"
            : name.EndsWith("s", StringComparison.Ordinal) && !name.EndsWith("ss", StringComparison.Ordinal) && name.Length > 2 ? name.Substring(0, name.Length - 1)
            : name;
    }

    /// <summary>The winner as the code itself names it where it may be null.</summary>
    private string Sure(string winner) => _scene.Frame.DescendantNodes().OfType<PostfixUnaryExpressionSyntax>()
        .Any(p => p.IsKind(SyntaxKind.SuppressNullableWarningExpression) && p.Operand.ToString() == winner && p.SpanStart > _pick.Statement.Span.End) ? winner + "!" : winner;
}
