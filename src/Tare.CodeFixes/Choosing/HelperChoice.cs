using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>A choice that a helper makes on the rows it is given: the call gives it validation rows, and the winner is scored after it.</summary>
internal sealed class HelperChoice
{
    private readonly Scene _scene;
    private readonly Edits _edits;
    private readonly InvocationExpressionSyntax _call;
    private readonly MethodDeclarationSyntax? _method;
    private readonly LocalFunctionStatementSyntax? _function;

    private HelperChoice(Scene scene, Edits edits, InvocationExpressionSyntax call, SyntaxNode helper)
    {
        _scene = scene;
        _edits = edits;
        _call = call;
        _method = helper as MethodDeclarationSyntax;
        _function = helper as LocalFunctionStatementSyntax;
    }

    private SyntaxNode Helper => (SyntaxNode?)_method ?? _function!;

    public static string? Rewrite(Scene scene, Edits edits)
    {
        if (scene.Choice.FirstAncestorOrSelf<InvocationExpressionSyntax>() is not { } call || scene.Model.GetSymbolInfo(call).Symbol is not IMethodSymbol { DeclaringSyntaxReferences.Length: 1 } method)
            return null;
        var helper = method.DeclaringSyntaxReferences[0].GetSyntax();
        return helper.SyntaxTree == scene.Root.SyntaxTree && helper is MethodDeclarationSyntax or LocalFunctionStatementSyntax ? new HelperChoice(scene, edits, call, helper).Rewrite() : null;
    }

    private string? Rewrite()
    {
        if (Code.StatementOf(_call) is not { } statement || Code.Siblings(statement).Count == 0 || RowsPlan.Of(_scene, new SyntaxNode[] { _call }) is not { } plan)
            return null;

        // The helper's own words for what the call gives it.
        var renderer = new Renderer(_scene);
        var parameters = (_method?.ParameterList ?? _function!.ParameterList).Parameters;
        for (int i = 0; i < _call.ArgumentList.Arguments.Count; i++)
        {
            var argument = _call.ArgumentList.Arguments[i];
            var parameter = argument.NameColon is { } named ? parameters.FirstOrDefault(p => p.Identifier.ValueText == named.Name.Identifier.ValueText) : i < parameters.Count ? parameters[i] : null;
            if (parameter is null || argument.RefKindKeyword.RawKind != 0 || _scene.Model.GetDeclaredSymbol(parameter) is not { } symbol)
                return null;
            renderer.Symbols[symbol] = argument.Expression.ToString();
        }

        if (Turn() is not { } turn || Returned() is not { } returned || Names(statement, returned) is not { } names)
            return null;
        var candidate = turn.Kept.Where(k => returned.Contains(Code.Key(k.Target))).ToList();
        foreach (var kept in candidate)
        {
            int at = returned.IndexOf(Code.Key(kept.Target));
            if (Code.Key(kept.Target) != Code.Key(turn.Best))
                renderer.Expressions[Code.Key(kept.Value)] = names[at];
        }

        if (Inline(turn, renderer) is not { } score)
            return null;
        var winner = new Winner(_scene, _edits);
        plan.Replace(_scene, _call, _edits);
        string test = _scene.Names.Free(Winner.TestName(turn.Best.ToString(), turn.Score));
        string type = _scene.Model.GetTypeInfo(turn.Score).Type!.ToMinimalDisplayString(_scene.Model, statement.SpanStart);
        winner.InsertAfter(statement, new List<string> { $"{type} {test} = {score};" });
        winner.InsertBefore(statement, plan.Lines);

        // The score that chose, where the helper gives it back.
        int scored = returned.IndexOf(Code.Key(turn.Best));
        if (scored >= 0 && _scene.Frame.DescendantNodes().FirstOrDefault(n => n is SingleVariableDesignationSyntax d && d.Identifier.ValueText == names[scored] && statement.Span.Contains(d.Span)) is SingleVariableDesignationSyntax designation
            && _scene.Model.GetDeclaredSymbol(designation) is { } held)
            winner.RenameLater(held, statement, test);
        else if (scored >= 0)
            RenameMember(names[scored], statement, test);
        if (plan.Using is { } needed)
            _edits.Usings.Add(needed);
        return plan.Title;
    }

    /// <summary>The helper's loop: what it keeps, and by which score.</summary>
    private (ExpressionSyntax Best, ExpressionSyntax Score, List<Kept> Kept, IfStatementSyntax Test)? Turn()
    {
        foreach (var test in Helper.DescendantNodes().OfType<IfStatementSyntax>())
        {
            var kept = Kept.In(test.Statement is BlockSyntax block ? block.Statements : new[] { test.Statement });
            foreach (var two in test.Condition.DescendantNodesAndSelf().OfType<BinaryExpressionSyntax>().Where(b => b.Left is not LiteralExpressionSyntax && b.Right is not LiteralExpressionSyntax))
            {
                if (kept.Any(k => Code.Key(k.Target) == Code.Key(two.Right)))
                    return (two.Right, two.Left, kept, test);
                if (kept.Any(k => Code.Key(k.Target) == Code.Key(two.Left)))
                    return (two.Left, two.Right, kept, test);
            }
        }

        return null;
    }

    private List<string>? Returned()
    {
        var returns = Helper.DescendantNodes(n => n is not AnonymousFunctionExpressionSyntax).OfType<ReturnStatementSyntax>().ToList();
        if (returns.Count != 1 || returns[0].Expression is not { } value)
            return null;
        return value is TupleExpressionSyntax tuple ? tuple.Arguments.Select(a => Code.Key(a.Expression)).ToList() : new List<string> { Code.Key(value) };
    }

    /// <summary>What the call's results are named where the call stands.</summary>
    private List<string>? Names(StatementSyntax statement, List<string> returned)
    {
        if (_call.Parent is EqualsValueClauseSyntax { Parent: VariableDeclaratorSyntax variable } && statement is LocalDeclarationStatementSyntax)
        {
            if (returned.Count == 1)
                return new List<string> { variable.Identifier.Text };
            return _scene.Model.GetTypeInfo(_call).Type is INamedTypeSymbol { IsTupleType: true } tuple ? tuple.TupleElements.Select(e => variable.Identifier.Text + "." + e.Name).ToList() : null;
        }

        return _call.Parent switch
        {
            AssignmentExpressionSyntax { Left: DeclarationExpressionSyntax { Designation: ParenthesizedVariableDesignationSyntax parts } } when parts.Variables.Count == returned.Count => parts.Variables.Select(v => v.ToString()).ToList(),
            AssignmentExpressionSyntax { Left: TupleExpressionSyntax targets } when targets.Arguments.Count == returned.Count => targets.Arguments.Select(a => a.Expression is DeclarationExpressionSyntax d ? d.Designation.ToString() : a.Expression.ToString()).ToList(),
            AssignmentExpressionSyntax { Left: IdentifierNameSyntax name } when returned.Count == 1 => new List<string> { name.Identifier.Text },
            _ => null,
        };
    }

    /// <summary>The winner's fit and score as one expression in the words of the caller.</summary>
    private string? Inline((ExpressionSyntax Best, ExpressionSyntax Score, List<Kept> Kept, IfStatementSyntax Test) turn, Renderer renderer)
    {
        var slice = new Slice(_scene, e => renderer.Expressions.ContainsKey(Code.Key(e)));
        slice.Need(turn.Score);
        slice.Back(turn.Test, Helper);
        var calls = slice.Nodes.Where(n => slice.Defines(n).Any(d => !renderer.Symbols.ContainsKey(d))).ToList();
        foreach (var node in calls)
        {
            if (node is not LocalDeclarationStatementSyntax { Declaration: { Variables: [{ Initializer: { } initializer } variable] } } || _scene.Model.GetDeclaredSymbol(variable) is not { } symbol)
                return null;
            int uses = calls.Append(turn.Score).Sum(n => n.DescendantNodesAndSelf().OfType<IdentifierNameSyntax>().Count(i => SymbolEqualityComparer.Default.Equals(_scene.Model.GetSymbolInfo(i).Symbol, symbol)));
            if (uses > 1)
                return null;
            renderer.Symbols[symbol] = initializer.Value is InvocationExpressionSyntax or IdentifierNameSyntax or MemberAccessExpressionSyntax or BaseObjectCreationExpressionSyntax ? renderer.Text(initializer.Value) : $"({renderer.Text(initializer.Value)})";
        }

        // Everything else that it names has to be seen from the call too.
        bool open = slice.Needed.Any(s => s is ILocalSymbol or IParameterSymbol or IRangeVariableSymbol && !renderer.Symbols.ContainsKey(s) && Helper.Span.Contains(s.DeclaringSyntaxReferences[0].Span)
            && !calls.Append(turn.Score).Any(n => n.Span.Contains(s.DeclaringSyntaxReferences[0].Span)));
        string text = renderer.Text(turn.Score);
        return open || text.IndexOf('\n') >= 0 ? null : text;
    }

    private void RenameMember(string access, StatementSyntax after, string name)
    {
        foreach (var use in _scene.Frame.DescendantNodes().OfType<ExpressionSyntax>())
        {
            if (use.SpanStart > after.Span.End && Code.Key(use) == access)
                _edits.Replace(use, name);
        }
    }
}
