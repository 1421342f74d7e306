using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.Operations;

namespace Tare.CodeFixes.Claims;

/// <summary>
/// Decides whether a value is a share of rows: a count of rows over the number of all of them. Only then does it become a
/// count again that an exact test may be made of; a mean of means, an AUC or a profit does not.
/// </summary>
internal sealed class Proportion
{
    private readonly Place _place;
    private readonly SyntaxNode _at;
    private readonly Writes _writes;
    private readonly HashSet<string> _rows = new(StringComparer.Ordinal);

    public Proportion(Place place, SyntaxNode at, Writes writes)
    {
        _place = place;
        _at = at;
        _writes = writes;
    }

    /// <summary>The expression that counts the rows, valid at the place; null when the value is no share of rows in reach.</summary>
    public string? RowsOf(IOperation value)
    {
        _rows.Clear();
        return new Tracing(_writes, Share, _place.Cancel).Follow(value, new Bindings()) && _rows.Count == 1 ? _rows.First() : null;
    }

    private bool? Share(IOperation op, Bindings bindings)
    {
        switch (op)
        {
            case IBinaryOperation { OperatorKind: BinaryOperatorKind.Divide } division:
                return IsCount(division.LeftOperand, bindings) && Rows(division.RightOperand, bindings);
            case IBinaryOperation { OperatorKind: BinaryOperatorKind.Subtract, LeftOperand: var one } rest when IsNumber(one, 1):
                return new Tracing(_writes, Share, _place.Cancel).Follow(rest.RightOperand, bindings);
            case IInvocationOperation { TargetMethod: { Name: "Average", ContainingType.Name: "Enumerable" } } average:
                return Average(average, bindings);
            case IBinaryOperation or IUnaryOperation or ICompoundAssignmentOperation:
                return false;
            default:
                return null;
        }
    }

    /// <summary>`rows.Average(r => right ? 1.0 : 0.0)`, with or without a `Select` before it.</summary>
    private bool Average(IInvocationOperation average, Bindings bindings)
    {
        var source = average.Arguments[0].Value;
        var selector = average.Arguments.Length > 1 ? average.Arguments[1].Value : null;
        if (selector is null)
        {
            if (Strip(source) is not IInvocationOperation { TargetMethod: { Name: "Select", ContainingType.Name: "Enumerable" } } select)
                return false;
            source = select.Arguments[0].Value;
            selector = select.Arguments[1].Value;
        }

        return IsIndicator(selector) && Collection(source, bindings);
    }

    private bool IsCount(IOperation op, Bindings bindings) => new Tracing(_writes, Count, _place.Cancel).Follow(op, bindings);

    private bool? Count(IOperation op, Bindings bindings)
    {
        switch (op)
        {
            case ILocalReferenceOperation { Local: var local } when _writes.To(local).ToList() is var writes && writes.Any(w => w.Value is null):
                return writes.All(w => w.Into.IsEmpty && (w.Value is null ? Steps(w.Syntax) : w.Value.ConstantValue.HasValue && IsNumber(w.Value, 0)));
            case IInvocationOperation { TargetMethod: { Name: "Count" or "LongCount", ContainingType.Name: "Enumerable" or "ParallelEnumerable" } } counting:
                return counting.Arguments.Length > 1 || Strip(counting.Arguments[0].Value) is IInvocationOperation { TargetMethod.Name: "Where" };
            case IInvocationOperation { TargetMethod: { Name: "Sum", ContainingType.Name: "Enumerable" }, Arguments: { Length: 2 } arguments }:
                return IsIndicator(arguments[1].Value);
            case IBinaryOperation { OperatorKind: BinaryOperatorKind.Multiply } product when IsNumber(product.LeftOperand, 1):
                return IsCount(product.RightOperand, bindings);
            case IBinaryOperation or IUnaryOperation:
                return false;
            default:
                return null;
        }
    }

    /// <summary>`hits++`, `hits += 1`, `hits += right ? 1 : 0`, `Interlocked.Increment(ref hits)`.</summary>
    private static bool Steps(IOperation op) => op switch
    {
        IIncrementOrDecrementOperation { Kind: OperationKind.Increment } => true,
        ICompoundAssignmentOperation { OperatorKind: BinaryOperatorKind.Add } add => IsNumber(add.Value, 1) || IsZeroOrOne(add.Value),
        IArgumentOperation { Parent: IInvocationOperation { TargetMethod: { Name: "Increment", ContainingType.Name: "Interlocked" } } } => true,
        _ => false,
    };

    private static bool IsIndicator(IOperation function) => Strip(function) switch
    {
        IDelegateCreationOperation creation => IsIndicator(creation.Target),
        IAnonymousFunctionOperation { Body.Operations: { Length: 1 } body } => body[0] is IReturnOperation { ReturnedValue: { } value } && IsZeroOrOne(value),
        _ => false,
    };

    private static bool IsZeroOrOne(IOperation op) => Strip(op) is IConditionalOperation { WhenFalse: { } no } either
        && ((IsNumber(either.WhenTrue, 1) && IsNumber(no, 0)) || (IsNumber(either.WhenTrue, 0) && IsNumber(no, 1)));

    private bool Rows(IOperation count, Bindings bindings)
    {
        switch (Strip(count))
        {
            case IPropertyReferenceOperation { Property.Name: "Length" or "LongLength" or "Count", Instance: { } rows }:
                return Collection(rows, bindings);
            case IInvocationOperation { TargetMethod: { Name: "Count", ContainingType.Name: "Enumerable" }, Arguments: { Length: 1 } arguments }:
                return Collection(arguments[0].Value, bindings);
            case ILocalReferenceOperation { Local: var local } when _writes.To(local).ToList() is { Count: 1 } writes && writes[0] is { Value: { } value, From.IsEmpty: true }:
                return Rows(value, bindings);
            case IParameterReferenceOperation { Parameter: var parameter } when bindings.TryGet(parameter, out var bound, out var of, out bool element) && !element:
                return Rows(bound, of);
            default:
                return false;
        }
    }

    /// <summary>The rows are a variable that the place of the claim knows and that nothing replaces.</summary>
    private bool Collection(IOperation rows, Bindings bindings)
    {
        rows = Strip(rows);
        ISymbol symbol;
        switch (rows)
        {
            case IParameterReferenceOperation reference when bindings.TryGet(reference.Parameter, out var bound, out var of, out bool element):
                return !element && Collection(bound, of);
            case IParameterReferenceOperation reference:
                symbol = reference.Parameter;
                break;
            case ILocalReferenceOperation reference:
                symbol = reference.Local;
                break;
            case IFieldReferenceOperation { Instance: null or IInstanceReferenceOperation, Field: { } field }:
                symbol = field;
                break;
            default:
                return false;
        }

        var name = SyntaxFactory.IdentifierName(symbol.Name);
        if (!SymbolEqualityComparer.Default.Equals(_place.SymbolAt(_at.SpanStart, name), symbol))
        {
            // a helper's own name for rows that came from outside
            return symbol is ILocalSymbol && _writes.To(symbol).ToList() is { Count: 1 } only && only[0] is { Value: { } value, From.IsEmpty: true } && Collection(value, bindings);
        }

        if (symbol is ILocalSymbol && _writes.To(symbol).Count() > 1 || symbol is IParameterSymbol && _writes.To(symbol).Any() || symbol is IFieldSymbol { IsReadOnly: false })
            return false;
        if (CountExpression.Of(name, (symbol as ILocalSymbol)?.Type ?? (symbol as IParameterSymbol)?.Type ?? ((symbol as IFieldSymbol)?.Type)) is not { } text)
            return false;
        _rows.Add(text);
        return true;
    }

    private static IOperation Strip(IOperation op) => op is IConversionOperation conversion ? Strip(conversion.Operand) : op;

    private static bool IsNumber(IOperation op, double number) =>
        op.ConstantValue is { HasValue: true, Value: IConvertible value and not (string or bool or char) } && value.ToDouble(System.Globalization.CultureInfo.InvariantCulture) == number;
}
