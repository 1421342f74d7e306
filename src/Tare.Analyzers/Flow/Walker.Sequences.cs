using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

/// <summary>Calls over sequences: LINQ in both syntaxes, its parallel form, lists, arrays, spans, `Parallel`.</summary>
internal sealed partial class Walker
{
    private static readonly HashSet<string> SequenceNamespaces = new(StringComparer.Ordinal) { "Linq", "Generic", "Collections", "Immutable", "Concurrent", "System", "Tasks", "Frozen", "Channels" };

    private Value? Sequence(IPropertySymbol property, Value instance, SyntaxNode syntax)
    {
        if (property.DeclaringSyntaxReferences.Length > 0)
            return null;
        switch (property.Name)
        {
            case "Length" or "Count" or "LongLength" or "RowCount" or "ColumnCount":
                return CountOf(instance, syntax);
            case "Keys" when instance.Objects.Count > 0:
                return Project(instance, o => o.Key, syntax, 30);
            case "Values" when instance.Objects.Count > 0:
                return Project(instance, o => o.Element, syntax, 31);
            case "Key" when instance.Objects.Count > 0 && instance.Fields is null && _facts.Objects[instance.Objects.First()] is { IsCollection: true } group:
                return group.Key.Tagged(instance.Tags).Varying(instance.Varies).Winning(instance.Wins);
            case "Min" or "Max" when property.ContainingType?.Name.StartsWith("Sorted", StringComparison.Ordinal) == true:
                return ExtremeOf(instance, null, property.Name == "Min", syntax, syntax, syntax);
            case "Shared" when property.ContainingType?.Name == "Random":
                return Value.Empty;
            default:
                return null;
        }
    }

    private Value CountOf(Value instance, SyntaxNode syntax)
    {
        var value = Value.Empty;
        foreach (int id in instance.Objects)
        {
            var o = _facts.Objects[id];
            if (Tag.Has(o.Content.Tags, Level.Aggregate) || !o.Content.Varies.IsEmpty)
                value = value.Join(CloseValue(o.Content, IdSet.Empty, RowsThrough(instance, o), syntax, id));
        }

        if (!value.IsEmpty)
            return value.With(objects: IdSet.Empty, varies: value.Varies.Union(instance.Varies));
        string? text = syntax is MemberAccessExpressionSyntax ? syntax.ToString() : null;
        return new Value { Number = SizeOf(instance), CountText = text };
    }

    private Value Project(Value instance, Func<HeapObject, Value> member, SyntaxNode syntax, int slot)
    {
        var ids = IdSet.Empty;
        foreach (int id in instance.Objects)
        {
            var o = _facts.Objects[id];
            var n = NewCollection(syntax, null, slot++);
            n.Element = n.Element.Join(member(o));
            n.Per = n.Per.Union(o.Per);
            n.Own ??= o.Per.IsEmpty ? OwnOrigin(o) : null;
            ids = ids.Add(n.Id);
        }

        return new Value { Objects = ids, Tags = instance.Tags, Varies = instance.Varies, Wins = instance.Wins };
    }

    private Value? Sequence(IInvocationOperation invocation, IMethodSymbol method, Value instance)
    {
        if (method.DeclaringSyntaxReferences.Length > 0)
            return null;
        var type = method.ContainingType;
        if (type is null || !SequenceNamespaces.Contains(type.ContainingNamespace?.Name ?? ""))
            return null;
        if (type.Name is "Math" or "MathF" or "Double" or "Single" && method.Name is "Max" or "Min" && method.Parameters.Length == 2)
        {
            var pair = ArgumentValues(invocation);
            Meets(pair[0], pair[1]);
            if (Tag.Has(pair[0].Tags, Level.Aggregate) && Tag.Has(pair[1].Tags, Level.Aggregate))
                return Extreme(NamePlace(invocation.Syntax), pair[0], pair[1], method.Name == "Min");
            return pair[0].Combine(pair[1]) is var joined && pair[0].Number is not null || pair[1].Number is not null ? Capped(pair) : pair[0].Combine(pair[1]);
        }

        if (type.Name is "Math" or "MathF")
            return MathCall(method, invocation);
        if (type.Name == "Enum" && method.Name is "GetValues" or "GetNames")
            return EnumValues(invocation, method);
        if (type.Name == "Parallel")
            return ParallelCall(invocation, method);
        if (type.Name is "Task" or "ValueTask" or "TaskFactory" or "TaskExtensions" or "Task`1" || RowsTypes.IsTask(type, out _))
            return TaskCall(invocation, method, instance);
        if (type.SpecialType == SpecialType.System_Object || type.SpecialType == SpecialType.System_String)
            return null;
        bool isExtension = method.IsExtensionMethod && method.IsStatic && method.Parameters.Length > 0;
        bool onArray = type.SpecialType == SpecialType.System_Array || type.Name is "MemoryExtensions" or "CollectionsMarshal" or "RuntimeHelpers" || type.Name == "Buffer";
        if (!isExtension && !onArray && !RowsTypes.IsCollection(type) && type.Name is not ("Enumerable" or "ParallelEnumerable" or "Queryable" or "ValueTuple"))
        {
            return type.Name is "IComparable" or "IComparer" or "Comparer" or "Int32" or "Double" or "Single" or "Decimal" ? CompareCall(invocation, method, instance) : null;
        }

        var values = ArgumentValues(invocation);
        var source = instance;
        int at = 0;
        if (method.IsStatic && values.Length > 0 && !values[0].Objects.IsEmpty | isExtension | onArray)
        {
            source = values[0];
            at = 1;
        }

        return SequenceCall(invocation, method, source, values.Skip(at).ToArray(), at);
    }

    private static Value Capped(Value[] pair)
    {
        // Math.Max(0, x): the limit says nothing of x
        var value = pair[0].Number is not null ? pair[1] : pair[0];
        return value.Data();
    }

    private Value? MathCall(IMethodSymbol method, IInvocationOperation invocation)
    {
        var values = ArgumentValues(invocation);
        var all = Value.Empty;
        foreach (var value in values)
        {
            Meets(all, value);
            all = all.Combine(value);
        }

        // 1 - Math.Pow(1 - alpha, 1.0 / k)
        if (method.Name is "Pow" && values.Length == 2 && all.Has(Traits.NamedLevel))
            all = all.With(traits: all.Traits | Traits.Corrected);
        if (method.Name is "Pow" && values[0].Number is > 0.5 and < 1 && values[1].Number is null)
            all = all.With(traits: all.Traits | Traits.Corrected);
        if (method.Name is "Exp" or "Log" or "Sqrt" or "Pow" or "Abs")
            all = all.With(traits: all.Traits & ~(Traits.PValue | Traits.Tail));
        if (method.Name is "Abs" or "Round" or "Sqrt" && values[0].Number is { } n)
            return new Value { Number = method.Name == "Abs" ? Math.Abs(n) : method.Name == "Sqrt" ? Math.Sqrt(n) : Math.Round(n) };
        return all;
    }

    private Value? CompareCall(IInvocationOperation invocation, IMethodSymbol method, Value instance)
    {
        if (method.Name is not ("CompareTo" or "Compare"))
            return null;
        var values = ArgumentValues(invocation);
        var (left, right) = values.Length == 1 ? (instance, values[0]) : values.Length == 2 ? (values[0], values[1]) : (instance, Value.Empty);
        Meets(left, right);
        var leftOperation = invocation.Instance ?? invocation.Arguments[0].Value;
        var rightOperation = invocation.Arguments[invocation.Arguments.Length - 1].Value;
        var result = Compare(invocation, leftOperation, rightOperation, left, right, BinaryOperatorKind.LessThan);
        return result;
    }

    private Value EnumValues(IInvocationOperation invocation, IMethodSymbol method)
    {
        var type = method.TypeArguments.Length == 1 ? method.TypeArguments[0] : (invocation.Arguments.FirstOrDefault()?.Value as ITypeOfOperation)?.TypeOperand;
        var o = NewCollection(invocation.Syntax, method.ReturnType);
        o.Count ??= type is { TypeKind: TypeKind.Enum } ? type.GetMembers().OfType<IFieldSymbol>().Count(f => f.IsConst) : null;
        OwnOrigin(o).Name ??= type?.Name;
        return Ref(o);
    }

    private Value ParallelCall(IInvocationOperation invocation, IMethodSymbol method)
    {
        var values = ArgumentValues(invocation);
        var closures = IdSet.Empty;
        foreach (var value in values)
            closures = closures.Union(value.Closures);
        if (method.Name == "Invoke")
        {
            foreach (int id in closures)
                InvokeClosure(id, Array.Empty<Value>(), invocation.Syntax);
            foreach (var value in values)
            {
                foreach (int o in value.Objects)
                {
                    foreach (int id in _facts.Objects[o].Element.Closures)
                        InvokeClosure(id, Array.Empty<Value>(), invocation.Syntax);
                }
            }

            return Value.Empty;
        }

        bool indexed = method.Name.StartsWith("For", StringComparison.Ordinal) && !method.Name.StartsWith("ForEach", StringComparison.Ordinal);
        IdSet origins, rows = IdSet.Empty;
        var element = Value.Empty;
        if (indexed)
        {
            var own = _facts.OriginOf(invocation.Syntax);
            if (values.Length > 1 && values[0].Number is { } from)
            {
                own.Size ??= values[1].Number - from;
                own.CountText ??= from == 0 ? values[1].CountText : null;
            }

            origins = IdSet.Of(own.Id);
            element = new Value { Varies = origins };
        }
        else
        {
            origins = OriginsOf(values[0], invocation.Arguments[0].Value.Syntax, out rows);
        }

        Loop(invocation.Syntax, origins, rows, () =>
        {
            foreach (int id in closures)
            {
                var item = indexed ? element : ElementOf(values[0], invocation.Syntax);
                var parameters = _closures[id].Symbol.Parameters.Select((p, i) => i == 0 ? item : Value.Empty).ToArray();
                InvokeClosure(id, parameters, invocation.Syntax);
            }
        });
        return Value.Empty;
    }

    private Value? TaskCall(IInvocationOperation invocation, IMethodSymbol method, Value instance)
    {
        var values = ArgumentValues(invocation);
        switch (method.Name)
        {
            case "Run" or "StartNew" or "ContinueWith":
                var result = Value.Empty;
                foreach (var value in values)
                {
                    foreach (int id in value.Closures)
                    {
                        var parameters = _closures[id].Symbol.Parameters.Select(_ => instance).ToArray();
                        result = result.Join(InvokeClosure(id, parameters, invocation.Syntax));
                    }
                }

                return result;
            case "FromResult" or "WhenAny":
                return values[0];
            case "WhenAll":
                if (values.Length == 1)
                {
                    if (!values[0].Objects.IsEmpty)
                        return values[0];
                    return values[0];
                }

                return Value.Empty;
            case "ConfigureAwait" or "GetAwaiter" or "GetResult" or "WaitAsync" or "AsTask" or "Unwrap":
                return instance.IsEmpty && values.Length > 0 ? values[0] : instance;
            default:
                return Value.Empty;
        }
    }

    /// <summary>Runs a function for every element of a sequence, as a loop would.</summary>
    private Value Map(Value source, IdSet closures, SyntaxNode syntax, SyntaxNode named, int element = 0, Value? seed = null)
    {
        var origins = OriginsOf(source, named, out var rows);
        var result = Value.Empty;
        bool any = false;
        Loop(syntax, origins, rows, () =>
        {
            var item = ElementOf(source, named);
            foreach (int id in closures)
            {
                var symbol = _closures[id].Symbol;
                int count = Math.Max(symbol.Parameters.Length, 1);
                var parameters = new Value[count];
                for (int i = 0; i < count; i++)
                    parameters[i] = i == element ? item : i < symbol.Parameters.Length && RowsTypes.IsNumber(symbol.Parameters[i].Type) ? new Value { Varies = origins } : seed ?? item;
                // `Select(model.Predict)`: the element is the argument; `Select(Board.Weight)` on an instance method likewise
                var one = InvokeClosure(id, parameters, syntax);
                result = any ? result.Join(one) : one;
                any = true;
            }
        });
        return result;
    }

    private Value? HigherOrder(IMethodSymbol method, Value instance, Value[] arguments, SyntaxNode syntax)
    {
        var source = instance;
        foreach (var argument in arguments)
        {
            if (!argument.Objects.IsEmpty && _facts.Objects[argument.Objects.First()].IsCollection)
            {
                source = argument;
                break;
            }
        }

        var result = Value.Empty;
        foreach (var argument in arguments)
        {
            if (!argument.Closures.IsEmpty)
                result = result.Join(Map(source, argument.Closures, syntax, syntax));
        }

        var all = Deep(result).Combine(Deep(instance));
        foreach (var argument in arguments)
        {
            if (argument.Closures.IsEmpty)
                all = all.Combine(Deep(argument));
        }

        if (RowsTypes.IsCollection(method.ReturnType))
        {
            var o = NewCollection(syntax, method.ReturnType, 3);
            StoreInto(o, result.IsEmpty ? all : result);
            return Ref(o);
        }

        return Typed(all, method.ReturnType, syntax, source);
    }
}
