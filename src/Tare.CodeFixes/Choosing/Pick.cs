using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>A choosing call, what it chooses from, and the statement that holds the winner.</summary>
internal sealed class Pick
{
    private static readonly HashSet<string> Passing = new(StringComparer.Ordinal)
        { "First", "FirstOrDefault", "Last", "LastOrDefault", "Single", "SingleOrDefault", "Take", "ThenBy", "ThenByDescending", "Reverse", "ToList", "ToArray", "ElementAt", "Where", "AsEnumerable" };

    private Pick(ElementTurn turn, bool isCandidate, StatementSyntax statement, string? winner)
    {
        Turn = turn;
        IsCandidate = isCandidate;
        Statement = statement;
        Winner = winner;
    }

    public ElementTurn Turn { get; }

    /// <summary>The winner is the candidate itself, scored in the key; otherwise it is an element.</summary>
    public bool IsCandidate { get; }

    /// <summary>The statement after which the winner is known.</summary>
    public StatementSyntax Statement { get; }

    /// <summary>Code that names the winner; null when its parts have names of their own.</summary>
    public string? Winner { get; }

    /// <summary>Names of the winner's parts, in order, where it is taken apart.</summary>
    public List<string>? Parts { get; private set; }

    /// <summary>The winner is one member of the element.</summary>
    public string? Member { get; private set; }

    /// <summary>The winner is the place of the best score.</summary>
    public bool IsIndex { get; private set; }

    /// <summary>The sequence of scores, where the winner is a place in it.</summary>
    public ExpressionSyntax? Scores { get; private set; }

    public static Pick? Of(Scene scene)
    {
        if (scene.Choice.FirstAncestorOrSelf<OrderByClauseSyntax>() is { } order && order.FirstAncestorOrSelf<QueryExpressionSyntax>() is { } query)
            return ElementTurn.Of(scene, query) is { } queried ? Held(scene, query, queried, false) : null;
        if (scene.Choice.FirstAncestorOrSelf<InvocationExpressionSyntax>() is not { Expression: MemberAccessExpressionSyntax called } call)
            return null;
        string name = called.Name.Identifier.ValueText;
        if (name is "IndexOf" or "FindIndex")
            return Index(scene, call, called);
        if (name == "Sort")
            return Sorted(scene, call, called);
        var key = call.ArgumentList.Arguments.Count > 0 ? call.ArgumentList.Arguments[0].Expression as AnonymousFunctionExpressionSyntax : null;
        if (key is not null && scene.Mentions(key, RowsRole.Test))
            return ElementTurn.OfLambda(scene, key, called.Expression) is { } scored ? Held(scene, call, scored, true) : null;
        return ElementTurn.Of(scene, called.Expression) is { } turn ? Held(scene, call, turn, false) : null;
    }

    private static Pick? Index(Scene scene, InvocationExpressionSyntax call, MemberAccessExpressionSyntax called)
    {
        var scores = scene.Model.GetSymbolInfo(call).Symbol is IMethodSymbol { IsStatic: true, ContainingType.Name: "Array" } && call.ArgumentList.Arguments.Count > 0 ? call.ArgumentList.Arguments[0].Expression : called.Expression;
        if (ElementTurn.Of(scene, scores) is not { } turn || Held(scene, call, turn, false) is not { Winner: not null } pick)
            return null;
        pick.IsIndex = true;
        pick.Scores = scores;
        return pick;
    }

    /// <summary>A list put in order: the winner is its first element, where that is read.</summary>
    private static Pick? Sorted(Scene scene, InvocationExpressionSyntax call, MemberAccessExpressionSyntax called)
    {
        if (Code.StatementOf(call) is not ExpressionStatementSyntax sort || ElementTurn.Of(scene, called.Expression) is not { } turn)
            return null;
        string list = called.Expression.ToString();
        var reads = Code.Siblings(sort).SkipWhile(s => s != sort).Skip(1).SelectMany(s => s.DescendantNodes()).OfType<ExpressionSyntax>()
            .Where(e => Code.Key(e) is var k && (k == list + "[0]" || k == list + "[^1]" || k == list + "[" + list + ".Count-1]" || k == list + ".First()" || k == list + ".Last()")).ToList();
        if (reads.Count == 0)
            return null;
        if (reads.Select(Code.Key).Distinct().Count() == 1 && Held(scene, reads[0], turn, false) is { } held)
            return held;
        return reads.Select(Code.Key).Distinct().Count() == 1 ? new Pick(turn, false, sort, reads[0].ToString()) : null;
    }

    /// <summary>The variable that the winner is put into.</summary>
    private static Pick? Held(Scene scene, ExpressionSyntax chosen, ElementTurn turn, bool isCandidate)
    {
        var whole = chosen;
        string? member = null;
        while (true)
        {
            switch (whole.Parent)
            {
                case ParenthesizedExpressionSyntax or PostfixUnaryExpressionSyntax { RawKind: (int)SyntaxKind.SuppressNullableWarningExpression }:
                    whole = (ExpressionSyntax)whole.Parent;
                    continue;
                case ElementAccessExpressionSyntax element when element.Expression == whole:
                    whole = element;
                    continue;
                case MemberAccessExpressionSyntax access when access.Expression == whole && access.Parent is InvocationExpressionSyntax invoked && Passing.Contains(access.Name.Identifier.ValueText):
                    whole = invoked;
                    continue;
                case MemberAccessExpressionSyntax access when access.Expression == whole && access.Parent is not InvocationExpressionSyntax && member is null:
                    member = access.Name.Identifier.ValueText;
                    whole = access;
                    continue;
            }

            break;
        }

        switch (whole.Parent)
        {
            case EqualsValueClauseSyntax { Parent: VariableDeclaratorSyntax variable } when Code.StatementOf(whole) is LocalDeclarationStatementSyntax statement:
                return IsOne(scene, variable)
                    ? new Pick(turn, isCandidate, statement, variable.Identifier.Text) { Member = member }
                    : FirstRead(scene, variable.Identifier.Text, statement, turn, isCandidate);
            case AssignmentExpressionSyntax { Left: DeclarationExpressionSyntax { Designation: ParenthesizedVariableDesignationSyntax parts }, Parent: ExpressionStatementSyntax statement }:
                return new Pick(turn, isCandidate, statement, null) { Parts = parts.Variables.Select(v => v.ToString()).ToList(), Member = member };
            case AssignmentExpressionSyntax { Left: TupleExpressionSyntax targets, Parent: ExpressionStatementSyntax statement }:
                return new Pick(turn, isCandidate, statement, null) { Parts = targets.Arguments.Select(a => a.Expression is DeclarationExpressionSyntax d ? d.Designation.ToString() : a.Expression.ToString()).ToList(), Member = member };
            case AssignmentExpressionSyntax { Parent: ExpressionStatementSyntax statement } assignment when assignment.Right == whole && assignment.IsKind(SyntaxKind.SimpleAssignmentExpression):
                return new Pick(turn, isCandidate, statement, assignment.Left.ToString()) { Member = member };
            default:
                return null;
        }
    }

    private static bool IsOne(Scene scene, VariableDeclaratorSyntax variable) => variable.Initializer!.Value is var value
        && !(value is InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax { Name.Identifier.ValueText: "OrderBy" or "OrderByDescending" or "ThenBy" or "ThenByDescending" or "ToList" or "ToArray" or "Take" or "Reverse" or "Where" } } or QueryExpressionSyntax or ParenthesizedExpressionSyntax { Expression: QueryExpressionSyntax });

    /// <summary>An ordered sequence in a variable: the winner is where its first element is read.</summary>
    private static Pick? FirstRead(Scene scene, string list, StatementSyntax ordered, ElementTurn turn, bool isCandidate)
    {
        var reads = Code.Siblings(ordered).SkipWhile(s => s != ordered).Skip(1).SelectMany(s => s.DescendantNodes()).OfType<ExpressionSyntax>()
            .Where(e => Code.Key(e) is var k && (k == list + "[0]" || k == list + ".First()")).ToList();
        if (reads.Count == 0 || reads.Select(Code.Key).Distinct().Count() != 1)
            return null;
        return Held(scene, reads[0], turn, isCandidate) ?? new Pick(turn, isCandidate, ordered, reads[0].ToString());
    }
}
