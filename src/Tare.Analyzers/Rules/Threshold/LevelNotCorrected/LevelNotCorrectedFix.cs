using System.Collections.Immutable;
using System.Composition;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Text;
using Tare.Analyzers.Knowledge;

namespace Tare.CodeFixes.Threshold;

/// <summary>
/// TARE201: holds each p-value to the level divided by how many tests there are, with the expression that counts them. With
/// the runtime library it calls <c>Thresholds</c>, else it writes the formula.
/// </summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(LevelNotCorrectedFix)), Shared]
public sealed class LevelNotCorrectedFix : DocumentFix
{
    /// <summary>Key of the only action.</summary>
    public const string Key = "CorrectLevel";

    /// <inheritdoc/>
    public override ImmutableArray<string> FixableDiagnosticIds => ImmutableArray.Create("TARE201");

    private protected override string Title => "Correct the level for the number of tests";

    private protected override string EquivalenceKey => Key;

    private protected override Edit? EditFor(Place place)
    {
        var node = place.Node;
        return node.FirstAncestorOrSelf<ExpressionSyntax>(e => e.Span == place.Diagnostic.Location.SourceSpan) switch
        {
            BinaryExpressionSyntax binary => Comparison(place, binary),
            IsPatternExpressionSyntax pattern => Pattern(place, pattern),
            _ => null,
        };
    }

    private static Edit? Comparison(Place place, BinaryExpressionSyntax comparison)
    {
        if (LevelIn(place, comparison) is not { } level)
            return null;
        if (Corrected(place, comparison, level, level.ToString(), out bool needsUsing) is not { } corrected)
            return null;
        return new Edit(new TextChange(level.Span, corrected)) { NeedsUsing = needsUsing };
    }

    /// <summary>A pattern takes constants only, so it becomes a comparison.</summary>
    private static Edit? Pattern(Place place, IsPatternExpressionSyntax test)
    {
        bool negated = false;
        var pattern = test.Pattern;
        while (pattern is ParenthesizedPatternSyntax or UnaryPatternSyntax)
        {
            if (pattern is UnaryPatternSyntax not)
            {
                negated = !negated;
                pattern = not.Pattern;
            }
            else
            {
                pattern = ((ParenthesizedPatternSyntax)pattern).Pattern;
            }
        }

        if (pattern is not RelationalPatternSyntax relational || !IsNumber(place.Model.GetTypeInfo(test.Expression, place.Cancel).Type))
            return null;
        if (Corrected(place, test, relational.Expression, relational.Expression.ToString(), out bool needsUsing) is not { } corrected)
            return null;
        // what stands between the operand and the level is replaced, so a comment there would go
        if (HasComment(test.IsKeyword) || HasComment(relational.OperatorToken) || test.Pattern.GetFirstToken() is var first && HasComment(first))
            return null;
        string operand = test.Expression is BinaryExpressionSyntax { RawKind: (int)SyntaxKind.CoalesceExpression } ? $"({test.Expression})" : test.Expression.ToString();
        string text = $"{operand} {relational.OperatorToken.Text} {corrected}";
        return new Edit(new TextChange(test.Span, negated ? $"!({text})" : text)) { NeedsUsing = needsUsing };
    }

    private static bool HasComment(SyntaxToken token) => token.LeadingTrivia.Concat(token.TrailingTrivia).Any(t =>
        t.IsKind(SyntaxKind.SingleLineCommentTrivia) || t.IsKind(SyntaxKind.MultiLineCommentTrivia));

    /// <summary>The side that is the level: the constant, or else the one that is not called what the analyzer calls the p-value.</summary>
    private static ExpressionSyntax? LevelIn(Place place, BinaryExpressionSyntax comparison)
    {
        bool left = IsConstant(place, comparison.Left), right = IsConstant(place, comparison.Right);
        if (left != right)
            return left ? comparison.Left : comparison.Right;
        if (left)
            return null;
        left = SaysLevel(comparison.Left);
        right = SaysLevel(comparison.Right);
        return left == right ? null : left ? comparison.Left : comparison.Right;
    }

    private static bool IsConstant(Place place, ExpressionSyntax expression) => place.Model.GetConstantValue(expression, place.Cancel).HasValue;

    private static bool SaysLevel(ExpressionSyntax expression) => expression switch
    {
        IdentifierNameSyntax name => Vocabulary.SaysLevel(name.Identifier.ValueText),
        MemberAccessExpressionSyntax member => Vocabulary.SaysLevel(member.Name.Identifier.ValueText),
        ParenthesizedExpressionSyntax parenthesised => SaysLevel(parenthesised.Expression),
        BinaryExpressionSyntax binary => SaysLevel(binary.Left) || SaysLevel(binary.Right),
        _ => false,
    };

    private static bool IsNumber(ITypeSymbol? type)
    {
        if (type is INamedTypeSymbol { OriginalDefinition.SpecialType: SpecialType.System_Nullable_T } nullable)
            type = nullable.TypeArguments[0];
        return type?.SpecialType is SpecialType.System_Double or SpecialType.System_Single or SpecialType.System_Decimal;
    }

    private static string? Corrected(Place place, ExpressionSyntax at, ExpressionSyntax level, string text, out bool needsUsing)
    {
        needsUsing = false;
        var type = place.Model.GetTypeInfo(level, place.Cancel).Type;
        // an integer divided by a count would be cut off
        if (type?.SpecialType is not (SpecialType.System_Double or SpecialType.System_Single or SpecialType.System_Decimal))
            return null;
        var family = place.Labelled("family");
        var count = CountExpression.ValidAt(place, at, place.Fact("count"), family) ?? Enclosing(place, at, family);
        if (count is null)
            return null;
        // against a single-precision or decimal p-value the level keeps its type
        bool isDouble = type.SpecialType == SpecialType.System_Double;
        bool sidak = isDouble && place.Fact("correction") == "sidak";
        if (isDouble && place.Library.Has("Thresholds") && place.Library.Spell(place, at.SpanStart, "Thresholds", out needsUsing) is { } thresholds)
            return $"{thresholds}.{(sidak ? "Sidak" : "Bonferroni")}({text}, {count})";
        string divisor = count is BinaryExpressionSyntax ? $"({count})" : count.ToString();
        string dividend = IsOperand(level) ? text : $"({text})";
        if (!sidak)
            return $"{dividend} / {divisor}";
        string math = place.SymbolAt(at.SpanStart, SyntaxFactory.IdentifierName("Math")) is INamedTypeSymbol { ContainingNamespace.Name: "System" } ? "Math" : "System.Math";
        return $"1 - {math}.Pow(1 - {dividend}, 1.0 / {divisor})";
    }

    private static bool IsOperand(ExpressionSyntax level) => level is LiteralExpressionSyntax or IdentifierNameSyntax or MemberAccessExpressionSyntax or InvocationExpressionSyntax
        or ElementAccessExpressionSyntax or ParenthesizedExpressionSyntax or BinaryExpressionSyntax { RawKind: (int)SyntaxKind.MultiplyExpression or (int)SyntaxKind.DivideExpression };

    /// <summary>
    /// Where the analyzer names no count: the collection that the one loop or lambda around the comparison goes through, if
    /// it is held in memory.
    /// </summary>
    private static ExpressionSyntax? Enclosing(Place place, ExpressionSyntax at, SyntaxNode? family)
    {
        if (place.Fact("count") is { } known && !int.TryParse(known, out _))
            return null;
        if (family is null)
            return null;
        ExpressionSyntax? through = null;
        for (SyntaxNode? node = at; node is not null && node != CountExpression.MemberOf(at); node = node.Parent)
        {
            ExpressionSyntax? found;
            switch (node)
            {
                case ForEachStatementSyntax loop:
                    found = loop.Expression;
                    break;
                case LambdaExpressionSyntax { Parent: ArgumentSyntax { Parent.Parent: InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax called } } }:
                    found = called.Expression;
                    break;
                case ForEachVariableStatementSyntax loop:
                    found = loop.Expression;
                    break;
                case QueryExpressionSyntax query when query.Body.Continuation is null && !query.Body.Clauses.Any(c => c is FromClauseSyntax or JoinClauseSyntax):
                    found = query.FromClause.Expression;
                    break;
                case ForStatementSyntax or WhileStatementSyntax or DoStatementSyntax or AnonymousFunctionExpressionSyntax or QueryExpressionSyntax or LocalFunctionStatementSyntax:
                    return null;
                default:
                    continue;
            }

            if (through is not null)
                return null;
            through = found;
        }

        if (through is not (IdentifierNameSyntax or MemberAccessExpressionSyntax))
            return null;
        string? text = CountExpression.Of(through, place.Model.GetTypeInfo(through, place.Cancel).Type);
        return CountExpression.ValidAt(place, at, text, family);
    }
}
