using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>Writes what happens to the winner after the choice: it is fitted on all training rows and scored once on the test rows.</summary>
internal sealed class Winner
{
    private static readonly HashSet<string> BestWords = new(StringComparer.OrdinalIgnoreCase)
        { "best", "lowest", "highest", "top", "min", "max", "minimum", "maximum", "smallest", "largest", "least", "winning", "so", "far", "current", "chosen", "winner" };

    private readonly Scene _scene;
    private readonly Edits _edits;
    private readonly Renderer _renderer;
    private readonly List<string> _before = new();

    public Winner(Scene scene, Edits edits)
    {
        _scene = scene;
        _edits = edits;
        _renderer = new Renderer(scene);
    }

    public Renderer Renderer => _renderer;

    /// <summary>Statements before a loop that fit training rows and that the loop depends on.</summary>
    public List<StatementSyntax> FitsBefore(StatementSyntax family)
    {
        var slice = new Slice(_scene, static _ => false);
        slice.Need(family);
        var found = new List<StatementSyntax>();
        foreach (var node in Slice.Before(family, _scene.Frame))
        {
            if (node is not StatementSyntax statement || !slice.Defines(node).Any(slice.IsNeeded))
                continue;

            // Rows made from other rows are rows, not a fit.
            if (_scene.Mentions(statement, RowsRole.Training) && !slice.Defines(node).Any(d => _scene.RowsNamed(d) is not null))
            {
                found.Insert(0, statement);
                slice.Need(statement);
            }
        }

        return found;
    }

    public void InsertBefore(StatementSyntax statement, IEnumerable<string> lines)
    {
        string indent = Code.IndentOf(statement);
        foreach (string line in lines.Concat(_before))
            _edits.Insert(Code.BeforeStatement(statement), indent + line + _scene.NewLine);
    }

    /// <param name="refit">The winner is fitted again, on all training rows.</param>
    /// <param name="outside">Statements before the loop that fit something that all candidates use.</param>
    public bool Follow(StatementSyntax family, IfStatementSyntax test, ExpressionSyntax best, ExpressionSyntax score, List<Kept> kept, bool refit, List<StatementSyntax> outside)
    {
        var model = _scene.Model;
        bool IsKnown(ExpressionSyntax e) => _renderer.Expressions.ContainsKey(Code.Key(e));
        var dependence = new Dependence(_scene, test, family, refit, outside);
        bool Depends(ExpressionSyntax value) => dependence.Of(value).Depends;
        var dependent = new List<Kept>();
        foreach (var one in kept)
        {
            if (Depends(one.Value))
                dependent.Add(one);
            else if (one.Value is not LiteralExpressionSyntax)
                _renderer.Expressions[Code.Key(one.Value)] = Sure(one.Target);
        }

        // What a kept whole holds of its candidate.
        foreach (var one in dependent)
        {
            var created = one.Value;
            if (created is IdentifierNameSyntax && model.GetSymbolInfo(created).Symbol is ILocalSymbol { DeclaringSyntaxReferences: { Length: 1 } at } && at[0].GetSyntax() is VariableDeclaratorSyntax { Initializer.Value: { } made })
                created = made;
            foreach (var (member, value) in Kept.Parts(created, model))
            {
                if (value is not LiteralExpressionSyntax && !IsKnown(value) && !Depends(value))
                    _renderer.Expressions[Code.Key(value)] = Sure(one.Target) + "." + member;
            }
        }

        var turn = new Slice(_scene, IsKnown);
        turn.Need(score);
        foreach (var one in dependent)
            turn.Need(one.Value);
        turn.Back(test, family);
        if (!KeepCandidates(turn, family, test, kept))
            return false;
        var lines = new List<string>();
        foreach (var fit in outside)
        {
            if (Again(fit) is not { } again)
                return false;
            lines.AddRange(again);
        }

        var after = RefitOfTheirOwn(family);
        string indent = Code.IndentOf(family);
        var scoreTarget = kept.FirstOrDefault(k => Code.Key(k.Target) == Code.Key(best));
        bool rename = best is IdentifierNameSyntax && scoreTarget is not null && model.GetSymbolInfo(best).Symbol is ILocalSymbol local && !IsAssignedAfter(local, family);
        string? testScore = rename ? _scene.Names.Free(TestName(best.ToString(), score)) : null;
        bool isVar = best is IdentifierNameSyntax && model.GetSymbolInfo(best).Symbol is ILocalSymbol l && l.DeclaringSyntaxReferences[0].GetSyntax().Parent is VariableDeclarationSyntax { Type.IsVar: true };
        string scoreType = isVar ? "var" : model.GetTypeInfo(best).Type!.ToMinimalDisplayString(model, test.SpanStart);
        var written = new HashSet<Kept>();
        foreach (var node in turn.Nodes)
        {
            if (node is not LocalDeclarationStatementSyntax { Declaration: { } declaration })
            {
                RenameDeclared(node);
                lines.Add(_renderer.Text(node, indent));
                continue;
            }

            foreach (var variable in declaration.Variables)
            {
                if (model.GetDeclaredSymbol(variable) is not { } symbol || !turn.IsNeeded(symbol))
                    continue;
                string value = variable.Initializer is { } initializer ? _renderer.Text(initializer.Value, indent) : "";
                var target = dependent.FirstOrDefault(k => k.Value is IdentifierNameSyntax && SymbolEqualityComparer.Default.Equals(model.GetSymbolInfo(k.Value).Symbol, symbol));
                if (value.Length == 0)
                    target = null;
                if (target is not null && !(target == scoreTarget && rename))
                {
                    _renderer.Symbols[symbol] = target.Target.ToString();
                    written.Add(target);
                    lines.Add($"{target.Target} = {value};");
                    continue;
                }

                string name;
                if (target is not null)
                {
                    name = testScore!;
                    written.Add(target);
                }
                else if (IdentifierOf(score) is { } scored && SymbolEqualityComparer.Default.Equals(model.GetSymbolInfo(scored).Symbol, symbol) && testScore is not null && score == scored)
                {
                    name = testScore;
                    written.Add(scoreTarget!);
                }
                else
                {
                    name = NameFor(symbol, variable.Initializer?.Value);
                }

                if (_renderer.Computed.Values.Contains(value) && target is null)
                {
                    _renderer.Symbols[symbol] = value;
                    continue;
                }

                _renderer.Symbols[symbol] = name;
                lines.Add(value.Length == 0 ? $"{declaration.Type} {name};" : $"{declaration.Type} {name} = {value};");
            }
        }

        foreach (var one in dependent)
        {
            if (!written.Add(one))
                continue;
            if (one == scoreTarget && rename)
                lines.Add($"{scoreType} {testScore} = {_renderer.Text(one.Value, indent)};");
            else
                lines.Add($"{one.Target} = {_renderer.Text(one.Value, indent)};");
        }

        if (rename && model.GetSymbolInfo(best).Symbol is { } bestSymbol)
            RenameLater(bestSymbol, after ?? family, testScore!);
        InsertAfter(after is not null && lines.Any(l => _renderer.Computed.Values.Any(v => l.Contains(v))) ? after : family, lines);
        return true;
    }

    /// <summary>A name for a variable of the winner's turn.</summary>
    public string NameFor(ISymbol symbol, ExpressionSyntax? value)
    {
        string bare = RowsName.Upper(Bare(symbol.Name));
        bool onTest = (value is not null && _scene.Mentions(value, RowsRole.Test)) || symbol is ILocalSymbol { Type.SpecialType: not SpecialType.None };
        return onTest ? _scene.Names.Free("test" + bare) : _scene.Names.Free("winner", "winner" + bare);
    }

    private static IdentifierNameSyntax? IdentifierOf(ExpressionSyntax score) => score as IdentifierNameSyntax;

    private string Sure(ExpressionSyntax target)
    {
        var symbol = _scene.Model.GetSymbolInfo(target).Symbol;
        return symbol switch
        {
            ILocalSymbol { NullableAnnotation: NullableAnnotation.Annotated, Type.IsReferenceType: true } => target + "!",
            ILocalSymbol { Type: INamedTypeSymbol { OriginalDefinition.SpecialType: SpecialType.System_Nullable_T } } => target + ".Value",
            _ => target.ToString(),
        };
    }

    /// <summary>A candidate's variables that the winner's turn needs and that nothing keeps are kept too.</summary>
    private bool KeepCandidates(Slice turn, StatementSyntax family, IfStatementSyntax test, List<Kept> kept)
    {
        var defined = new HashSet<ISymbol>(turn.Nodes.SelectMany(turn.Defines), SymbolEqualityComparer.Default);
        var keptRoots = new HashSet<ISymbol>(kept.Select(k => _scene.Model.GetSymbolInfo(Code.RootOf(k.Target)).Symbol).OfType<ISymbol>(), SymbolEqualityComparer.Default);
        foreach (var symbol in turn.Needed)
        {
            if (keptRoots.Contains(symbol))
                return false;
            if (symbol.DeclaringSyntaxReferences.Length != 1 || defined.Contains(symbol))
                continue;
            var declared = symbol.DeclaringSyntaxReferences[0].GetSyntax();
            bool inside = family.Span.Contains(declared.Span);
            if (inside && turn.Nodes.Any(n => n.Span.Contains(declared.Span)))
                continue;
            if (!inside && !turn.Defines(family).Contains(symbol))
                continue;
            if (inside && declared is LocalFunctionStatementSyntax or MethodDeclarationSyntax)
                continue;
            ITypeSymbol? type = symbol switch { ILocalSymbol l => l.Type, IParameterSymbol p => p.Type, _ => null };
            if (type is null)
                continue;
            string name = _scene.Names.Free("best" + RowsName.Upper(Bare(symbol.Name)), "winner" + RowsName.Upper(Bare(symbol.Name)));
            string typeText = type.WithNullableAnnotation(NullableAnnotation.None).ToMinimalDisplayString(_scene.Model, test.SpanStart);
            _before.Add(type.SpecialType is SpecialType.System_Int32 ? $"{typeText} {name} = 0;" : $"{typeText} {name} = default{(type.IsReferenceType ? "!" : "")};");
            AddKept(test, $"{name} = {symbol.Name};", kept);
            _renderer.Symbols[symbol] = name;
        }

        return true;
    }

    private void AddKept(IfStatementSyntax test, string line, List<Kept> kept)
    {
        var last = kept[kept.Count - 1].Statement;
        string indent = Code.IndentOf(last);
        if (last.Parent is BlockSyntax)
        {
            _edits.Insert(last.FullSpan.End, indent + line + _scene.NewLine);
            return;
        }

        string outer = Code.IndentOf(test);
        if (!_edits.Replaces(last.Span))
        {
            string step = _scene.Step;
            _edits.Insert(last.SpanStart, Code.IndentOf(last) == outer ? "{ " : "");
            bool oneLine = Code.IndentOf(last) == outer && _scene.Text.Lines.GetLineFromPosition(last.SpanStart).LineNumber == _scene.Text.Lines.GetLineFromPosition(test.SpanStart).LineNumber;
            if (oneLine)
            {
                _edits.Insert(last.Span.End, " " + line + " }");
            }
            else
            {
                _edits.Insert(_scene.Text.Lines.GetLineFromPosition(last.SpanStart).Start, outer + "{" + _scene.NewLine);
                _edits.Insert(last.FullSpan.End, outer + step + line + _scene.NewLine + outer + "}" + _scene.NewLine);
            }
        }
    }

    /// <summary>A statement before the loop once more, as an assignment where it declared.</summary>
    public IEnumerable<string>? Again(StatementSyntax fit)
    {
        if (fit is ExpressionStatementSyntax)
            return new[] { _renderer.Text(fit) };
        if (fit is LocalDeclarationStatementSyntax { UsingKeyword.RawKind: 0, IsConst: false } declaration && declaration.Declaration.Variables.All(v => v.Initializer is not null))
            return declaration.Declaration.Variables.Select(v => $"{v.Identifier.Text} = {_renderer.Text(v.Initializer!.Value)};").ToArray();
        return null;
    }

    /// <summary>A refit that the code has already: a later variable that holds what the winner's fit computes.</summary>
    public StatementSyntax? RefitOfTheirOwn(StatementSyntax family)
    {
        StatementSyntax? last = null;
        foreach (var statement in Code.Siblings(family).SkipWhile(s => s != family).Skip(1))
        {
            if (statement is not LocalDeclarationStatementSyntax declaration || !_scene.Mentions(statement, RowsRole.Training))
                continue;
            foreach (var variable in declaration.Declaration.Variables)
            {
                if (variable.Initializer is { } initializer)
                    _renderer.Computed[Code.Key(initializer.Value)] = variable.Identifier.Text;
            }

            last = statement;
        }

        return last;
    }

    public void RenameDeclared(SyntaxNode node)
    {
        foreach (var inner in node.DescendantNodesAndSelf())
        {
            if (inner is VariableDeclaratorSyntax or SingleVariableDesignationSyntax && inner.FirstAncestorOrSelf<LambdaExpressionSyntax>() is null
                && _scene.Model.GetDeclaredSymbol(inner) is { } symbol && IsInScopeOf(inner, node))
                _renderer.Symbols[symbol] = _scene.Names.Free("test" + RowsName.Upper(Bare(symbol.Name)));
        }
    }

    /// <summary>Whether a declaration is seen by the statements beside the one that holds it.</summary>
    private static bool IsInScopeOf(SyntaxNode declaration, SyntaxNode statement) =>
        statement is ExpressionStatementSyntax && declaration.FirstAncestorOrSelf<StatementSyntax>() == statement;

    private bool IsAssignedAfter(ISymbol symbol, SyntaxNode family) => _scene.Frame.DescendantNodes().OfType<AssignmentExpressionSyntax>()
        .Any(a => a.SpanStart > family.Span.End && SymbolEqualityComparer.Default.Equals(_scene.Model.GetSymbolInfo(a.Left).Symbol, symbol));

    public void RenameLater(ISymbol symbol, SyntaxNode after, string name)
    {
        foreach (var use in _scene.Frame.DescendantNodes().OfType<IdentifierNameSyntax>())
        {
            if (use.SpanStart < after.Span.End || use.Identifier.ValueText != symbol.Name || !SymbolEqualityComparer.Default.Equals(_scene.Model.GetSymbolInfo(use).Symbol, symbol))
                continue;
            bool named = use.Parent is AnonymousObjectMemberDeclaratorSyntax { NameEquals: null } || use.Parent is ArgumentSyntax { Parent: TupleExpressionSyntax, NameColon: null };
            _edits.Replace(use, use.Parent is AnonymousObjectMemberDeclaratorSyntax && named ? $"{symbol.Name} = {name}" : named ? $"{symbol.Name}: {name}" : name);
        }
    }

    public void InsertAfter(StatementSyntax statement, List<string> lines)
    {
        if (lines.Count == 0)
            return;
        string indent = Code.IndentOf(statement);
        var siblings = Code.Siblings(statement).ToList();
        int at = siblings.IndexOf(statement);
        string text = string.Concat(lines.Select(l => indent + l.Replace("\r\n", "\n").Replace("\n", _scene.NewLine) + _scene.NewLine));
        if (at + 1 < siblings.Count)
        {
            _edits.Insert(Code.BeforeStatement(siblings[at + 1]), text);
            return;
        }

        SyntaxNode node = statement.Parent is GlobalStatementSyntax global ? global : statement;
        bool ends = node.GetTrailingTrivia().Any(t => t.IsKind(SyntaxKind.EndOfLineTrivia));
        _edits.Insert(node.FullSpan.End, (ends ? "" : _scene.NewLine) + text);
    }

    public static string TestName(string best, ExpressionSyntax score)
    {
        string bare = Bare(best);
        if (bare.Length == 0)
            bare = Bare(score is MemberAccessExpressionSyntax member ? member.Name.Identifier.ValueText : score is IdentifierNameSyntax name ? name.Identifier.ValueText : "");
        return "test" + RowsName.Upper(bare.Length == 0 ? "score" : bare);
    }

    /// <summary>A name without the words that say that it is the best.</summary>
    private static string Bare(string name) => string.Concat(RowsName.Words(name).Where(w => !BestWords.Contains(w)).Select((w, i) => i == 0 ? RowsName.Lower(w) : RowsName.Upper(w)));
}
