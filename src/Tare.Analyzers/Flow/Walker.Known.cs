using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

/// <summary>Members that the catalogue knows.</summary>
internal sealed partial class Walker
{
    private Value KnownCall(CatalogueEntry entry, IMethodSymbol method, Value instance, IInvocationOperation invocation)
    {
        var arguments = ArgumentValues(invocation);
        if (entry.Effect == CatalogueEffect.Carries && method.Name == "ToString" && invocation.Instance is not null)
            return TextOf(instance, invocation.Instance.Type, invocation.Syntax).With(traits: Traits.Text);
        if (entry.Effect == CatalogueEffect.Reports)
        {
            Report(entry, method, instance, invocation);
            // what answers a request depends on what was sent
            return method.ReturnsVoid || RowsTypes.IsTask(method.ReturnType, out var answer) && answer is null ? Value.Empty : ByArguments(instance, ImmutableArray.Create(arguments), method.ReturnType, invocation.Syntax);
        }

        if (entry.Effect == CatalogueEffect.Nothing)
            KeptBy(method.Name, instance, Value.Empty, invocation.Syntax);
        if (entry.Effect is CatalogueEffect.Passes && method.Name is "TakeRows" or "SkipRows" or "Head" or "Tail")
        {
            var count = invocation.Arguments.FirstOrDefault(a => RowsTypes.IsNumber(a.Value.Type));
            string text = KeyOf(count?.Value.Syntax);
            var (key, other, cut) = method.Name is "TakeRows" or "Head" ? Bounds("0", text) : Bounds(text, "");
            return Slice(RowsArgument(entry, method, instance, arguments), key, other, cut, count is null ? Value.Empty : Expression(count.Value), invocation.Syntax, method.ReturnType);
        }

        var result = Known(entry, method, instance, invocation.Syntax, method.ReturnType, arguments);
        foreach (var argument in invocation.Arguments)
        {
            if (argument.Parameter is { RefKind: RefKind.Out } parameter)
                Assign(argument.Value, Typed(Gather(instance, arguments), parameter.Type, argument.Syntax, Value.Empty), invocation.Syntax, survives: false);
        }

        return result;
    }

    private Value Gather(Value instance, Value[] arguments)
    {
        var all = Deep(instance);
        foreach (var argument in arguments)
        {
            var deep = Deep(argument);
            Meets(all, deep);
            all = all.Combine(deep);
        }

        return all;
    }

    private static Value RowsArgument(CatalogueEntry entry, IMethodSymbol method, Value instance, Value[] arguments, CatalogueKey key = CatalogueKey.Rows)
    {
        var rows = entry.NamesThis(key) ? instance : Value.Empty;
        for (int i = 0; i < method.Parameters.Length && i < arguments.Length; i++)
        {
            var parameter = (method.ReducedFrom ?? method).Parameters;
            int ordinal = method.ReducedFrom is null ? i : i + 1;
            if (ordinal < parameter.Length && entry.Names(key, parameter[ordinal].Name))
                rows = rows.IsEmpty ? arguments[i] : rows.Join(arguments[i]);
        }

        return rows;
    }

    /// <summary>Reading or calling a known member.</summary>
    private Value Known(CatalogueEntry entry, ISymbol symbol, Value instance, SyntaxNode syntax, ITypeSymbol type, Value[]? arguments = null)
    {
        arguments ??= Array.Empty<Value>();
        var method = symbol as IMethodSymbol;
        switch (entry.Effect)
        {
            case CatalogueEffect.Nothing:
                return symbol.ContainingType?.Name is "Random" or "RandomNumberGenerator" ? new Value { Traits = Traits.Random, Varies = Deep(instance).Varies } : Value.Empty;
            case CatalogueEffect.Loads:
                return Load(entry, method, instance, arguments, syntax, type);
            case CatalogueEffect.Passes:
                return Pass(method is null ? instance : RowsArgument(entry, method, instance, arguments), syntax, type, Gather(instance, arguments));
            case CatalogueEffect.Transforms:
                return Transform(entry, method, instance, arguments, syntax, type);
            case CatalogueEffect.Shuffles:
                var shuffled = method is null ? instance : RowsArgument(entry, method, instance, arguments);
                foreach (int id in shuffled.Objects)
                {
                    if (_facts.Objects[id].Rows is { } rows)
                        rows.Shuffled = true;
                }

                return type.SpecialType == SpecialType.System_Void ? Value.Empty : Pass(shuffled, syntax, type, Gather(instance, arguments));
            case CatalogueEffect.Splits:
                return Split(method is null ? instance : RowsArgument(entry, method, instance, arguments), instance, arguments, syntax, type);
            case CatalogueEffect.Part:
                return Part(entry, instance, syntax, type);
            case CatalogueEffect.CrossValidates:
                return CrossValidate(RowsArgument(entry, method!, instance, arguments), instance, arguments, syntax, type);
            case CatalogueEffect.Fits:
                return Fit(entry, method!, instance, arguments, syntax, type);
            case CatalogueEffect.Scores:
                return Typed(Gather(instance, arguments), type, syntax, Value.Empty);
            case CatalogueEffect.Metric:
                return Opaque(instance, type, syntax);
            case CatalogueEffect.PValue:
                var p = Typed(Gather(instance, arguments), type, syntax, Value.Empty);
                return p.With(traits: p.Traits | Traits.PValue);
            case CatalogueEffect.Tail:
                var tail = Gather(instance, arguments);
                return tail.With(tags: Tag.Move(tail.Tags, Level.Whole, Level.Aggregate), traits: (tail.Traits | Traits.Tail) & ~Traits.Text);
            case CatalogueEffect.Carries:
                return Carry(symbol, instance, arguments, type, syntax);
            case CatalogueEffect.Corrects:
                return Correct(instance, arguments, type, syntax);
            case CatalogueEffect.Chooses:
                return Optimise(entry, method!, instance, arguments, syntax, type);
            case CatalogueEffect.Stops:
                return Value.Empty;
            default:
                return Typed(Gather(instance, arguments), type, syntax, Value.Empty);
        }
    }

    private Value Load(CatalogueEntry entry, IMethodSymbol? method, Value instance, Value[] arguments, SyntaxNode syntax, ITypeSymbol type)
    {
        var all = Gather(instance, arguments);
        var o = NewCollection(syntax, RowsTypes.IsTask(type, out var result) ? result : type);
        if (Tag.At(all.Tags, Level.Element).Where(r => _facts.Rows[r].Root.Source == Source.Loaded) is { IsEmpty: false })
        {
            // one file a row: what it holds belongs to that row
            StoreInto(o, all.With(objects: IdSet.Empty));
            return Ref(o).Tagged(ElementTags(all.Tags)).Winning(all.Wins);
        }

        if (o.Rows is null)
        {
            o.Rows = _facts.NewRows(Source.Loaded, null, syntax);
            if (method is not null)
                NameByText(o.Rows, arguments);
        }

        o.Rows.Varies = o.Rows.Varies.Union(all.Varies.Intersect(RunningOrigins()));
        return Ref(o).Winning(all.Wins);
    }

    private Value Pass(Value rows, SyntaxNode syntax, ITypeSymbol? type, Value all)
    {
        if (RowsTypes.IsTask(type, out var result))
            type = result;
        if (rows.Objects.IsEmpty || RowsTypes.IsScalar(type))
            return Typed(all, type, syntax, rows);
        var ids = IdSet.Empty;
        int slot = 60;
        foreach (int id in rows.Objects)
        {
            var from = _facts.Objects[id];
            var o = NewCollection(syntax, type, slot++);
            CopyInto(o, from, rows);
            o.IsWindow = from.IsWindow;
            o.CountText ??= from.CountText;
            ids = ids.Add(o.Id);
        }

        return rows.With(objects: ids, closures: IdSet.Empty);
    }

    private Value Transform(CatalogueEntry entry, IMethodSymbol? method, Value instance, Value[] arguments, SyntaxNode syntax, ITypeSymbol type)
    {
        var rows = method is null ? instance : RowsArgument(entry, method, instance, arguments);
        var model = method is null ? Value.Empty : RowsArgument(entry, method, instance, arguments, CatalogueKey.Model);
        var all = Gather(instance, arguments);
        if (RowsTypes.IsTask(type, out var result) && result is not null)
            type = result;
        var models = model.Objects.Union(model.Models);
        if (RowsTypes.IsScalar(type) && type.SpecialType != SpecialType.System_String)
            return all.With(tags: Tag.Move(all.Tags, Level.Whole, Level.Element), models: all.Models.Union(models), traits: all.Traits & ~Traits.Text);
        var whole = Tag.At(Deep(rows).Tags, Level.Whole);
        if (whole.IsEmpty)
        {
            if (all.Tags.IsEmpty && !RowsTypes.IsScalar(type) && RowsTypes.IsCollection(type))
            {
                var plain = NewCollection(syntax, type, 5);
                StoreInto(plain, all.With(models: IdSet.Empty));
                return Ref(plain);
            }

            var typed = Typed(all, type, syntax, Value.Empty);
            return typed.With(models: typed.Models.Union(models));
        }

        var o = NewCollection(syntax, type, 5);
        o.Rows = _facts.Rows[whole.First()];
        var tags = IdSet.Empty;
        foreach (int tag in all.Tags)
            tags = tags.Add(Tag.LevelOf(tag) == Level.Whole ? Tag.Of(Tag.Rows(tag), Level.Element) : tag);
        StoreInto(o, all.With(tags: tags, models: models, sites: IdSet.Empty));
        return Ref(o).With(wins: all.Wins, models: models);
    }

    private Value Split(Value rows, Value instance, Value[] arguments, SyntaxNode syntax, ITypeSymbol type)
    {
        var all = Gather(instance, arguments);
        var running = all.Varies.Union(all.Indexed).Intersect(RunningOrigins());
        if (RowsTypes.IsCollection(type))
        {
            var list = NewCollection(syntax, type, 8);
            var half = _facts.ObjectAt(syntax, _frame.Chain, null, _loops.Count, 9);
            half.IsSplit = true;
            Halve(half, rows, running.Union(IdSet.Of(OwnOrigin(list).Id)), syntax);
            StoreInto(list, Ref(half));
            return Ref(list);
        }

        var o = _facts.ObjectAt(syntax, _frame.Chain, type, _loops.Count, 8);
        o.IsSplit = true;
        Halve(o, rows, running, syntax);
        return Ref(o);
    }

    private void Halve(HeapObject o, Value rows, IdSet varies, SyntaxNode syntax)
    {
        foreach (int id in rows.Objects)
        {
            var from = _facts.Objects[id];
            o.Rows ??= from.Rows ?? EnsureRows(from, syntax);
            o.Element = o.Element.Join(from.Element);
            o.Per = o.Per.Union(varies);
        }
    }

    private Value Part(CatalogueEntry entry, Value instance, SyntaxNode syntax, ITypeSymbol type)
    {
        var ids = IdSet.Empty;
        foreach (int id in instance.Objects)
        {
            var split = _facts.Objects[id];
            if (!split.IsSplit || split.Rows is null)
            {
                ids = ids.Union(Pass(instance, syntax, type, Deep(instance)).Objects);
                continue;
            }

            string role = entry.Role ?? "test";
            var part = _facts.PartOf(split.Rows, role + "@" + split.Id, split.Site);
            part.Cut = Cut.Half;
            part.Shuffled = true;
            part.KnownRole = role switch { "training" => Role.Training, "validation" => Role.Validation, _ => Role.Test };
            part.Varies = part.Varies.Union(split.Per);
            var o = _facts.ObjectAt(split.Site ?? syntax, split.Id, type, split.Depth, 100 + (int)part.KnownRole);
            o.IsCollection = true;
            o.Rows = part;
            o.Element = Retag(split.Element, split.Rows.Id, part.Id);
            ids = ids.Add(o.Id);
        }

        return new Value { Objects = ids, Wins = instance.Wins };
    }

    private Value CrossValidate(Value rows, Value instance, Value[] arguments, SyntaxNode syntax, ITypeSymbol type)
    {
        var all = Gather(instance, arguments);
        var list = NewCollection(syntax, type, 8);
        var own = OwnOrigin(list);
        var tags = IdSet.Empty;
        foreach (int tag in all.Tags)
        {
            if (Tag.LevelOf(tag) != Level.Whole)
            {
                tags = tags.Add(tag);
                continue;
            }

            var folds = _facts.PartOf(_facts.Rows[Tag.Rows(tag)], "folds@" + list.Id, syntax);
            folds.Source = Source.Folds;
            folds.KnownRole = Role.Validation;
            folds.Varies = folds.Varies.Union(IdSet.Of(own.Id));
            own.Rows = own.Rows.Add(folds.Id);
            tags = tags.Add(Tag.Of(folds.Id, Level.Aggregate));
        }

        int site = _facts.SiteOf(syntax, _frame.Chain);
        Born(site, syntax, tags, all.Wins);
        StoreInto(list, all.With(tags: tags, sites: all.Sites.Add(site), objects: IdSet.Empty));
        return Ref(list);
    }

    private Value Fit(CatalogueEntry entry, IMethodSymbol method, Value instance, Value[] arguments, SyntaxNode syntax, ITypeSymbol type)
    {
        var rows = RowsArgument(entry, method, instance, arguments);
        var all = Gather(instance, arguments);
        var learned = all.With(tags: Tag.Move(all.Tags, Level.Whole, Level.Aggregate), sites: IdSet.Empty, models: IdSet.Empty);
        // a loss that is propagated back teaches the models that it came from
        foreach (int id in Deep(rows).Models)
        {
            var o = _facts.Objects[id];
            if (!o.IsCollection && o.Rows is null && !entry.NamesThis(CatalogueKey.Model))
                Absorb(o, learned.Varying(RunningOrigins(o.Depth)));
        }

        if (type.SpecialType == SpecialType.System_Void || !entry.NamesReturn(CatalogueKey.Model) && RowsTypes.IsScalar(type))
        {
            foreach (int id in instance.Objects)
                Absorb(_facts.Objects[id], learned.Varying(RunningOrigins(_facts.Objects[id].Depth)));
        }

        return Model(learned, type, syntax);
    }

    /// <summary>A model as whatever type it comes in: an object, coefficients, a tuple of them, a function.</summary>
    private Value Model(Value learned, ITypeSymbol type, SyntaxNode syntax)
    {
        if (RowsTypes.IsTask(type, out var result) && result is not null)
            type = result;
        if (type.SpecialType == SpecialType.System_Void || RowsTypes.IsScalar(type))
            return learned;
        if (type is INamedTypeSymbol { IsTupleType: true } tuple)
        {
            var fields = ImmutableDictionary.CreateBuilder<string, Value>(StringComparer.Ordinal);
            for (int i = 0; i < tuple.TupleElements.Length; i++)
                fields["Item" + (i + 1)] = learned;
            return new Value { Fields = fields.ToImmutable() };
        }

        var o = _facts.ObjectAt(syntax, _frame.Chain, type, _loops.Count, 4);
        _version++;
        o.Renew();
        if (RowsTypes.IsCollection(type))
        {
            o.IsCollection = true;
            StoreInto(o, learned);
            return Ref(o);
        }

        Absorb(o, learned);
        return Ref(o).Winning(learned.Wins).Varying(learned.Varies);
    }

    private Value Carry(ISymbol symbol, Value instance, Value[] arguments, ITypeSymbol type, SyntaxNode syntax)
    {
        var all = Deep(instance).Data();
        string? label = instance.Label;
        foreach (var argument in arguments)
        {
            all = all.Combine(Deep(argument));
            foreach (string text in LabelsOf(argument))
                label = label is null ? text : label + " " + text;
        }

        if (symbol.ContainingType?.Name == "StringBuilder" && !instance.Objects.IsEmpty)
        {
            foreach (int id in instance.Objects)
                Absorb(_facts.Objects[id], all.With(traits: Traits.Text));
            return instance;
        }

        if (RowsTypes.IsScalar(type) || symbol.ContainingType?.Name is "Path" or "String")
        {
            var text = all.With(tags: Tag.Move(all.Tags, Level.Whole, Level.Aggregate), traits: all.Traits | Traits.Text);
            return label is null || label.Length > 200 ? text : text.Labelled(label);
        }

        // an object that stands for the ones it was made of: parameters of a network, an engine over a model
        var value = instance;
        foreach (var argument in arguments)
            value = value.Join(argument);
        return value.With(closures: IdSet.Empty);
    }

    private List<string> LabelsOf(Value value)
    {
        var labels = new List<string>();
        if (value.Label is not null)
            labels.Add(value.Label);
        foreach (int id in value.Objects)
        {
            if (_facts.Objects[id].Element.Label is { } label)
                labels.Add(label);
        }

        return labels;
    }

    private Value Correct(Value instance, Value[] arguments, ITypeSymbol type, SyntaxNode syntax)
    {
        var all = Gather(instance, arguments);
        var corrected = all.With(traits: all.Traits | Traits.Corrected);
        if (RowsTypes.IsScalar(type))
            return corrected;
        var o = NewCollection(syntax, type, 6);
        StoreInto(o, corrected);
        foreach (var argument in arguments)
        {
            foreach (int id in argument.Objects)
            {
                o.Per = o.Per.Union(_facts.Objects[id].Per);
                o.Own ??= _facts.Objects[id].Own;
            }
        }

        return Ref(o);
    }

    /// <summary>An optimiser calls the objective with one candidate after the other and returns the best.</summary>
    private Value Optimise(CatalogueEntry entry, IMethodSymbol method, Value instance, Value[] arguments, SyntaxNode syntax, ITypeSymbol type)
    {
        var closures = IdSet.Empty;
        foreach (var argument in arguments)
            closures = closures.Union(argument.Closures).Union(Deep(argument).Closures);
        var own = _facts.OriginOf(syntax);
        var origins = IdSet.Of(own.Id);
        var score = Value.Empty;
        Loop(syntax, origins, IdSet.Empty, () =>
        {
            foreach (int id in closures)
            {
                var candidate = new Value { Varies = origins };
                var parameters = _closures[id].Symbol.Parameters.Select(_ => candidate).ToArray();
                score = score.Join(InvokeClosure(id, parameters, syntax));
            }
        });
        var choice = ChoiceByKey(NamePlace(syntax), origins, score, ChoiceKind.Call, entry.HigherIsBetter != true, null);
        var wins = choice is null ? IdSet.Empty : IdSet.Of(choice.Id);
        var best = score.With(varies: score.Varies.Except(origins)).Winning(wins);
        var winner = new Value { Wins = wins };
        if (RowsTypes.IsScalar(type) || RowsTypes.IsCollection(type))
            return winner;
        if (type is INamedTypeSymbol { IsTupleType: true } tuple)
        {
            var fields = ImmutableDictionary.CreateBuilder<string, Value>(StringComparer.Ordinal);
            for (int i = 0; i < tuple.TupleElements.Length; i++)
                fields["Item" + (i + 1)] = winner;
            return new Value { Fields = fields.ToImmutable(), Wins = wins };
        }

        var o = _facts.ObjectAt(syntax, _frame.Chain, type, _loops.Count, 4);
        foreach (string name in new[] { "Value", "FunctionInfoAtMinimum", "MinimumValue", "Fitness", "Score", "BestScore", "Error", "BestValue" })
            o.Store(name, best);
        Absorb(o, winner);
        return Ref(o);
    }

    private void Report(CatalogueEntry entry, IMethodSymbol method, Value instance, IInvocationOperation invocation)
    {
        var value = Value.Empty;
        string? name = null;
        foreach (var argument in invocation.Arguments)
        {
            if (argument.Parameter is not { } parameter || !entry[CatalogueKey.Value].IsEmpty && !entry.Names(CatalogueKey.Value, parameter.Name))
                continue;
            foreach (var part in PartsOf(argument.Value))
            {
                var one = TextOf(Expression(part), part is IConversionOperation c ? c.Operand.Type : part.Type, part.Syntax);
                if (!one.Wins.IsEmpty || !one.Sites.IsEmpty)
                    name ??= NameOf(part);
                value = value.Combine(one);
            }
        }

        if (Silent || value.Tags.IsEmpty || value.Wins.IsEmpty && value.Sites.IsEmpty)
            return;
        _facts.Claim(new Claim(invocation.Syntax, value, _frame, _facts.Order++, RunningOrigins(), name));
    }

    /// <summary>The values of a `params` array one by one.</summary>
    private static IEnumerable<IOperation> PartsOf(IOperation argument)
    {
        if (argument is IArrayCreationOperation { IsImplicit: true, Initializer: { } initialiser })
            return initialiser.ElementValues;
        if (argument.IsImplicit && CollectionExpression.IsOne(argument))
            return CollectionExpression.Elements(argument);
        return new[] { argument };
    }
}
