using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.CodeFixes.Choosing;

/// <summary>A comparison of two scores and what is taken either way.</summary>
internal sealed class TwoWays
{
    private TwoWays(StatementSyntax statement, ExpressionSyntax condition, string conditionText, ExpressionSyntax left, ExpressionSyntax right, List<TwoWaysValue> values)
    {
        Statement = statement;
        Condition = condition;
        ConditionText = conditionText;
        ScoreIfTrue = left;
        ScoreIfFalse = right;
        Values = values;
    }

    public StatementSyntax Statement { get; }

    public ExpressionSyntax Condition { get; }

    /// <summary>The condition as it can be asked again after the choice.</summary>
    public string ConditionText { get; }

    public ExpressionSyntax ScoreIfTrue { get; private set; }

    public ExpressionSyntax ScoreIfFalse { get; private set; }

    public List<TwoWaysValue> Values { get; }

    public static TwoWays? Of(Scene scene)
    {
        var found = OfConditional(scene) ?? OfIf(scene);
        found?.Order(scene);
        return found;
    }

    private static BinaryExpressionSyntax? Comparison(ExpressionSyntax condition) => condition switch
    {
        ParenthesizedExpressionSyntax inner => Comparison(inner.Expression),
        BinaryExpressionSyntax { RawKind: (int)SyntaxKind.LessThanExpression or (int)SyntaxKind.GreaterThanExpression or (int)SyntaxKind.LessThanOrEqualExpression or (int)SyntaxKind.GreaterThanOrEqualExpression } two => two,
        _ => null,
    };

    private static TwoWays? OfConditional(Scene scene)
    {
        if (scene.Choice.FirstAncestorOrSelf<ConditionalExpressionSyntax>(c => c.Condition.Span.Contains(scene.Choice.Span) || c == scene.Choice) is not { } conditional || Comparison(conditional.Condition) is not { } two || Code.StatementOf(conditional) is not { } statement)
            return null;
        if (InLoop(scene, conditional))
            return null;
        var values = new List<TwoWaysValue>();
        ExpressionSyntax whole = conditional;
        while (whole.Parent is ParenthesizedExpressionSyntax outer)
            whole = outer;
        switch (whole.Parent)
        {
            case EqualsValueClauseSyntax { Parent: VariableDeclaratorSyntax variable }:
                values.Add(new TwoWaysValue(variable.Identifier.Text, scene.Model.GetDeclaredSymbol(variable), conditional.WhenTrue, conditional.WhenFalse));
                break;
            case AssignmentExpressionSyntax { Left: DeclarationExpressionSyntax { Designation: ParenthesizedVariableDesignationSyntax parts } }
                when conditional.WhenTrue is TupleExpressionSyntax yes && conditional.WhenFalse is TupleExpressionSyntax no && yes.Arguments.Count == parts.Variables.Count && no.Arguments.Count == parts.Variables.Count:
                for (int i = 0; i < parts.Variables.Count; i++)
                    values.Add(new TwoWaysValue(parts.Variables[i].ToString(), parts.Variables[i] is SingleVariableDesignationSyntax single ? scene.Model.GetDeclaredSymbol(single) : null, yes.Arguments[i].Expression, no.Arguments[i].Expression));
                break;
            case AssignmentExpressionSyntax assignment when assignment.Right == whole && assignment.Left is not (TupleExpressionSyntax or DeclarationExpressionSyntax):
                values.Add(new TwoWaysValue(assignment.Left.ToString(), scene.Model.GetSymbolInfo(assignment.Left).Symbol, conditional.WhenTrue, conditional.WhenFalse));
                break;
            default:
                return null;
        }

        return new TwoWays(statement, conditional.Condition, conditional.Condition.ToString(), two.Left, two.Right, values);
    }

    private static TwoWays? OfIf(Scene scene)
    {
        if (scene.Choice.FirstAncestorOrSelf<IfStatementSyntax>(i => i.Condition.Span.Contains(scene.Choice.Span)) is not { } test || Comparison(test.Condition) is not { } two)
            return null;
        if (InLoop(scene, test))
            return null;
        var then = Kept.In(Inside(test.Statement));
        var values = new List<TwoWaysValue>();
        if (test.Else is { } otherwise)
        {
            var rest = Kept.In(Inside(otherwise.Statement));
            foreach (var one in then)
            {
                if (rest.FirstOrDefault(r => Code.Key(r.Target) == Code.Key(one.Target)) is not { } other)
                    return null;
                values.Add(new TwoWaysValue(one.Target.ToString(), scene.Model.GetSymbolInfo(one.Target).Symbol, one.Value, other.Value));
            }

            return values.Count == 0 || rest.Count != then.Count ? null : new TwoWays(test, test.Condition, test.Condition.ToString(), two.Left, two.Right, values);
        }

        // What the first candidate left in the variables is what holds if the second is no better.
        ExpressionSyntax left = two.Left, right = two.Right;
        foreach (var one in then)
        {
            if (scene.Model.GetSymbolInfo(one.Target).Symbol is not ILocalSymbol symbol || symbol.DeclaringSyntaxReferences[0].GetSyntax() is not VariableDeclaratorSyntax { Initializer.Value: { } initial })
                return null;
            if (Code.Key(one.Target) == Code.Key(left))
                left = initial;
            if (Code.Key(one.Target) == Code.Key(right))
                right = initial;
            values.Add(new TwoWaysValue(one.Target.ToString(), symbol, one.Value, initial));
        }

        return values.Count == 0 ? null : new TwoWays(test, test.Condition, $"{left} {two.OperatorToken.Text} {right}", left, right, values);
    }

    // Straight-line code has no turn before this one that the best so far could come from.
    private static bool InLoop(Scene scene, SyntaxNode node) => node.Ancestors().TakeWhile(a => a != scene.Frame)
        .Any(a => a is ForStatementSyntax or CommonForEachStatementSyntax or WhileStatementSyntax or DoStatementSyntax or AnonymousFunctionExpressionSyntax);

    private static IEnumerable<StatementSyntax> Inside(StatementSyntax statement) => statement is BlockSyntax block ? block.Statements : new[] { statement };

    /// <summary>Finds out which of the two scores is that of the candidate taken if the condition holds.</summary>
    private void Order(Scene scene)
    {
        foreach (var value in Values)
        {
            if (Mentions(scene, value.IfTrue, ScoreIfFalse) || Mentions(scene, value.IfFalse, ScoreIfTrue))
            {
                (ScoreIfTrue, ScoreIfFalse) = (ScoreIfFalse, ScoreIfTrue);
                return;
            }

            if (Mentions(scene, value.IfTrue, ScoreIfTrue) || Mentions(scene, value.IfFalse, ScoreIfFalse))
                return;
        }

        foreach (var value in Values)
        {
            bool straight = MadeFrom(scene, ScoreIfTrue, value.IfTrue) || MadeFrom(scene, ScoreIfFalse, value.IfFalse);
            bool crossed = MadeFrom(scene, ScoreIfTrue, value.IfFalse) || MadeFrom(scene, ScoreIfFalse, value.IfTrue);
            if (straight == crossed)
                continue;
            if (crossed)
                (ScoreIfTrue, ScoreIfFalse) = (ScoreIfFalse, ScoreIfTrue);
            return;
        }

        bool greater = Comparison(Condition) is { } two && (two.IsKind(SyntaxKind.GreaterThanExpression) || two.IsKind(SyntaxKind.GreaterThanOrEqualExpression));
        bool higherWins = !(scene.Diagnostic.Properties.TryGetValue("tare.direction", out string? direction) && direction == "lower");
        if (greater != higherWins)
            (ScoreIfTrue, ScoreIfFalse) = (ScoreIfFalse, ScoreIfTrue);
    }

    private static bool Mentions(Scene scene, ExpressionSyntax value, ExpressionSyntax score) => value.DescendantNodesAndSelf().OfType<ExpressionSyntax>().Any(e => Code.Key(e) == Code.Key(score));

    private bool MadeFrom(Scene scene, ExpressionSyntax score, ExpressionSyntax value)
    {
        if (scene.Model.GetSymbolInfo(value).Symbol is not (ILocalSymbol or IParameterSymbol) || scene.Model.GetSymbolInfo(value).Symbol is not { } symbol)
            return false;
        var slice = new Slice(scene, static _ => false);
        slice.Need(score);
        slice.Back(Statement, scene.Frame);
        return slice.IsNeeded(symbol);
    }
}
