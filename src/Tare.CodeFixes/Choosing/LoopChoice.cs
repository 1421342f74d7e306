using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>A choice made while going over the candidates: <c>if (score &gt; best) { best = score; … }</c>.</summary>
internal sealed class LoopChoice
{
    private readonly Scene _scene;
    private readonly IfStatementSyntax _test;
    private readonly ExpressionSyntax _best;
    private readonly ExpressionSyntax _score;
    private readonly List<Kept> _kept;
    private readonly StatementSyntax _family;

    private LoopChoice(Scene scene, IfStatementSyntax test, ExpressionSyntax best, ExpressionSyntax score, List<Kept> kept, StatementSyntax family)
    {
        _scene = scene;
        _test = test;
        _best = best;
        _score = score;
        _kept = kept;
        _family = family;
    }

    /// <summary>Writes the choice anew; null when the code has another form or no sound one is known.</summary>
    public static string? Rewrite(Scene scene, Edits edits) => Of(scene)?.Rewrite(edits);

    private static LoopChoice? Of(Scene scene)
    {
        if (scene.Choice.FirstAncestorOrSelf<IfStatementSyntax>(i => i.Condition.Span.Contains(scene.Choice.Span)) is not { } test)
            return null;
        var kept = Kept.In(KeepingStatements(test));
        foreach (var comparison in test.Condition.DescendantNodesAndSelf().OfType<BinaryExpressionSyntax>())
        {
            if (!comparison.IsKind(SyntaxKind.LessThanExpression) && !comparison.IsKind(SyntaxKind.GreaterThanExpression)
                && !comparison.IsKind(SyntaxKind.LessThanOrEqualExpression) && !comparison.IsKind(SyntaxKind.GreaterThanOrEqualExpression))
                continue;
            if (!comparison.Span.IntersectsWith(scene.Choice.Span))
                continue;
            foreach (var (best, score) in new[] { (comparison.Right, comparison.Left), (comparison.Left, comparison.Right) })
            {
                if (scene.Model.GetSymbolInfo(Code.RootOf(best)).Symbol is { } root
                    && kept.Any(k => SymbolEqualityComparer.Default.Equals(scene.Model.GetSymbolInfo(Code.RootOf(k.Target)).Symbol, root))
                    && FamilyOf(scene, test, root) is { } family)
                    return new LoopChoice(scene, test, best, score, kept, family);
            }
        }

        return null;
    }

    /// <summary>What runs when a candidate is the best so far.</summary>
    private static IEnumerable<StatementSyntax> KeepingStatements(IfStatementSyntax test)
    {
        var then = test.Statement is BlockSyntax block ? block.Statements.ToList() : new List<StatementSyntax> { test.Statement };
        if (then.Count == 1 && then[0] is ContinueStatementSyntax)
        {
            var siblings = Code.Siblings(test);
            return siblings.SkipWhile(s => s != test).Skip(1);
        }

        return then;
    }

    /// <summary>The outermost loop that goes over candidates: the best so far outlives it and is not set anew in it.</summary>
    private static StatementSyntax? FamilyOf(Scene scene, IfStatementSyntax test, ISymbol best)
    {
        StatementSyntax? family = null;
        var declared = best is ILocalSymbol or IParameterSymbol ? best.DeclaringSyntaxReferences[0].GetSyntax() : null;
        for (SyntaxNode? node = test.Parent; node is not null && node != scene.Frame; node = node.Parent)
        {
            StatementSyntax? loop = node switch
            {
                ForStatementSyntax or CommonForEachStatementSyntax or WhileStatementSyntax or DoStatementSyntax => (StatementSyntax)node,
                AnonymousFunctionExpressionSyntax { Parent: ArgumentSyntax } when Code.StatementOf(node) is ExpressionStatementSyntax call => call,
                _ => null,
            };
            if (loop is null)
                continue;
            if (declared is not null && loop.Span.Contains(declared.Span))
                break;
            bool reset = loop.DescendantNodes().OfType<AssignmentExpressionSyntax>()
                .Any(a => !test.Span.Contains(a.Span) && a.Left is IdentifierNameSyntax && !KeepingStatements(test).Any(s => s.Span.Contains(a.Span))
                    && SymbolEqualityComparer.Default.Equals(scene.Model.GetSymbolInfo(a.Left).Symbol, best));
            if (reset)
                break;
            family = loop;
        }

        return family;
    }

    private string? Rewrite(Edits edits)
    {
        if (Code.Siblings(_family).Count == 0)
            return null;
        var turn = new List<SyntaxNode> { _family };
        bool fitsInside = _scene.Mentions(_family, RowsRole.Training);
        var winner = new Winner(_scene, edits);
        var outside = fitsInside ? new List<StatementSyntax>() : winner.FitsBefore(_family);
        turn.InsertRange(0, outside);
        if (RowsPlan.Of(_scene, turn) is not { } plan)
            return null;
        if (plan.HoldsOut)
        {
            foreach (var fit in outside)
                plan.Replace(_scene, fit, edits);
        }

        plan.Replace(_scene, _family, edits);
        var first = plan.HoldsOut && outside.Count > 0 ? outside[0] : _family;
        if (!winner.Follow(_family, _test, _best, _score, _kept, plan.HoldsOut, plan.HoldsOut ? outside : new List<StatementSyntax>()))
            return null;
        winner.InsertBefore(first, plan.Lines);
        if (plan.Using is { } needed)
            edits.Usings.Add(needed);
        return plan.Title;
    }
}
