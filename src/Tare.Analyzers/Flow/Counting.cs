using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;

namespace Tare.Analyzers.Flow;

/// <summary>Counts the rounds of a loop whose start, end and step the code shows.</summary>
internal static class Counting
{
    private const int Most = 10_000_000;

    public static double? ToDouble(object constant) => constant switch
    {
        bool => null,
        char => null,
        string => null,
        IConvertible c => SafeToDouble(c),
        _ => null,
    };

    private static double? SafeToDouble(IConvertible c)
    {
        try
        {
            return c.ToDouble(System.Globalization.CultureInfo.InvariantCulture);
        }
        catch (Exception e) when (e is FormatException or InvalidCastException or OverflowException)
        {
            return null;
        }
    }

    public static double? Apply(BinaryOperatorKind kind, double a, double b) => kind switch
    {
        BinaryOperatorKind.Add => a + b,
        BinaryOperatorKind.Subtract => a - b,
        BinaryOperatorKind.Multiply => a * b,
        BinaryOperatorKind.Divide => a / b,
        _ => null,
    };

    public static double? For(IForLoopOperation loop, Func<IOperation, double?> number)
    {
        if (loop.Locals.Length == 0 || loop.Before.Length == 0 || loop.AtLoopBottom.Length != 1 || loop.Condition is not IBinaryOperation condition)
            return null;
        ILocalSymbol? local = null;
        double? start = null;
        foreach (var before in loop.Before)
        {
            if (before is not IVariableDeclarationGroupOperation group)
                continue;
            foreach (var declaration in group.Declarations)
            {
                foreach (var declarator in declaration.Declarators)
                {
                    if (!Mentions(condition, declarator.Symbol))
                        continue;
                    local = declarator.Symbol;
                    start = (declarator.Initializer ?? declaration.Initializer) is { } initial ? number(initial.Value) : null;
                }
            }
        }

        if (local is null || start is null)
            return null;
        var step = StepOf(Unwrap(loop.AtLoopBottom[0]), local, number);
        return Rounds(local, start.Value, condition, step, number, local.Type.SpecialType);
    }

    public static double? While(IWhileLoopOperation loop, Func<IOperation, double?> number)
    {
        if (loop.Condition is not IBinaryOperation condition || loop.ConditionIsUntil)
            return null;
        var reference = Reference(condition.LeftOperand) ?? Reference(condition.RightOperand);
        if (reference is null)
            return null;
        (Func<double, double> Step, bool Known) step = default;
        int steps = 0;
        foreach (var descendant in loop.Body.Descendants())
        {
            var found = StepOf(descendant, reference, number);
            if (!found.Known)
                continue;
            step = found;
            steps++;
        }

        if (steps != 1)
            return null;
        // the value before the loop: found at the declaration, when nothing else was assigned in between
        return StartOf(loop, reference, number) is { } start ? Rounds(reference, start, condition, step, number, reference.Type.SpecialType, !loop.ConditionIsTop) : null;
    }

    /// <summary>For `for (int i = 0; i &lt; xs.Length; i++)`: the text `xs.Length`.</summary>
    public static string? ForText(IForLoopOperation loop)
    {
        if (loop.Syntax is not ForStatementSyntax { Declaration.Variables: { Count: 1 } variables, Condition: BinaryExpressionSyntax condition, Incrementors: { Count: 1 } steps })
            return null;
        string name = variables[0].Identifier.ValueText;
        bool unit = steps[0] is PostfixUnaryExpressionSyntax { RawKind: (int)SyntaxKind.PostIncrementExpression } or PrefixUnaryExpressionSyntax { RawKind: (int)SyntaxKind.PreIncrementExpression };
        if (!unit || variables[0].Initializer?.Value.ToString() is not { } start || condition.Left.ToString() != name)
            return null;
        return (condition.Kind(), start) switch
        {
            (SyntaxKind.LessThanExpression, "0") => condition.Right.ToString(),
            (SyntaxKind.LessThanOrEqualExpression, "1") => condition.Right.ToString(),
            _ => null,
        };
    }

    private static double? StartOf(IWhileLoopOperation loop, ILocalSymbol local, Func<IOperation, double?> number)
    {
        if (local.DeclaringSyntaxReferences.Length == 0)
            return null;
        var syntax = local.DeclaringSyntaxReferences[0].GetSyntax();
        for (var op = loop.Parent; op is not null; op = op.Parent)
        {
            foreach (var child in op.ChildOperations)
            {
                if (child.Syntax.SpanStart > loop.Syntax.SpanStart)
                    break;
                if (child is IVariableDeclarationGroupOperation group)
                {
                    foreach (var declaration in group.Declarations)
                    {
                        foreach (var declarator in declaration.Declarators)
                        {
                            if (declarator.Syntax == syntax)
                                return (declarator.Initializer ?? declaration.Initializer) is { } initial ? number(initial.Value) : null;
                        }
                    }
                }
            }
        }

        return null;
    }

    private static double? Rounds(
        ILocalSymbol local, double start, IBinaryOperation condition, (Func<double, double> Step, bool Known) step, Func<IOperation, double?> number, SpecialType type, bool atLeastOne = false)
    {
        if (!step.Known)
            return null;
        bool left = SymbolEqualityComparer.Default.Equals(Reference(condition.LeftOperand), local);
        bool right = SymbolEqualityComparer.Default.Equals(Reference(condition.RightOperand), local);
        if (left == right || number(left ? condition.RightOperand : condition.LeftOperand) is not { } bound)
            return null;
        bool Goes(double v)
        {
            double a = left ? v : bound, b = left ? bound : v;
            return condition.OperatorKind switch
            {
                BinaryOperatorKind.LessThan => a < b,
                BinaryOperatorKind.LessThanOrEqual => a <= b,
                BinaryOperatorKind.GreaterThan => a > b,
                BinaryOperatorKind.GreaterThanOrEqual => a >= b,
                BinaryOperatorKind.NotEquals => a != b,
                _ => false,
            };
        }

        double value = start;
        int rounds = 0;
        while ((Goes(value) || (atLeastOne && rounds == 0)) && rounds < Most)
        {
            rounds++;
            double next = step.Step(value);
            if (type == SpecialType.System_Single)
                next = (float)next;
            else if (type == SpecialType.System_Decimal)
                next = Math.Round(next, 12);
            if (next == value)
                return null;
            value = next;
        }

        return rounds is 0 or Most ? null : rounds;
    }

    private static (Func<double, double> Step, bool Known) StepOf(IOperation operation, ILocalSymbol local, Func<IOperation, double?> number)
    {
        switch (operation)
        {
            case IIncrementOrDecrementOperation step when Is(step.Target, local):
                return operation.Kind == OperationKind.Increment ? (v => v + 1, true) : (v => v - 1, true);
            case ICompoundAssignmentOperation compound when Is(compound.Target, local) && number(compound.Value) is { } by:
                return (v => Apply(compound.OperatorKind, v, by) ?? v, true);
            case ISimpleAssignmentOperation { Value: var assigned } assignment when Is(assignment.Target, local) && Unconverted(assigned) is IBinaryOperation binary:
                if (Is(Unconverted(binary.LeftOperand), local) && number(binary.RightOperand) is { } r)
                    return (v => Apply(binary.OperatorKind, v, r) ?? v, true);
                if (Is(Unconverted(binary.RightOperand), local) && number(binary.LeftOperand) is { } l)
                    return (v => Apply(binary.OperatorKind, l, v) ?? v, true);
                break;
        }

        return (v => v, false);
    }

    private static IOperation Unwrap(IOperation operation) => operation is IExpressionStatementOperation statement ? statement.Operation : operation;

    private static IOperation Unconverted(IOperation operation) => operation is IConversionOperation conversion ? Unconverted(conversion.Operand) : operation;

    private static bool Is(IOperation operation, ILocalSymbol local) => SymbolEqualityComparer.Default.Equals(Reference(operation), local);

    private static ILocalSymbol? Reference(IOperation operation) => (Unconverted(operation) as ILocalReferenceOperation)?.Local;

    private static bool Mentions(IOperation operation, ILocalSymbol local)
    {
        foreach (var descendant in operation.DescendantsAndSelf())
        {
            if (descendant is ILocalReferenceOperation reference && SymbolEqualityComparer.Default.Equals(reference.Local, local))
                return true;
        }

        return false;
    }
}
