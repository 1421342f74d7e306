using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>Which values of a candidate's turn change with the rows.</summary>
internal sealed class Dependence
{
    private readonly Scene _scene;
    private readonly SyntaxNode _anchor;
    private readonly SyntaxNode _region;
    private readonly bool _refit;
    private readonly IReadOnlyList<StatementSyntax> _outside;

    /// <param name="refit">Models change too: the winner is fitted again.</param>
    /// <param name="outside">Statements before the region that fit something all candidates use.</param>
    public Dependence(Scene scene, SyntaxNode anchor, SyntaxNode region, bool refit, IReadOnlyList<StatementSyntax> outside)
    {
        _scene = scene;
        _anchor = anchor;
        _region = region;
        _refit = refit;
        _outside = outside;
    }

    public (bool Depends, bool OnTest) Of(ExpressionSyntax value)
    {
        if (value is IdentifierNameSyntax name && IsLoopVariable(name))
            return (false, false);
        var slice = new Slice(_scene, static _ => false);
        slice.Need(value);
        slice.Back(_anchor, _region);
        var rows = slice.Nodes.Append(value).SelectMany(_scene.RowsIn).ToList();
        bool onTest = rows.Any(r => r.Rows.Role == RowsRole.Test);
        bool depends = onTest || (_refit && (rows.Any(r => r.Rows.Role == RowsRole.Training) || _outside.Any(o => slice.Defines(o).Any(slice.IsNeeded))));
        return (depends, onTest);
    }

    /// <summary>Whether a name is a candidate's variable: another object each turn, the same one throughout a turn.</summary>
    public bool IsLoopVariable(IdentifierNameSyntax name)
    {
        if (_scene.Model.GetSymbolInfo(name).Symbol is not { DeclaringSyntaxReferences.Length: 1 } symbol)
            return false;
        var declared = symbol.DeclaringSyntaxReferences[0].GetSyntax();
        return _region.Span.Contains(declared.Span)
            && (declared is ForEachStatementSyntax or ParameterSyntax or FromClauseSyntax || declared.Parent?.Parent is ForStatementSyntax || declared.FirstAncestorOrSelf<ForEachVariableStatementSyntax>(f => f.Variable.Span.Contains(declared.Span)) is not null);
    }
}
