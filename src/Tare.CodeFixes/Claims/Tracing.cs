using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using Tare.Analyzers.Flow;

namespace Tare.CodeFixes.Claims;

/// <summary>
/// Goes back from a value to the expressions it may have been computed by: through variables, tuples, records, collections,
/// LINQ and methods with a body. What it cannot see through makes the whole trace fail.
/// </summary>
internal sealed class Tracing
{
    private const int MostSteps = 400;
    private readonly Writes _writes;
    private readonly Func<IOperation, Bindings, bool?> _leaf;
    private readonly CancellationToken _cancel;
    private readonly HashSet<(ISymbol, string)> _seen = new();
    private int _steps;

    /// <param name="leaf">Judges an expression: true or false ends the trace there, null goes on.</param>
    public Tracing(Writes writes, Func<IOperation, Bindings, bool?> leaf, CancellationToken cancel)
    {
        _writes = writes;
        _leaf = leaf;
        _cancel = cancel;
    }

    /// <summary>Every expression the value may come from was judged true.</summary>
    public bool Follow(IOperation? value, Bindings bindings) => Walk(value, ImmutableList<string>.Empty, bindings);

    private bool Walk(IOperation? op, ImmutableList<string> way, Bindings bindings)
    {
        if (op is null || ++_steps > MostSteps)
            return false;
        if (op is IConversionOperation conversion)
            return Walk(conversion.Operand, way, bindings);
        if (op is IAwaitOperation awaited)
            return Walk(awaited.Operation, way, bindings);
        // where a running best starts from is no score: 0, -1, double.MinValue, null
        if (op.ConstantValue.HasValue || op is IDefaultValueOperation or IThrowOperation or IFieldReferenceOperation { Field: { IsStatic: true, ContainingType.SpecialType: SpecialType.System_Double } })
            return way.IsEmpty || op.ConstantValue is { HasValue: true, Value: null } or { HasValue: false };
        if (way.IsEmpty && _leaf(op, bindings) is { } judged)
            return judged;
        switch (op)
        {
            case ILocalReferenceOperation reference:
                return Variable(reference.Local, way, bindings);
            case IParameterReferenceOperation reference:
                return bindings.TryGet(reference.Parameter, out var bound, out var of, out bool element)
                    && Walk(bound, element ? way.Insert(0, Writes.Element) : way, of);
            case IFieldReferenceOperation { Instance: { Type.IsTupleType: true } instance } field:
                return Walk(instance, way.Insert(0, Writes.NameOf(field.Field)), bindings);
            case IPropertyReferenceOperation { Instance: { } instance } property:
                return Property(property, instance, way, bindings);
            case IArrayElementReferenceOperation item:
                return Walk(item.ArrayReference, way.Insert(0, Writes.Element), bindings);
            case IConditionalOperation conditional:
                return Walk(conditional.WhenTrue, way, bindings) && Walk(conditional.WhenFalse, way, bindings);
            case ICoalesceOperation coalesce:
                return Walk(coalesce.Value, way, bindings) && Walk(coalesce.WhenNull, way, bindings);
            case ISwitchExpressionOperation choice:
                return choice.Arms.All(a => Walk(a.Value, way, bindings));
            case IInvocationOperation invocation:
                return Invocation(invocation, way, bindings);
            case IAnonymousFunctionOperation function when way.IsEmpty:
                return Returns(function.Body, way, bindings);
        }

        return !way.IsEmpty && Made(op, way, bindings);
    }

    /// <summary>Through the construction of a tuple, record, anonymous type or array.</summary>
    private bool Made(IOperation op, ImmutableList<string> way, Bindings bindings)
    {
        string head = way[0];
        var rest = way.RemoveAt(0);
        switch (op)
        {
            case ITupleOperation tuple:
                return int.TryParse(head.Replace("Item", ""), out int index) && index <= tuple.Elements.Length && Walk(tuple.Elements[index - 1], rest, bindings);
            case IAnonymousObjectCreationOperation anonymous:
                return Initialised(anonymous.Initializers, head) is { } member && Walk(member, rest, bindings);
            case IWithOperation with:
                return Walk(Initialised(with.Initializer.Initializers, head) ?? with.Operand, Initialised(with.Initializer.Initializers, head) is null ? way : rest, bindings);
            case IArrayCreationOperation array when head == Writes.Element:
                return array.Initializer is null || array.Initializer.ElementValues.All(v => Walk(v, rest, bindings));
            case IObjectCreationOperation creation when head == Writes.Element:
                return creation.Arguments.All(a => a.Value.Type?.SpecialType == SpecialType.System_Int32 || Walk(a.Value, way, bindings))
                    && creation.Initializer is null or { Initializers.IsEmpty: true };
            case IObjectCreationOperation creation:
                if (creation.Initializer is { } initialiser && Initialised(initialiser.Initializers, head) is { } set)
                    return Walk(set, rest, bindings);
                var argument = creation.Arguments.FirstOrDefault(a => Stores(creation.Constructor, a.Parameter, head));
                return argument is not null && Walk(argument.Value, rest, bindings);
            case not null when head == Writes.Element && CollectionExpression.IsOne(op):
                // a spread is no element but a collection of them
                return op.Syntax is CollectionExpressionSyntax written && !written.Elements.Any(e => e is SpreadElementSyntax)
                    && CollectionExpression.Elements(op).All(e => Walk(e, rest, bindings));
            default:
                return false;
        }
    }

    private static IOperation? Initialised(ImmutableArray<IOperation> initialisers, string name) => initialisers.OfType<ISimpleAssignmentOperation>()
        .FirstOrDefault(a => a.Target is IMemberReferenceOperation member && member.Member.Name == name)?.Value;

    /// <summary>The constructor keeps the parameter in the property: a positional record, or an assignment in its body.</summary>
    private bool Stores(IMethodSymbol? constructor, IParameterSymbol? parameter, string property)
    {
        if (constructor is null || parameter is null)
            return false;
        foreach (var reference in constructor.DeclaringSyntaxReferences)
        {
            switch (reference.GetSyntax(_cancel))
            {
                case RecordDeclarationSyntax:
                    return parameter.Name == property;
                case ConstructorDeclarationSyntax declaration when declaration.DescendantNodes().OfType<AssignmentExpressionSyntax>().Any(a =>
                    a.Left.ToString() is var left && (left == property || left == "this." + property) && a.Right.ToString() == parameter.Name):
                    return true;
            }
        }

        return false;
    }

    private bool Variable(ISymbol variable, ImmutableList<string> way, Bindings bindings)
    {
        if (!_seen.Add((variable, string.Join(".", way))))
            return true;
        bool any = false;
        foreach (var write in _writes.To(variable))
        {
            int common = 0;
            while (common < write.Into.Count && common < way.Count && write.Into[common] == way[common])
                common++;
            if (common < write.Into.Count)
            {
                // a whole is asked for, and a part was written: only arrays and lists are filled that way
                if (common == way.Count)
                    return false;
                continue;
            }

            any = true;
            if (!Walk(write.Value, write.From.AddRange(way.RemoveRange(0, common)), bindings))
                return false;
        }

        return any;
    }

    private bool Property(IPropertyReferenceOperation property, IOperation instance, ImmutableList<string> way, Bindings bindings)
    {
        if (property.Property.IsIndexer)
            return Walk(instance, property.Property.ContainingType.Name.EndsWith("Dictionary", StringComparison.Ordinal) ? way.InsertRange(0, new[] { Writes.Element, "Value" }) : way.Insert(0, Writes.Element), bindings);
        if (property.Property.ContainingType is { OriginalDefinition.SpecialType: SpecialType.System_Nullable_T } && property.Property.Name == "Value"
            || property.Property is { Name: "Result", ContainingType.Name: "Task" or "ValueTask" })
            return Walk(instance, way, bindings);
        return Walk(instance, way.Insert(0, property.Property.Name), bindings);
    }

    private bool Invocation(IInvocationOperation invocation, ImmutableList<string> way, Bindings bindings)
    {
        var method = invocation.TargetMethod;
        if (method.ContainingType.Name is "Enumerable" or "ParallelEnumerable" && method.ContainingNamespace.ToDisplayString() == "System.Linq")
            return Linq(invocation, method, way, bindings);
        switch (method.ContainingType.Name, method.Name)
        {
            case ("Math", "Max" or "Min"):
                return invocation.Arguments.All(a => Walk(a.Value, way, bindings));
            case ("List", "ToArray" or "AsReadOnly") or ("Task", "ConfigureAwait"):
                return Walk(invocation.Instance, way, bindings);
            case ("Task", "WhenAll" or "FromResult" or "Run"):
                return Walk(invocation.Arguments[0].Value, way, bindings);
        }

        if (method.MethodKind == MethodKind.DelegateInvoke)
            return Delegate(invocation, way, bindings);
        foreach (var reference in method.DeclaringSyntaxReferences)
        {
            if (Body(reference.GetSyntax(_cancel)) is not { } body)
                return false;
            var inner = new Bindings(method.MethodKind == MethodKind.LocalFunction ? bindings : null);
            foreach (var argument in invocation.Arguments)
            {
                if (argument.Parameter is { } parameter)
                    inner.Bind(parameter.OriginalDefinition, argument.Value, bindings);
            }

            return Returns(body, way, inner);
        }

        return false;
    }

    private IOperation? Body(SyntaxNode declaration)
    {
        SyntaxNode? body = declaration switch
        {
            MethodDeclarationSyntax m => (SyntaxNode?)m.Body ?? m.ExpressionBody?.Expression,
            LocalFunctionStatementSyntax f => (SyntaxNode?)f.Body ?? f.ExpressionBody?.Expression,
            _ => null,
        };
        return body is null ? null : _writes.ModelOf(declaration.SyntaxTree).GetOperation(body, _cancel);
    }

    private bool Returns(IOperation body, ImmutableList<string> way, Bindings bindings)
    {
        if (body is not IBlockOperation)
            return Walk(body, way, bindings);
        var returned = new List<IOperation?>();
        Collect(body, returned);
        return returned.Count > 0 && returned.All(r => Walk(r, way, bindings));
    }

    private static void Collect(IOperation op, List<IOperation?> returned)
    {
        foreach (var child in op.ChildOperations)
        {
            if (child is IReturnOperation { Kind: OperationKind.Return } result)
                returned.Add(result.ReturnedValue);
            else if (child is not (IAnonymousFunctionOperation or ILocalFunctionOperation))
                Collect(child, returned);
        }
    }

    private bool Delegate(IInvocationOperation invocation, ImmutableList<string> way, Bindings bindings) =>
        invocation.Instance is ILocalReferenceOperation { Local: var local }
        && _writes.To(local).ToList() is { Count: 1 } writes && Function(writes[0].Value) is { } function
        && Apply(function, way, bindings, invocation.Arguments.Select(a => (a.Value, false)).ToArray());

    private static IAnonymousFunctionOperation? Function(IOperation? op) => op switch
    {
        IDelegateCreationOperation creation => Function(creation.Target),
        IConversionOperation conversion => Function(conversion.Operand),
        IAnonymousFunctionOperation function => function,
        _ => null,
    };

    private bool Apply(IAnonymousFunctionOperation function, ImmutableList<string> way, Bindings bindings, params (IOperation Value, bool Element)[] arguments)
    {
        var inner = new Bindings(bindings);
        for (int i = 0; i < arguments.Length && i < function.Symbol.Parameters.Length; i++)
            inner.Bind(function.Symbol.Parameters[i], arguments[i].Value, bindings, arguments[i].Element);
        return Returns(function.Body, way, inner);
    }

    private bool Linq(IInvocationOperation invocation, IMethodSymbol method, ImmutableList<string> way, Bindings bindings)
    {
        if (invocation.Arguments.Length == 0)
            return false;
        var source = invocation.Arguments[0].Value;
        var second = invocation.Arguments.Length > 1 ? invocation.Arguments[1].Value : null;
        switch (method.Name)
        {
            case "Where" or "OrderBy" or "OrderByDescending" or "ThenBy" or "ThenByDescending" or "Order" or "OrderDescending" or "ToList" or "ToArray" or "AsParallel" or "AsOrdered"
                or "AsSequential" or "AsEnumerable" or "Take" or "Skip" or "Reverse" or "Distinct" or "WithDegreeOfParallelism":
                return Walk(source, way, bindings);
            case "First" or "FirstOrDefault" or "Last" or "LastOrDefault" or "Single" or "ElementAt" or "MaxBy" or "MinBy":
                return Walk(source, way.Insert(0, Writes.Element), bindings);
            case "Aggregate" when invocation.Arguments.Length == 2:
                return Walk(source, way.Insert(0, Writes.Element), bindings);
            case "Max" or "Min" when second is null:
                return Walk(source, way.Insert(0, Writes.Element), bindings);
            case "Max" or "Min" when Function(second) is { } selector:
                return Apply(selector, way, bindings, (source, true));
            case "Select" when way.Count > 0 && way[0] == Writes.Element && Function(second) is { } selector:
                return Apply(selector, way.RemoveAt(0), bindings, (source, true));
            case "Select" when way.Count > 0 && way[0] == Writes.Element && MethodOf(second) is { } named:
                var inner = new Bindings(named.MethodKind == MethodKind.LocalFunction ? bindings : null);
                inner.Bind(named.Parameters[0], source, bindings, element: true);
                return named.DeclaringSyntaxReferences.Length > 0 && Body(named.DeclaringSyntaxReferences[0].GetSyntax(_cancel)) is { } body && Returns(body, way.RemoveAt(0), inner);
            default:
                return false;
        }
    }

    private static IMethodSymbol? MethodOf(IOperation? op) => op switch
    {
        IDelegateCreationOperation creation => MethodOf(creation.Target),
        IMethodReferenceOperation reference => reference.Method,
        _ => null,
    };
}
