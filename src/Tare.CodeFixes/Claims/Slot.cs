using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Text;

namespace Tare.CodeFixes.Claims;

/// <summary>A place in a reporting call where a number turns into text: a hole of an interpolated string, an operand, an argument.</summary>
internal sealed class Slot
{
    private Slot(ExpressionSyntax whole, ExpressionSyntax number, bool percent)
    {
        Whole = whole;
        Number = number;
        IsPercent = percent;
    }

    /// <summary>All that the claim replaces: with `ToString`, rounding and a factor of 100.</summary>
    public ExpressionSyntax Whole { get; }

    /// <summary>The number itself.</summary>
    public ExpressionSyntax Number { get; }

    public bool IsPercent { get; }

    /// <summary>The argument must stay a string.</summary>
    public bool MustBeText { get; private set; }

    /// <summary>The format string that names this slot, and its index there.</summary>
    public (LiteralExpressionSyntax Format, int Index)? Composite { get; private set; }

    /// <summary>All slots of a reporting call, through strings that were put together before it.</summary>
    public static IEnumerable<Slot> In(Place place, InvocationExpressionSyntax call)
    {
        var found = new List<Slot>();
        var method = place.Model.GetSymbolInfo(call, place.Cancel).Symbol as IMethodSymbol;
        Arguments(place, call.ArgumentList, method, found);
        return found;
    }

    private static void Arguments(Place place, ArgumentListSyntax list, IMethodSymbol? method, List<Slot> found)
    {
        var format = list.Arguments.Select(a => a.Expression).OfType<LiteralExpressionSyntax>().FirstOrDefault(l => l.IsKind(SyntaxKind.StringLiteralExpression) && l.Token.ValueText.Contains('{'));
        int formatAt = format is null ? -1 : list.Arguments.IndexOf(a => a.Expression == format);
        for (int i = 0; i < list.Arguments.Count; i++)
        {
            int before = found.Count;
            var argument = list.Arguments[i].Expression;
            Parts(place, argument, found, depth: 0);
            if (found.Count == before + 1 && found[before].Whole == argument)
            {
                if (formatAt >= 0 && i > formatAt)
                    found[before].Composite = (format!, i - formatAt - 1);
                else if (!TakesObjects(place, method))
                    found[before].MustBeText = place.Model.GetTypeInfo(argument, place.Cancel).Type?.SpecialType == SpecialType.System_String;
                if (formatAt < 0 && !found[before].MustBeText && !TakesObjects(place, method))
                    found.RemoveAt(before);
            }
        }
    }

    /// <summary>`WriteLine(double)` has a sister that takes any object.</summary>
    private static bool TakesObjects(Place place, IMethodSymbol? method) => method is not null && method.ContainingType.GetMembers(method.Name).OfType<IMethodSymbol>()
        .Any(m => m.IsStatic == method.IsStatic && m.Parameters.Length == 1 && m.Parameters[0].Type.SpecialType == SpecialType.System_Object);

    private static void Parts(Place place, ExpressionSyntax expression, List<Slot> found, int depth)
    {
        if (depth > 20)
            return;
        switch (expression)
        {
            case ParenthesizedExpressionSyntax parenthesised:
                Parts(place, parenthesised.Expression, found, depth + 1);
                return;
            case InterpolatedStringExpressionSyntax text:
                foreach (var hole in text.Contents.OfType<InterpolationSyntax>())
                    Parts(place, hole.Expression, found, depth + 1);
                return;
            case BinaryExpressionSyntax { RawKind: (int)SyntaxKind.AddExpression } sum when IsText(place, sum):
                // the operand takes part in a concatenation only while the other one is a string
                Parts(place, sum.Left, found, depth + 1);
                Parts(place, sum.Right, found, depth + 1);
                return;
            case InvocationExpressionSyntax invocation when place.Model.GetSymbolInfo(invocation, place.Cancel).Symbol is IMethodSymbol method && MakesText(method):
                Arguments(place, invocation.ArgumentList, method, found);
                return;
            case IdentifierNameSyntax name when IsText(place, name) && place.Model.GetSymbolInfo(name, place.Cancel).Symbol is ILocalSymbol local && Initial(local, name) is { } initial:
                Parts(place, initial, found, depth + 1);
                return;
        }

        if (Core(place, expression, out bool percent) is { } number)
            found.Add(new Slot(expression, number, percent));
    }

    private static bool MakesText(IMethodSymbol method) => (method.ContainingType.Name, method.Name) switch
    {
        ("String", "Format" or "Concat") => true,
        ("FormattableString", "Invariant" or "CurrentCulture") => true,
        _ => false,
    };

    private static ExpressionSyntax? Initial(ILocalSymbol local, SyntaxNode use) =>
        local.DeclaringSyntaxReferences.Length == 1 && local.DeclaringSyntaxReferences[0].GetSyntax() is VariableDeclaratorSyntax { Initializer.Value: { } value } declarator
        && CountExpression.MemberOf(declarator) == CountExpression.MemberOf(use)
        && CountExpression.MemberOf(use)!.DescendantNodes().OfType<IdentifierNameSyntax>().Count(i => i.Identifier.ValueText == local.Name) == 1 ? value : null;

    /// <summary>The number within `x.ToString("F3")`, `Math.Round(x, 3)`, `(float)x` or `100 * x`.</summary>
    private static ExpressionSyntax? Core(Place place, ExpressionSyntax expression, out bool percent)
    {
        percent = false;
        while (true)
        {
            switch (expression)
            {
                case ParenthesizedExpressionSyntax parenthesised:
                    expression = parenthesised.Expression;
                    continue;
                case CastExpressionSyntax cast when IsReal(place.Model.GetTypeInfo(cast.Expression, place.Cancel).Type):
                    expression = cast.Expression;
                    continue;
                case InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax { Name.Identifier.ValueText: "ToString" } called }:
                    expression = called.Expression;
                    continue;
                case InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax { Name.Identifier.ValueText: "Round" } called, ArgumentList.Arguments: { Count: > 0 } arguments }
                    when called.Expression.ToString() is "Math" or "System.Math" or "MathF":
                    expression = arguments[0].Expression;
                    continue;
                case BinaryExpressionSyntax { RawKind: (int)SyntaxKind.MultiplyExpression } product when !percent && (IsHundred(place, product.Left) || IsHundred(place, product.Right)):
                    percent = true;
                    expression = IsHundred(place, product.Left) ? product.Right : product.Left;
                    continue;
                default:
                    return IsReal(place.Model.GetTypeInfo(expression, place.Cancel).Type) && !place.Model.GetConstantValue(expression, place.Cancel).HasValue ? expression : null;
            }
        }
    }

    private static bool IsHundred(Place place, ExpressionSyntax expression) =>
        place.Model.GetConstantValue(expression, place.Cancel) is { HasValue: true, Value: 100 or 100.0 or 100f };

    private static bool IsText(Place place, ExpressionSyntax expression) => place.Model.GetTypeInfo(expression, place.Cancel).Type?.SpecialType == SpecialType.System_String;

    private static bool IsReal(ITypeSymbol? type) => type?.SpecialType is SpecialType.System_Double or SpecialType.System_Single;

    /// <summary>The changes that put a claim here and drop formats and percent signs that belonged to the number.</summary>
    public IEnumerable<TextChange> Replace(string claim)
    {
        if (Whole.Parent is InterpolationSyntax hole)
        {
            string text = claim.StartsWith("global::", StringComparison.Ordinal) ? $"({claim})" : claim;
            yield return new TextChange(TextSpan.FromBounds(Whole.SpanStart, hole.CloseBraceToken.SpanStart), text);
            if (IsPercent && hole.Parent is InterpolatedStringExpressionSyntax whole && whole.Contents.IndexOf(hole) is var at && at + 1 < whole.Contents.Count
                && whole.Contents[at + 1] is InterpolatedStringTextSyntax after && PercentIn(after.TextToken.Text) is > 0 and var length)
                yield return new TextChange(new TextSpan(after.SpanStart, length), "");
            yield break;
        }

        yield return new TextChange(Whole.Span, MustBeText ? claim + ".ToString()" : claim);
        if (Composite is var (format, index))
        {
            string text = format.Token.Text;
            int start = text.IndexOf("{" + index + ":", StringComparison.Ordinal);
            if (start < 0)
                start = text.IndexOf("{" + index + ",", StringComparison.Ordinal);
            if (start < 0 && NamedHole(text, index) is { } named)
                start = named;
            if (start < 0)
                yield break;
            int end = text.IndexOf('}', start);
            int colon = text.IndexOfAny(new[] { ',', ':' }, start);
            if (end > start && colon > start && colon < end)
                yield return new TextChange(TextSpan.FromBounds(format.SpanStart + colon, format.SpanStart + end), "");
            if (IsPercent && PercentIn(text.Substring(end + 1)) is > 0 and var length)
                yield return new TextChange(new TextSpan(format.SpanStart + end + 1, length), "");
        }
    }

    /// <summary>Holes with names, as loggers have them, count from the left.</summary>
    private static int? NamedHole(string text, int index)
    {
        int at = -1;
        for (int i = 0; i <= index; i++)
        {
            at = text.IndexOf('{', at + 1);
            if (at < 0 || at + 1 >= text.Length || !char.IsLetter(text[at + 1]))
                return null;
        }

        return at;
    }

    private static int PercentIn(string text) =>
        text.StartsWith("%", StringComparison.Ordinal) ? 1 : text.StartsWith(" %", StringComparison.Ordinal) ? 2 : 0;
}
