using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.CodeFixes.Choosing;

/// <summary>A variable and what it is given either way.</summary>
internal sealed class TwoWaysValue
{
    public TwoWaysValue(string target, ISymbol? symbol, ExpressionSyntax ifTrue, ExpressionSyntax ifFalse)
    {
        Target = target;
        Symbol = symbol;
        IfTrue = ifTrue;
        IfFalse = ifFalse;
    }

    public string Target { get; }

    public ISymbol? Symbol { get; }

    public ExpressionSyntax IfTrue { get; }

    public ExpressionSyntax IfFalse { get; }
}
