using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

/// <summary>Calls: into bodies that can be read, by the catalogue, or by what goes in and what comes out.</summary>
internal sealed partial class Walker
{
    private Value Invoke(IInvocationOperation invocation)
    {
        var method = invocation.TargetMethod;
        var instance = Expression(invocation.Instance);
        if (method.MethodKind == MethodKind.DelegateInvoke)
            return NamedTraits(InvokeDelegate(instance, ArgumentValues(invocation), invocation.Syntax, method.ReturnType), (invocation.Instance is null ? null : NameOf(invocation.Instance)) ?? "", method.ReturnType);
        if (method.MethodKind == MethodKind.LocalFunction)
            return NamedTraits(CallWithArguments(method, Value.Empty, invocation.Arguments, invocation.Syntax), method.Name, method.ReturnType);
        if (Sequence(invocation, method, instance) is { } sequence)
            return sequence;
        if (_catalogue.TryGet(method, out var entry))
            return KnownCall(entry, method, instance, invocation);
        var targets = ImplementationsOf(method, instance);
        if (targets is { Count: > 0 })
        {
            var result = Value.Empty;
            bool first = true;
            foreach (var target in targets)
            {
                var one = CallWithArguments(target, instance, invocation.Arguments, invocation.Syntax);
                result = first ? one : result.Join(one);
                first = false;
            }

            // another object each time: what it computes differs as a candidate's work does
            if (!instance.Varies.IsEmpty || !instance.Wins.IsEmpty || !instance.Indexed.IsEmpty)
                result = result.Varying(instance.Varies.Union(instance.Indexed)).Winning(instance.Wins);
            return RoleOfResult(NamedTraits(result, method.Name, method.ReturnType), method, invocation.Syntax);
        }

        return Unknown(method, instance, ArgumentValues(invocation), invocation.Syntax, invocation);
    }

    private static SyntaxNode NamePlace(SyntaxNode syntax) => syntax switch
    {
        InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax member } => member.Name,
        InvocationExpressionSyntax { Expression: MemberBindingExpressionSyntax member } => member.Name,
        InvocationExpressionSyntax { Expression: var expression } => expression,
        _ => syntax,
    };

    private Value[] ArgumentValues(IInvocationOperation invocation)
    {
        var values = new Value[invocation.TargetMethod.Parameters.Length];
        foreach (var argument in invocation.Arguments)
        {
            if (argument.Parameter is { } parameter && parameter.Ordinal < values.Length)
                values[parameter.Ordinal] = Expression(argument.Value);
        }

        for (int i = 0; i < values.Length; i++)
            values[i] ??= Value.Empty;
        return values;
    }

    /// <summary>The bodies that a call may run, given the objects that the receiver may be.</summary>
    private List<IMethodSymbol>? ImplementationsOf(IMethodSymbol? method, Value instance)
    {
        if (method is null)
            return null;
        if (method.ReducedFrom is { } extension)
            method = extension;
        var found = new List<IMethodSymbol>();
        if (method is { IsAbstract: true } or { IsVirtual: true } or { IsOverride: true } || method.ContainingType?.TypeKind == TypeKind.Interface)
        {
            foreach (int id in instance.Objects)
            {
                if (_facts.Objects[id].Type is INamedTypeSymbol type && ImplementationIn(type, method) is { } implementation && !found.Contains(implementation, SymbolEqualityComparer.Default))
                    found.Add(implementation);
                if (found.Count >= 4)
                    break;
            }

            if (found.Count == 0 && _bodies.Of(method) is null)
                found.AddRange(Implementations(method));
        }

        if (found.Count == 0 && _bodies.Of(method) is not null)
            found.Add(method);
        return found;
    }

    private static IMethodSymbol? ImplementationIn(INamedTypeSymbol type, IMethodSymbol method)
    {
        if (type.TypeKind == TypeKind.Interface || type.DeclaringSyntaxReferences.Length == 0)
            return null;
        if (method.ContainingType.TypeKind == TypeKind.Interface)
        {
            return type.FindImplementationForInterfaceMember(method) as IMethodSymbol
                ?? type.AllInterfaces.Where(i => SymbolEqualityComparer.Default.Equals(i.OriginalDefinition, method.ContainingType.OriginalDefinition))
                    .SelectMany(i => i.GetMembers(method.Name)).Select(type.FindImplementationForInterfaceMember).OfType<IMethodSymbol>().FirstOrDefault();
        }

        for (var t = type; t is not null; t = t.BaseType)
        {
            foreach (var member in t.GetMembers(method.Name))
            {
                if (member is IMethodSymbol candidate)
                {
                    for (var m = candidate; m is not null; m = m.OverriddenMethod)
                    {
                        if (SymbolEqualityComparer.Default.Equals(m.OriginalDefinition, method.OriginalDefinition))
                            return candidate;
                    }
                }
            }
        }

        return null;
    }

    private IEnumerable<IMethodSymbol> Implementations(IMethodSymbol method)
    {
        if (method.ContainingType is null || method.ContainingType.DeclaringSyntaxReferences.Length == 0)
            yield break;
        int found = 0;
        foreach (var type in _bodies.TypesOf(method.ContainingType))
        {
            if (ImplementationIn(type, method) is { IsAbstract: false } implementation && _bodies.Of(implementation) is not null)
            {
                yield return implementation;
                if (++found >= 4)
                    yield break;
            }
        }
    }

    private Value CallWithArguments(IMethodSymbol method, Value instance, ImmutableArray<IArgumentOperation> arguments, SyntaxNode syntax)
    {
        if (method.ReducedFrom is { } extension)
            method = extension;
        var values = new Value[method.Parameters.Length];
        List<(int Ordinal, IOperation Target)>? outs = null;
        foreach (var argument in arguments)
        {
            if (argument.Parameter is not { } parameter || parameter.Ordinal >= values.Length)
                continue;
            values[parameter.Ordinal] = parameter.RefKind == RefKind.Out ? Value.Empty : Expression(argument.Value);
            if (parameter.RefKind is RefKind.Out or RefKind.Ref)
                (outs ??= new()).Add((parameter.Ordinal, argument.Value));
        }

        for (int i = 0; i < values.Length; i++)
            values[i] ??= Value.Empty;
        var result = Call(method, instance, ImmutableArray.Create(values), syntax, outs);
        return result;
    }

    private Value Call(IMethodSymbol method, Value instance, ImmutableArray<Value> arguments, SyntaxNode syntax, List<(int Ordinal, IOperation Target)>? outs = null)
    {
        var body = _bodies.Of(method);
        var definition = method.OriginalDefinition;
        // what a recursion adds joins with what its end gives: nothing until then
        if (body is not null && Recurses(definition))
            return Value.Empty;
        if (body is null || _frame.Level >= MaxCallDepth)
            return ByArguments(instance, arguments, method.ReturnType, syntax);
        _facts.Reached.Add(definition);
        return Run(definition, body, instance, arguments, syntax, method.MethodKind == MethodKind.LocalFunction, outs);
    }

    private bool Recurses(IMethodSymbol method, int most = 2)
    {
        int times = 0;
        for (var f = _frame; f is not null; f = f.Parent)
        {
            if (SymbolEqualityComparer.Default.Equals(f.Method, method) && ++times >= most)
                return true;
        }

        return false;
    }

    private Value Run(
        IMethodSymbol method, IReadOnlyList<IOperation> body, Value instance, ImmutableArray<Value> arguments, SyntaxNode call, bool isFunction, List<(int Ordinal, IOperation Target)>? outs)
    {
        var caller = _frame;
        var frame = new Frame(caller, method, call, isFunction)
        {
            This = isFunction ? caller.This : instance,
            LoopDepth = _loops.Count,
            GuardDepth = _guards.Count,
        };
        if (!isFunction)
            frame.EvidentRows = RowsOf(Deep(instance));
        for (int i = 0; i < method.Parameters.Length && i < arguments.Length; i++)
        {
            var parameter = method.Parameters[i];
            var value = arguments[i];
            var rows = RowsOf(Deep(value));
            bool evident = _vocabulary.RoleOf(parameter.Name, out _) != Role.Unknown && RowsTypes.IsRowsLike(parameter.Type) || RoleAttributes.Of(parameter) != Role.Unknown;
            if (evident)
                frame.EvidentRows = frame.EvidentRows.Union(rows);
            else
                frame.NeutralRows = frame.NeutralRows.Union(rows);
            Declare(parameter);
            if (value.IsEmpty && parameter.HasExplicitDefaultValue && parameter.ExplicitDefaultValue is { } given && Counting.ToDouble(given) is { } number)
                value = new Value { Number = number };
            if (evident || value.Objects.IsEmpty)
                value = Named(value, parameter.Name, parameter, parameter.Type, call);
            _state.Set(parameter, value);
        }

        _frame = frame;
        foreach (var part in body)
        {
            if (part is IBlockOperation or ILoopOperation or IExpressionStatementOperation)
            {
                Statement(part);
            }
            else
            {
                var value = Expression(part);
                frame.Return = frame.Return is null ? value : frame.Return.Join(value);
            }
        }

        _frame = caller;
        if (outs is not null)
        {
            foreach (var (ordinal, target) in outs)
                Assign(target, _state.Get(method.Parameters[ordinal]) ?? Value.Empty, call, survives: false);
        }

        if (frame.Yields is { } yields)
            return Ref(yields);
        return frame.Return ?? Value.Empty;
    }

    private Value RoleOfResult(Value value, IMethodSymbol method, SyntaxNode syntax)
    {
        var role = RoleAttributes.OfReturn(method);
        if (role == Role.Unknown)
            return value;
        foreach (int id in value.Objects)
        {
            var rows = EnsureRows(_facts.Objects[id], syntax);
            rows.DeclaredRole = role;
            rows.DeclaredEvidence = Evidence.Declared;
        }

        return value;
    }

    // ---- functions as values

    private Value Function(IMethodSymbol symbol, IOperation body, SyntaxNode syntax) => Closed(new Closure(symbol, body, _frame.This, syntax), syntax);

    private Value MethodGroup(IMethodReferenceOperation reference)
    {
        var instance = Expression(reference.Instance);
        return Closed(new Closure(reference.Method, null, instance, reference.Syntax), reference.Syntax);
    }

    private Value Closed(Closure closure, SyntaxNode syntax)
    {
        if (!_closureIds.TryGetValue(syntax, out int id))
        {
            _closureIds[syntax] = id = _closures.Count;
            _closures.Add(closure);
        }
        else
        {
            _closures[id] = closure with { Instance = _closures[id].Instance.Join(closure.Instance) };
        }

        return new Value { Closures = IdSet.Of(id) };
    }

    private Value InvokeDelegate(Value target, Value[] arguments, SyntaxNode syntax, ITypeSymbol returnType)
    {
        if (target.Closures.IsEmpty)
            return ByArguments(target, ImmutableArray.Create(arguments), returnType, syntax);
        var result = Value.Empty;
        bool first = true;
        foreach (int id in target.Closures)
        {
            var one = InvokeClosure(id, arguments, syntax);
            result = first ? one : result.Join(one);
            first = false;
        }

        return result.Varying(target.Varies.Union(target.Indexed)).Winning(target.Wins);
    }

    private Value InvokeClosure(int id, Value[] arguments, SyntaxNode syntax)
    {
        var closure = _closures[id];
        if (closure.Body is not null)
        {
            if (_frame.Level >= MaxCallDepth || Recurses(closure.Symbol))
                return ByArguments(Value.Empty, ImmutableArray.Create(arguments), closure.Symbol.ReturnType, syntax);
            // a lambda with a block returns through its frame, one with an expression through an implied return
            return Run(closure.Symbol, new[] { closure.Body }, closure.Instance, ImmutableArray.Create(arguments), syntax, isFunction: true, null);
        }

        var method = closure.Symbol;
        if (_bodies.Of(method) is not null || method.MethodKind == MethodKind.LocalFunction)
        {
            // `Fit` as a method group on a parameter: an instance method of an element
            return NamedTraits(Call(method, closure.Instance, ImmutableArray.Create(arguments), syntax), method.Name, method.ReturnType);
        }

        if (ImplementationsOf(method, closure.Instance) is { Count: > 0 } targets)
            return NamedTraits(Call(targets[0], closure.Instance, ImmutableArray.Create(arguments), syntax), method.Name, method.ReturnType);
        if (_catalogue.TryGet(method, out var entry))
            return Known(entry, method, closure.Instance, syntax, method.ReturnType, arguments);
        return ByArguments(closure.Instance, ImmutableArray.Create(arguments), method.ReturnType, syntax);
    }

    // ---- construction

    private Value Create(IObjectCreationOperation creation)
    {
        var constructor = creation.Constructor;
        var type = creation.Type as INamedTypeSymbol;
        if (type is { TypeKind: TypeKind.Delegate } && creation.Arguments.Length == 1)
            return Expression(creation.Arguments[0].Value);
        var o = _facts.ObjectAt(creation.Syntax, _frame.Chain, type, _loops.Count);
        _version++;
        o.Renew();
        o.IsCollection |= RowsTypes.IsCollection(type);
        var self = Ref(o);
        if (constructor is not null && type is { DeclaringSyntaxReferences.Length: > 0 })
            Construct(o, self, type, constructor, creation);
        else
            ConstructUnseen(o, creation, constructor);
        if (creation.Initializer is not null)
        {
            _initialised.Push(self);
            Initialise(creation.Initializer);
            _initialised.Pop();
        }

        return self;
    }

    private void ConstructUnseen(HeapObject o, IObjectCreationOperation creation, IMethodSymbol? constructor)
    {
        foreach (var argument in creation.Arguments)
        {
            var value = Expression(argument.Value);
            if (o.IsCollection && !value.Objects.IsEmpty && RowsTypes.IsCollection(argument.Value.Type))
            {
                foreach (int id in value.Objects)
                    CopyInto(o, _facts.Objects[id], value);
            }
            else if (o.IsCollection && o.Type is INamedTypeSymbol { IsGenericType: false } or { TypeKind: TypeKind.Array } || !o.IsCollection)
            {
                Absorb(o, value);
                foreach (int id in value.Objects)
                    o.Content = o.Content.With(models: o.Content.Models.Add(id));
            }
        }

        if (constructor is not null && _catalogue.TryGet(constructor, out var entry) && entry.Effect == CatalogueEffect.Loads)
        {
            o.Rows ??= _facts.NewRows(Source.Loaded, null, creation.Syntax);
            NameByText(o.Rows, creation.Arguments.Select(a => Expression(a.Value)));
        }

        // a pair made with its constructor
        if (o.Type is INamedTypeSymbol { Name: "KeyValuePair" } && creation.Arguments.Length == 2)
        {
            o.Store("Key", Expression(creation.Arguments[0].Value));
            o.Store("Value", Expression(creation.Arguments[1].Value));
        }
    }

    private static void CopyInto(HeapObject o, HeapObject from, Value value)
    {
        o.Element = o.Element.Join(from.Element);
        o.Key = o.Key.Join(from.Key);
        o.Per = o.Per.Union(from.Per);
        o.Rows ??= from.Rows;
        o.Own ??= from.Own;
        o.Count ??= from.Count;
        o.SizeVaries = o.SizeVaries.Union(from.SizeVaries);
        o.Along = o.Along.Union(from.Along);
        o.Content = o.Content.Join(from.Content);
        o.SortKey ??= from.SortKey;
        o.SortPlace ??= from.SortPlace;
        o.Descending |= from.Descending;
    }

    private void Construct(HeapObject o, Value self, INamedTypeSymbol type, IMethodSymbol constructor, IObjectCreationOperation creation)
    {
        InitialiseMembers(o, self, type);
        var values = new Value[constructor.Parameters.Length];
        foreach (var argument in creation.Arguments)
        {
            if (argument.Parameter is { } parameter)
                values[parameter.Ordinal] = Expression(argument.Value);
        }

        for (int i = 0; i < values.Length; i++)
            values[i] ??= Value.Empty;
        if (_bodies.Of(constructor) is not null)
        {
            Call(constructor, self, ImmutableArray.Create(values), creation.Syntax);
            return;
        }

        Primary(o, type, constructor, values, creation.Syntax);
    }

    /// <summary>A primary constructor: parameters become members of a record, or are captured by a class.</summary>
    private void Primary(HeapObject o, INamedTypeSymbol type, IMethodSymbol constructor, Value[] values, SyntaxNode syntax)
    {
        if (constructor.OriginalDefinition.DeclaringSyntaxReferences.Length == 0 && constructor.Parameters.Length == 0)
            return;
        _facts.Reached.Add(constructor.OriginalDefinition);
        for (int i = 0; i < constructor.Parameters.Length && i < values.Length; i++)
        {
            var parameter = constructor.OriginalDefinition.Parameters[i];
            var value = values[i];
            if (value.IsEmpty && parameter.HasExplicitDefaultValue && parameter.ExplicitDefaultValue is { } given && Counting.ToDouble(given) is { } number)
                value = new Value { Number = number };
            value = Named(value, parameter.Name, parameter, parameter.Type, syntax);
            string member = type.IsRecord ? parameter.Name : PrimaryName(parameter);
            if (o.Store(member, value))
                Changed();
            Written(o, member);
            _state.Set(parameter, value);
        }

        // initialisers that use the parameters
        var caller = _frame;
        _frame = new Frame(caller, constructor, syntax, false) { This = Ref(o), LoopDepth = _loops.Count, GuardDepth = _guards.Count };
        MemberInitialisers(o, type, true);
        _frame = caller;
        foreach (var parameter in constructor.OriginalDefinition.Parameters)
            _state.Forget(parameter);
    }

    private void InitialiseMembers(HeapObject o, Value self, INamedTypeSymbol type)
    {
        var caller = _frame;
        _frame = new Frame(caller, null, type.DeclaringSyntaxReferences[0].GetSyntax(), false) { This = self, LoopDepth = _loops.Count, GuardDepth = _guards.Count };
        for (var t = type; t is not null && t.DeclaringSyntaxReferences.Length > 0; t = t.BaseType)
            MemberInitialisers(o, t, false);
        _frame = caller;
    }

    private void MemberInitialisers(HeapObject o, INamedTypeSymbol type, bool withParameters)
    {
        foreach (var member in type.OriginalDefinition.GetMembers())
        {
            if (member.IsStatic || member is not (IFieldSymbol { AssociatedSymbol: null } or IPropertySymbol) || member.DeclaringSyntaxReferences.Length == 0)
                continue;
            if (_bodies.InitialiserOf(member) is not { } initial)
                continue;
            if (withParameters && !initial.DescendantsAndSelf().Any(d => d is IParameterReferenceOperation))
                continue;
            var memberType = member is IFieldSymbol f ? f.Type : ((IPropertySymbol)member).Type;
            var value = Named(Expression(initial), member.Name, member, memberType, initial.Syntax);
            if (o.Store(member.Name, value))
                Changed();
        }
    }

    // ---- calls without a visible body

    /// <summary>Rows in and a number or a metrics object out is a score; rows in and rows out are the same rows; else a model.</summary>
    private Value Unknown(IMethodSymbol method, Value instance, Value[] arguments, SyntaxNode syntax, IInvocationOperation? invocation)
    {
        if (arguments.Any(a => !a.Closures.IsEmpty) && HigherOrder(method, instance, arguments, syntax) is { } mapped)
            return mapped;
        var result = ByArguments(instance, ImmutableArray.Create(arguments), method.ReturnType, syntax);
        var given = Value.Empty;
        foreach (var a in arguments)
            given = given.Combine(Deep(a));
        bool learns = method.ReturnsVoid || Vocabulary.SaysLearn(method.Name);
        if (learns && !given.IsEmpty)
        {
            var learned = given.With(tags: Tag.Move(given.Tags, Level.Whole, Level.Aggregate), sites: IdSet.Empty);
            foreach (int id in instance.Objects)
            {
                var o = _facts.Objects[id];
                if (!o.IsCollection)
                    Absorb(o, learned.Varying(RunningOrigins(o.Depth)));
            }
        }

        if (method.ReturnsVoid)
            KeptBy(method.Name, instance, given, syntax);
        foreach (int ordinal in Enumerable.Range(0, method.Parameters.Length))
        {
            if (invocation is not null && method.Parameters[ordinal].RefKind is RefKind.Out or RefKind.Ref)
            {
                foreach (var argument in invocation!.Arguments)
                {
                    if (argument.Parameter?.Ordinal == ordinal)
                        Assign(argument.Value, Typed(given.Combine(Deep(instance)), argument.Parameter.Type, argument.Syntax, Value.Empty), syntax, survives: false);
                }
            }
        }

        return RoleOfResult(NamedTraits(result, method.Name, method.ReturnType), method, syntax);
    }

    /// <summary>`net.save("best.dat")` under a comparison keeps a candidate outside the program's variables.</summary>
    private void KeptBy(string name, Value instance, Value given, SyntaxNode syntax)
    {
        var words = Vocabulary.Words(name);
        if (_guards.Count == 0 || words.Count == 0 || words[0] is not ("save" or "store" or "export" or "checkpoint" or "snapshot" or "keep" or "copy" or "persist"))
            return;
        Survive(0, Deep(instance).Combine(given).With(traits: Traits.Text), syntax, null);
    }

    private Value ByArguments(Value instance, ImmutableArray<Value> arguments, ITypeSymbol returnType, SyntaxNode syntax)
    {
        var all = Deep(instance);
        Value? rows = null;
        foreach (var argument in arguments)
        {
            var deep = Deep(argument);
            Meets(all, deep);
            all = all.Combine(deep);
            if (rows is null && Tag.Has(deep.Tags, Level.Whole))
                rows = argument;
        }

        return Typed(all, returnType, syntax, rows ?? instance, arguments);
    }

    /// <summary>A value of a type made from what went in.</summary>
    private Value Typed(Value all, ITypeSymbol? type, SyntaxNode syntax, Value rows, ImmutableArray<Value> arguments = default)
    {
        if (RowsTypes.IsTask(type, out var result))
            type = result;
        if (type is null || type.SpecialType == SpecialType.System_Void)
            return Value.Empty;
        all = all.Data();
        var aggregated = all.With(tags: Tag.Move(all.Tags, Level.Whole, Level.Aggregate));
        if (RowsTypes.IsScalar(type))
        {
            if (!aggregated.Tags.Equals(all.Tags) || (Tag.Has(all.Tags, Level.Aggregate) && RowsTypes.IsNumber(type) && all.Sites.IsEmpty))
            {
                int site = _facts.SiteOf(syntax, _frame.Chain);
                Born(site, syntax, aggregated.Tags, aggregated.Wins, RowsOf(all.With(tags: all.Tags)));
                aggregated = aggregated.With(sites: aggregated.Sites.Add(site));
            }

            return aggregated.With(objects: IdSet.Empty);
        }

        var whole = Tag.At(all.Tags, Level.Whole);
        if (RowsTypes.IsRowsLike(type) && type is not IErrorTypeSymbol)
        {
            var o = NewCollection(syntax, type, 3);
            if (!whole.IsEmpty && SameShape(rows, type))
            {
                o.Rows = _facts.Rows[whole.First()];
                var tags = IdSet.Empty;
                foreach (int tag in all.Tags)
                    tags = tags.Add(Tag.LevelOf(tag) == Level.Whole ? Tag.Of(Tag.Rows(tag), Level.Element) : tag);
                StoreInto(o, all.With(tags: tags, objects: IdSet.Empty, sites: IdSet.Empty));
            }
            else if (!all.Tags.IsEmpty)
            {
                StoreInto(o, aggregated.With(objects: IdSet.Empty));
                return Ref(o).Tagged(ElementTags(all.Tags));
            }
            else
            {
                // what varies with the call's arguments is the rows, not a candidate
                o.Rows ??= _facts.NewRows(Source.Loaded, null, syntax);
                o.Rows.Varies = o.Rows.Varies.Union(all.Varies.Intersect(RunningOrigins()));
                if (!arguments.IsDefault)
                    NameByText(o.Rows, arguments);
                return Ref(o);
            }

            return Ref(o).Winning(all.Wins);
        }

        var model = _facts.ObjectAt(syntax, _frame.Chain, type, _loops.Count, 4);
        _version++;
        model.Renew();
        if (whole.Count > 0 || !all.IsEmpty)
        {
            if (!whole.IsEmpty)
            {
                int site = _facts.SiteOf(syntax, _frame.Chain);
                Born(site, syntax, aggregated.Tags, aggregated.Wins, whole);
                aggregated = aggregated.With(sites: aggregated.Sites.Add(site));
            }

            Absorb(model, aggregated);
        }

        return Ref(model).Tagged(ElementTags(all.Tags)).Winning(all.Wins).Varying(all.Varies);
    }

    private static IdSet ElementTags(IdSet tags) => tags.Where(t => Tag.LevelOf(t) == Level.Element);

    private bool SameShape(Value rows, ITypeSymbol type)
    {
        foreach (int id in rows.Objects)
        {
            var given = _facts.Objects[id].Type;
            if (given is null)
                continue;
            if (SymbolEqualityComparer.Default.Equals(given, type) || given.Name == type.Name && given.Name.Length > 0)
                return true;
            var a = ElementType(given);
            var b = ElementType(type);
            if (a is not null && SymbolEqualityComparer.Default.Equals(a, b))
                return true;
        }

        return false;
    }

    private static ITypeSymbol? ElementType(ITypeSymbol type) => type switch
    {
        IArrayTypeSymbol array => array.ElementType,
        INamedTypeSymbol { TypeArguments.Length: 1 } named => named.TypeArguments[0],
        _ => null,
    };

    private void NameByText(RowSet rows, IEnumerable<Value> arguments)
    {
        foreach (var argument in arguments)
        {
            if (argument.Label is not { Length: > 0 } text)
                continue;
            var role = _vocabulary.RoleOfText(text, out bool isEval);
            if (role != Role.Unknown)
                rows.AddName(text, null, role, isPath: true, isEval);
        }
    }

    /// <summary>All that a value holds, as one: rows it holds come out whole.</summary>
    private Value Deep(Value value, int depth = 6)
    {
        if (value.Objects.IsEmpty && value.Fields is null && value.Closures.IsEmpty)
            return value;
        // asked for again and again between changes: what one object holds is kept until something changes
        bool single = value.Fields is null && value.Closures.IsEmpty && value.Objects.Count == 1 && depth == 6;
        if (single && _deep.TryGetValue(value.Objects.First(), out var kept) && kept.Version == _version && kept.Of.Same(value))
            return kept.Result;
        var seen = new HashSet<int>();
        var result = DeepInto(value, depth, seen);
        _visits += seen.Count / 4;
        if (single)
            _deep[value.Objects.First()] = (_version, value, result);
        return result;
    }

    private void Changed()
    {
        _changes++;
        _version++;
    }

    private readonly Dictionary<int, (int Version, Value Of, Value Result)> _deep = new();
    private int _version;

    private Value DeepInto(Value value, int depth, HashSet<int> seen)
    {
        var result = value.Fields is null && value.Objects.IsEmpty ? value : value.With(objects: IdSet.Empty).Flat();
        if (depth <= 0)
            return result;
        if (value.Fields is not null)
        {
            foreach (var field in value.Fields.Values)
                result = result.Combine(DeepInto(field, depth - 1, seen));
        }

        foreach (int id in value.Objects)
        {
            if (!seen.Add(id))
                continue;
            var o = _facts.Objects[id];
            if (o.Rows is not null)
                result = result.Tagged(IdSet.Of(Tag.Of(o.Rows.Id, Level.Whole)));
            if (!o.Content.IsEmpty)
                result = result.Combine(DeepInto(o.Content, depth - 1, seen));
            if (!o.SizeVaries.IsEmpty)
                result = result.Varying(o.SizeVaries);
            if (!o.Element.IsEmpty)
            {
                var element = DeepInto(o.Element, depth - 1, seen);
                bool within = Tag.Has(value.Tags, Level.Element) || o.IsWindow;
                if (o.IsCollection && !within)
                    element = element.With(tags: Tag.Move(element.Tags, Level.Element, Level.Whole, r => !MadeInside(o, r)));
                result = result.Combine(element);
            }

            if (o.Fields is not null)
            {
                foreach (var field in o.Fields.Values)
                    result = result.Combine(DeepInto(field, depth - 1, seen));
            }

            result = result.With(models: result.Models.Add(id));
        }

        foreach (int id in value.Closures)
            result = result.Combine(Captured(id, depth, seen));
        return result;
    }

    private Value Captured(int closure, int depth, HashSet<int> seen)
    {
        var c = _closures[closure];
        var result = DeepInto(c.Instance, depth - 2, seen);
        var body = c.Body ?? _bodies.Of(c.Symbol)?.FirstOrDefault();
        if (body is null || depth <= 2)
            return result;
        foreach (var symbol in _bodies.ReadBy(body))
        {
            if (_state.Get(symbol) is { } value && value.Closures.IsEmpty)
                result = result.Combine(DeepInto(value, depth - 1, seen));
        }

        return result;
    }
}
