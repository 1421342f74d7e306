using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

internal sealed partial class Walker
{
    private Value? SequenceCall(IInvocationOperation invocation, IMethodSymbol method, Value source, Value[] values, int at)
    {
        var syntax = invocation.Syntax;
        var place = NamePlace(syntax);
        var named = at == 1 ? invocation.Arguments.FirstOrDefault(a => a.Parameter?.Ordinal == 0)?.Value.Syntax ?? syntax : invocation.Instance?.Syntax ?? syntax;
        var closures = IdSet.Empty;
        foreach (var value in values)
            closures = closures.Union(value.Closures);
        var type = method.ReturnType;
        switch (method.Name)
        {
            case "ToArray" or "ToList" or "AsEnumerable" or "AsParallel" or "AsSequential" or "AsOrdered" or "AsUnordered" or "ToImmutableArray" or "ToImmutableList" or "AsQueryable"
                or "AsSpan" or "AsMemory" or "Slice" or "Clone" or "Cast" or "OfType" or "AsReadOnly" or "ToHashSet" or "Distinct" or "Reverse" or "Cached" or "GetEnumerator" or "WithDegreeOfParallelism"
                or "WithCancellation" or "ToArrayAsync" or "ToListAsync" or "ToBlockingEnumerable" or "ToAsyncEnumerable" or "DefaultIfEmpty" or "GetConsumingEnumerable" or "ReadAllAsync" or "ToFrozenSet" or "Subspan":
                return View(invocation, method, source, values, syntax, type);
            case "Select" or "ConvertAll" or "SelectAwait":
                return Select(source, closures, syntax, named, type);
            case "SelectMany":
                return SelectMany(source, values, syntax, named, type);
            case "Where" or "FindAll" or "TakeWhile" or "SkipWhile":
                return Where(invocation, source, closures, syntax, named, type, at);
            case "Take" or "Skip" or "SkipLast" or "TakeLast" or "GetRange" or "Chunk":
                return Taken(invocation, method, source, values, at, syntax, type);
            case "OrderBy" or "OrderByDescending" or "Order" or "OrderDescending":
                return Ordered(source, closures, method.Name.EndsWith("Descending", StringComparison.Ordinal), syntax, named, place, type);
            case "ThenBy" or "ThenByDescending":
                if (closures.Count > 0)
                    Map(source, closures, syntax, named);
                return source;
            case "Sort":
                return Sort(invocation, method, source, values, closures, syntax, named, place);
            case "First" or "FirstOrDefault" or "Last" or "LastOrDefault" or "Single" or "SingleOrDefault" or "ElementAt" or "ElementAtOrDefault" or "Find" or "FindLast" or "Peek" or "Dequeue" or "Pop" or "FirstAsync":
                return First(invocation, method, source, values, closures, syntax, named, place);
            case "Max" or "Min" or "MaxAsync" or "MinAsync":
                return ExtremeOf(source, closures, method.Name.StartsWith("Min", StringComparison.Ordinal), syntax, named, place);
            case "MaxBy" or "MinBy":
                return ExtremeBy(source, closures, method.Name == "MinBy", syntax, named, place);
            case "IndexOf" or "LastIndexOf" or "FindIndex" or "BinarySearch":
                return IndexOf(source, values, closures, syntax, named, place);
            case "Sum" or "Average" or "LongCount" or "Count" or "Any" or "All" or "TrueForAll" or "Exists" or "Contains" or "SequenceEqual" or "SumAsync" or "AverageAsync" or "CountAsync":
                return Reduce(invocation, method, source, values, closures, syntax, named);
            case "Aggregate":
                return Aggregate(source, values, closures, syntax, named, place);
            case "Zip":
                return Zip(source, values, closures, syntax, named, type);
            case "Concat" or "Union" or "Append" or "Prepend" or "Except" or "Intersect" or "UnionBy":
                return Concat(source, values, syntax, type);
            case "GroupBy" or "ToLookup":
                return GroupBy(source, values, closures, syntax, named, type);
            case "ToDictionary" or "ToImmutableDictionary" or "ToSortedDictionary" or "ToFrozenDictionary":
                return ToDictionary(invocation, source, values, syntax, named, type);
            case "Join" or "GroupJoin":
                return JoinSequences(source, values, syntax, named, type);
            case "Range" when method.ContainingType.Name is "Enumerable" or "ParallelEnumerable" or "AsyncEnumerable":
                return RangeOf(invocation, values, at, source, syntax, type);
            case "Repeat" when method.ContainingType.Name is "Enumerable" or "ParallelEnumerable":
                var repeated = NewCollection(syntax, type);
                StoreInto(repeated, source.IsEmpty && values.Length > 1 ? values[0] : source);
                return Ref(repeated);
            case "Empty":
                return Ref(NewCollection(syntax, type));
            case "Add" or "TryAdd" or "Enqueue" or "Push" or "AddLast" or "AddFirst" or "Insert" or "AddOrUpdate" or "TryWrite" or "WriteAsync" or "AddRange" or "InsertRange" or "UnionWith":
                return Adds(method, source, values, closures, syntax);
            case "ForEach" or "ForAll":
                Map(source, closures, syntax, named);
                return Value.Empty;
            case "GetValueOrDefault" or "GetOrAdd" or "TryGetValue" or "TryPeek" or "TryDequeue" or "TryPop" or "TryTake":
                return Lookup(invocation, method, source, values, closures, syntax);
            case "Copy" or "CopyTo" or "BlockCopy" or "ConstrainedCopy":
                return Copy(invocation, method, source, values, at, syntax);
            case "GetLength" or "GetUpperBound" or "GetLongLength":
                return CountOf(source, syntax);
            case "Fill" or "Clear" or "Remove" or "RemoveAt" or "RemoveAll" or "RemoveRange" or "EnsureCapacity" or "TrimExcess" or "Dispose":
                return Value.Empty;
            case "Index":
                return Select(source, IdSet.Empty, syntax, named, type, indexed: true);
            default:
                return null;
        }
    }

    private Value View(IInvocationOperation invocation, IMethodSymbol method, Value source, Value[] values, SyntaxNode syntax, ITypeSymbol type)
    {
        if (method.Name is "AsSpan" or "Slice" or "AsMemory" && values.Length > 0)
        {
            var arguments = invocation.Arguments.Where(a => a.Parameter is { Name: "start" or "length" or "range" or "startIndex" }).ToDictionary(a => a.Parameter!.Name, a => a.Value.Syntax);
            if (invocation.Arguments.FirstOrDefault(a => a.Value is IRangeOperation)?.Value is IRangeOperation range)
                return SliceByRange(source, range, syntax, type);
            string start = KeyOf(arguments.TryGetValue("start", out var s) || arguments.TryGetValue("startIndex", out s) ? s : null);
            string length = KeyOf(arguments.TryGetValue("length", out var l) ? l : null);
            return Span(source, start, length, Bounds(values), syntax, type);
        }

        var viewed = Pass(source, syntax, type, Deep(source));
        if (method.Name is "Reverse")
        {
            foreach (int id in viewed.Objects)
                _facts.Objects[id].Descending = !_facts.Objects[id].Descending;
        }

        return viewed;
    }

    private static Value Bounds(Value[] values)
    {
        var all = Value.Empty;
        foreach (var value in values)
            all = all.Combine(value);
        return all;
    }

    private Value Span(Value source, string start, string length, Value bounds, SyntaxNode syntax, ITypeSymbol type)
    {
        (string Key, string? Other, Cut Cut) cut = start is "" or "0"
            ? length == "" ? ("..", null, Cut.None) : Bounds("0", length)
            : length == "" || length.EndsWith("-" + start, StringComparison.Ordinal) ? Bounds(start, "") : (start + "..+" + length, null, Cut.Middle);
        return cut.Cut == Cut.None ? Pass(source, syntax, type, Deep(source)) : Slice(source, cut.Key, cut.Other, cut.Cut, bounds, syntax, type);
    }

    private Value Taken(IInvocationOperation invocation, IMethodSymbol method, Value source, Value[] values, int at, SyntaxNode syntax, ITypeSymbol type)
    {
        var arguments = invocation.Arguments.Where(a => a.Parameter is { } p && p.Ordinal >= at).OrderBy(a => a.Parameter!.Ordinal).Select(a => a.Value).ToArray();
        if (arguments.Length == 0)
            return source;
        if (arguments[0] is IRangeOperation range)
            return SliceByRange(source, range, syntax, type);
        string text = KeyOf(arguments[0].Syntax);
        switch (method.Name)
        {
            case "GetRange" when arguments.Length == 2:
                return Span(source, text, KeyOf(arguments[1].Syntax), Bounds(values), syntax, type);
            case "Chunk":
                var chunk = Slice(source, "chunk" + text, null, Cut.Middle, values[0], syntax, type);
                var list = NewCollection(syntax, type, 2);
                StoreInto(list, chunk);
                return Ref(list);
            // a header line or two is no part of the rows
            case "Skip" when values[0].Number is <= 2:
                return Pass(source, syntax, type, Deep(source));
            case "Take" when IsSorted(source, out var order):
                var top = Pass(source, syntax, type, Deep(source));
                foreach (int id in top.Objects)
                {
                    var o = _facts.Objects[id];
                    var rows = RowsThrough(source, o);
                    // which elements are taken depends on the key of all of them, and on how many are asked for
                    var key = order.Combine(values[0]);
                    var closed = key.With(tags: Tag.Move(key.Tags, Level.Element, Level.Aggregate, rows.Contains), varies: key.Varies.Except(Per(o)));
                    o.Content = o.Content.Join(closed.With(traits: Traits.None));
                    StoreInto(o, o.Element.With(tags: o.Element.Tags.Union(closed.Tags), varies: o.Element.Varies.Union(closed.Varies), wins: o.Element.Wins.Union(closed.Wins)));
                    if (values[0].Number is not 1)
                        o.Count = values[0].Number;
                }

                return top;
            case "Take" or "SkipLast":
                string end = method.Name == "Take" ? text : "^" + text;
                return Slice(source, Bounds("0", end).Key, Bounds("0", end).Other, Cut.Head, values[0], syntax, type);
            default:
                string start = method.Name == "Skip" ? text : "^" + text;
                return Slice(source, Bounds(start, "").Key, Bounds(start, "").Other, Cut.Tail, values[0], syntax, type);
        }
    }

    private void Along(Value mapped, IdSet rows)
    {
        foreach (int id in mapped.Objects)
        {
            var o = _facts.Objects[id];
            if (o.Rows is not null || Tag.Has(o.Element.Tags, Level.Element))
                o.Along = o.Along.Union(rows);
        }
    }

    private static IdSet Per(HeapObject o) => o.Per.IsEmpty ? o.Own is null ? IdSet.Empty : IdSet.Of(o.Own.Id) : o.Per;

    private bool IsSorted(Value source, out Value key)
    {
        key = Value.Empty;
        foreach (int id in source.Objects)
        {
            if (_facts.Objects[id].SortKey is { } sort)
                key = key.Join(sort);
        }

        return !key.IsEmpty;
    }

    private Value Rebuild(Value source, Value element, SyntaxNode syntax, ITypeSymbol type, int slot = 40)
    {
        var ids = IdSet.Empty;
        if (source.Objects.IsEmpty)
        {
            var made = NewCollection(syntax, type, slot);
            StoreInto(made, element);
            made.Per = made.Per.Union(IdSet.Of(_facts.OriginOf(syntax).Id));
            return Ref(made).Tagged(source.Tags).Winning(source.Wins).Varying(source.Varies);
        }

        foreach (int id in source.Objects)
        {
            var from = _facts.Objects[id];
            var o = NewCollection(syntax, type, slot++);
            o.Per = o.Per.Union(from.Per);
            o.Own ??= from.Per.IsEmpty ? OwnOrigin(from) : null;
            o.Count ??= from.Count;
            o.SizeVaries = o.SizeVaries.Union(from.SizeVaries);
            o.Along = o.Along.Union(from.Along);
            o.Rows ??= from.Rows;
            o.IsWindow = from.IsWindow;
            o.Content = o.Content.Join(from.IsCollection ? from.Content : Value.Empty);
            StoreInto(o, element);
            ids = ids.Add(o.Id);
        }

        return new Value { Objects = ids, Tags = source.Tags, Varies = source.Varies, Wins = source.Wins, Indexed = source.Indexed };
    }

    private Value Select(Value source, IdSet closures, SyntaxNode syntax, SyntaxNode named, ITypeSymbol type, bool indexed = false)
    {
        var element = indexed ? ElementOf(source, named) is var e ? Indexed(e) : Value.Empty : Map(source, closures, syntax, named);
        var along = indexed ? IdSet.Empty : _rowsOfLast;
        var mapped = Rebuild(source, element, syntax, type);
        Along(mapped, along);
        // rows mapped to scores or models are no longer rows; rows mapped to rows or readings still are
        foreach (int id in mapped.Objects)
        {
            var o = _facts.Objects[id];
            if (o.Rows is not null && !DependsOn(o.Element, o.Rows))
                o.Rows = null;
        }

        if (IsSorted(source, out _))
        {
            foreach (int id in mapped.Objects)
            {
                foreach (int from in source.Objects)
                {
                    var o = _facts.Objects[id];
                    o.SortKey ??= _facts.Objects[from].SortKey;
                    o.SortPlace ??= _facts.Objects[from].SortPlace;
                    o.Descending |= _facts.Objects[from].Descending;
                }
            }
        }

        return mapped;
    }

    private static Value Indexed(Value element) => new()
    {
        Fields = ImmutableDictionary<string, Value>.Empty.Add("Item1", new Value { Varies = element.Varies }).Add("Item2", element),
    };

    private bool DependsOn(Value element, RowSet rows)
    {
        if (element.Tags.Contains(Tag.Of(rows.Id, Level.Element)))
            return true;
        if (element.Fields is not null && element.Fields.Values.Any(f => DependsOn(f, rows)))
            return true;
        return !element.Objects.IsEmpty && RowsOf(Deep(element, 3)).Contains(rows.Id);
    }

    private Value SelectMany(Value source, Value[] values, SyntaxNode syntax, SyntaxNode named, ITypeSymbol type)
    {
        var origins = OriginsOf(source, named, out var rows);
        var element = Value.Empty;
        var inner = Value.Empty;
        var innerOrigins = IdSet.Empty;
        Loop(syntax, origins, rows, () =>
        {
            var item = ElementOf(source, named);
            var collection = Value.Empty;
            foreach (int id in values.Length > 0 ? values[0].Closures : IdSet.Empty)
                collection = collection.Join(InvokeClosure(id, new[] { item, new Value { Varies = origins } }, syntax));
            inner = inner.Join(collection);
            innerOrigins = innerOrigins.Union(OriginsOf(collection, InnerName(syntax) ?? syntax, out _));
            var one = ElementOf(collection, syntax);
            if (values.Length > 1)
            {
                var result = Value.Empty;
                foreach (int id in values[1].Closures)
                    result = result.Join(InvokeClosure(id, new[] { item, one }, syntax));
                one = result;
            }

            element = element.IsEmpty ? one : element.Join(one);
        });
        var o = NewCollection(syntax, type, 40);
        o.Per = o.Per.Union(origins).Union(innerOrigins);
        StoreInto(o, element);
        foreach (int id in inner.Objects)
        {
            if (_facts.Objects[id].Rows is { } r && DependsOn(o.Element, r))
                o.Rows ??= r;
        }

        if (o.Rows is null && source.Objects.Count == 1 && _facts.Objects[source.Objects.First()].Rows is { } outer && DependsOn(o.Element, outer))
            o.Rows = outer;
        return Ref(o);
    }

    private static SyntaxNode? InnerName(SyntaxNode syntax) => syntax is FromClauseSyntax from ? from.Expression : null;

    private Value Where(IInvocationOperation invocation, Value source, IdSet closures, SyntaxNode syntax, SyntaxNode named, ITypeSymbol type, int at)
    {
        var condition = Map(source, closures, syntax, named);
        var along = _rowsOfLast;
        var lambda = Predicate(closures) ?? invocation.Arguments.FirstOrDefault(a => a.Parameter?.Ordinal == at)?.Value.Syntax ?? syntax;
        var (key, other) = PredicateKey(lambda);
        // `Where(r => r.Score == best)`: the choice fell when the extreme was found
        var equal = EqualWinner(condition);
        bool scores = Tag.Has(condition.Tags, Level.Aggregate) || !condition.Compares.IsEmpty;
        Value result;
        if (scores && !source.Objects.IsEmpty)
            result = Rebuild(source, ElementOf(source, named), syntax, type);
        else
            result = Slice(source, key, other, Cut.Filter, condition.With(varies: condition.Varies.Except(Origins(source))), syntax, type);
        Along(result, along);
        foreach (int id in result.Objects)
        {
            var o = _facts.Objects[id];
            // which rows pass depends on a model or a setting, so what is counted of them is a quantity of it
            var kept = condition.With(compares: IdSet.Empty, varies: condition.Varies.Except(Origins(source)));
            if (Tag.Has(kept.Tags, Level.Aggregate) || Tag.Has(kept.Tags, Level.Element) && !kept.Varies.IsEmpty)
                o.Content = o.Content.Join(kept);
            o.Count = null;
            foreach (int from in source.Objects)
            {
                o.SortKey ??= _facts.Objects[from].SortKey;
                o.SortPlace ??= _facts.Objects[from].SortPlace;
                o.Descending |= _facts.Objects[from].Descending;
            }
        }

        return result.Winning(equal);
    }

    /// <summary>A predicate that only calls a function handed over, or is one: the text of that function tells the parts apart.</summary>
    private SyntaxNode? Predicate(IdSet closures)
    {
        if (closures.IsEmpty)
            return null;
        var closure = _closures[closures.First()];
        var call = closure.Body?.DescendantsAndSelf().OfType<IInvocationOperation>().FirstOrDefault(i => i.TargetMethod.MethodKind == MethodKind.DelegateInvoke);
        if (call?.Instance is IParameterReferenceOperation parameter && _state.Get(parameter.Parameter) is { Closures.IsEmpty: false } given)
            return _closures[given.Closures.First()].Syntax;
        return closure.Syntax;
    }

    private IdSet Origins(Value source)
    {
        var origins = IdSet.Empty;
        foreach (int id in source.Objects)
            origins = origins.Union(Per(_facts.Objects[id]));
        return origins;
    }

    private IdSet EqualWinner(Value condition)
    {
        var wins = IdSet.Empty;
        foreach (int id in condition.Compares)
        {
            var comparison = _facts.Comparisons[id];
            if (!comparison.Equality)
                continue;
            if (comparison.Left.Has(Traits.Extreme))
                wins = wins.Union(comparison.Left.Wins);
            if (comparison.Right.Has(Traits.Extreme))
                wins = wins.Union(comparison.Right.Wins);
        }

        return wins;
    }

    private Value Ordered(Value source, IdSet closures, bool descending, SyntaxNode syntax, SyntaxNode named, SyntaxNode place, ITypeSymbol type)
    {
        var key = closures.IsEmpty ? ElementOf(source, named) : Map(source, closures, syntax, named);
        var result = Rebuild(source, ElementOf(source, named), syntax, type);
        foreach (int id in result.Objects)
        {
            var o = _facts.Objects[id];
            o.SortKey = key;
            o.SortPlace = QueryPlace(place);
            o.Descending = descending;
            if (key.Has(Traits.Random) && o.Rows is not null)
                o.Rows.Shuffled = true;
        }

        return result;
    }

    private static SyntaxNode QueryPlace(SyntaxNode place) => place is OrderingSyntax { Parent: OrderByClauseSyntax clause } ? clause : place;

    private Value Sort(IInvocationOperation invocation, IMethodSymbol method, Value source, Value[] values, IdSet closures, SyntaxNode syntax, SyntaxNode named, SyntaxNode place)
    {
        Value key;
        bool descending = false;
        if (closures.IsEmpty)
        {
            key = ElementOf(source, named);
        }
        else
        {
            key = Map(source, closures, syntax, named).With(compares: IdSet.Empty);
            descending = ComparesBackwards(closures);
        }

        foreach (int id in source.Objects)
            MarkSorted(_facts.Objects[id], key, place, descending);
        // Array.Sort(keys, items)
        foreach (var value in values)
        {
            foreach (int id in value.Objects)
            {
                if (_facts.Objects[id].IsCollection)
                    MarkSorted(_facts.Objects[id], key, place, descending);
            }
        }

        return Value.Empty;
    }

    private static void MarkSorted(HeapObject o, Value key, SyntaxNode place, bool descending)
    {
        o.SortKey = key;
        o.SortPlace = place;
        o.Descending = descending;
    }

    private bool ComparesBackwards(IdSet closures)
    {
        foreach (int id in closures)
        {
            var closure = _closures[id];
            if (closure.Body is null || closure.Symbol.Parameters.Length != 2)
                continue;
            foreach (var operation in closure.Body.DescendantsAndSelf())
            {
                if (operation is not IInvocationOperation { TargetMethod.Name: "CompareTo" or "Compare" } call)
                    continue;
                var first = call.Instance ?? call.Arguments.FirstOrDefault()?.Value;
                if (first is not null && first.DescendantsAndSelf().OfType<IParameterReferenceOperation>().Any(p => SymbolEqualityComparer.Default.Equals(p.Parameter, closure.Symbol.Parameters[1])))
                    return !(call.Syntax.Parent is PrefixUnaryExpressionSyntax);
                return call.Syntax.Parent is PrefixUnaryExpressionSyntax;
            }
        }

        return false;
    }

    private Value First(IInvocationOperation invocation, IMethodSymbol method, Value source, Value[] values, IdSet closures, SyntaxNode syntax, SyntaxNode named, SyntaxNode place)
    {
        var wins = IdSet.Empty;
        if (closures.Count > 0)
        {
            var condition = Map(source, closures, syntax, named);
            wins = TakeEqual(condition, source, place);
        }

        bool edge = method.Name is "First" or "FirstOrDefault" or "Last" or "LastOrDefault" or "Single" or "Peek" or "Dequeue" or "Pop" || (method.Name.StartsWith("ElementAt", StringComparison.Ordinal) && values.Length > 0 && values[0].Number is 0);
        bool last = method.Name.StartsWith("Last", StringComparison.Ordinal);
        var result = Value.Empty;
        bool first = true;
        foreach (int id in source.Objects)
        {
            var o = _facts.Objects[id];
            var one = edge && TakeEdge(o, source, last, syntax) is { } taken ? taken : ElementOf(o) is var e ? e.With(varies: e.Varies.Except(Per(o))) : Value.Empty;
            // sorted by key: the first of a dictionary that keeps itself in order
            if (edge && o.SortKey is null && o.Type?.Name is "SortedDictionary" or "SortedList" or "SortedSet" && Tag.Has(o.Type.Name == "SortedSet" ? o.Element.Tags : o.Key.Tags, Level.Aggregate))
            {
                var key = o.Type!.Name == "SortedSet" ? o.Element : o.Key;
                if (ChoiceByKey(place, Per(o), key, ChoiceKind.Call, !last, null) is { } choice)
                    one = one.Winning(IdSet.Of(choice.Id));
            }

            result = first ? one : result.Join(one);
            first = false;
        }

        if (first)
            result = source;
        return result.Tagged(source.Tags).Winning(source.Wins.Union(wins)).Varying(source.Varies);
    }

    /// <summary>The element whose score equals the extreme: the choice falls here.</summary>
    private IdSet TakeEqual(Value condition, Value source, SyntaxNode place)
    {
        var wins = IdSet.Empty;
        foreach (int id in EqualWinner(condition))
        {
            var extreme = _facts.Choices[id];
            if (Silent)
                continue;
            var choice = _facts.ChoiceAt(Place(place), _frame, ChoiceKind.Call);
            choice.Kind = ChoiceKind.Call;
            choice.Family = choice.Family.Union(extreme.Family);
            choice.RowFamily = choice.RowFamily.Union(extreme.RowFamily);
            choice.Rows = choice.Rows.Union(extreme.Rows);
            choice.Sites = choice.Sites.Union(extreme.Sites);
            choice.LowerWins = extreme.LowerWins;
            choice.StraightCount = Math.Max(choice.StraightCount, extreme.StraightCount);
            choice.ScoreName ??= extreme.ScoreName;
            choice.IsPValue |= extreme.IsPValue;
            choice.Kept = true;
            wins = wins.Add(choice.Id);
        }

        return wins;
    }

    private Value ExtremeOf(Value source, IdSet? closures, bool lower, SyntaxNode syntax, SyntaxNode named, SyntaxNode? place = null)
    {
        var origins = OriginsOf(source, named, out var rows);
        var key = closures is null || closures.Value.IsEmpty ? ElementOf(source, named) : Map(source, closures.Value, syntax, named);
        var compared = key;
        if (key.Fields is not null && key.Fields.TryGetValue("Item1", out var leading))
            compared = leading;
        bool whole = key.Fields is not null;
        var choice = ChoiceByKey(place ?? syntax, origins, compared, whole ? ChoiceKind.Call : ChoiceKind.Extreme, lower, null);
        var over = compared.Varies.Union(compared.Indexed).Intersect(origins);
        foreach (int r in RowsOf(compared))
            over = over.Union(_facts.Rows[r].Varies.Intersect(origins));
        var value = CloseValue(key, origins, rows, syntax, 1);
        if (choice is not null)
            value = value.Winning(IdSet.Of(choice.Id));
        return whole ? value : value.Extremal(lower ? over : IdSet.Empty);
    }

    private Value ExtremeBy(Value source, IdSet closures, bool lower, SyntaxNode syntax, SyntaxNode named, SyntaxNode place)
    {
        var origins = OriginsOf(source, named, out var rows);
        var key = Map(source, closures, syntax, named);
        rows = rows.Union(_rowsOfLast);
        var choice = ChoiceByKey(place, origins, key, ChoiceKind.Call, lower, null);
        var element = ElementOf(source, named);
        rows = rows.Where(r => !IsRunning(r));
        element = CloseValue(element, origins, rows, syntax, 4);
        // the row nearest to another: which one depends on all of them
        var order = key.With(tags: Tag.Move(key.Tags, Level.Element, Level.Aggregate, rows.Contains));
        if (Tag.At(key.Tags, Level.Element).Overlaps(rows))
            element = Tagged(element, order.Tags);
        return choice is null ? element : element.Winning(IdSet.Of(choice.Id));
    }

    private Value IndexOf(Value source, Value[] values, IdSet closures, SyntaxNode syntax, SyntaxNode named, SyntaxNode place)
    {
        var result = Value.Empty;
        if (closures.Count > 0)
        {
            var condition = Map(source, closures, syntax, named);
            var wins = TakeEqual(condition, source, place);
            return condition.With(compares: IdSet.Empty, tags: IdSet.Empty, wins: wins, sites: IdSet.Empty, varies: condition.Varies.Except(Origins(source)), traits: Traits.None);
        }

        foreach (var value in values)
        {
            if (!value.Has(Traits.Extreme))
                continue;
            var fake = new Value { Compares = IdSet.Of(_facts.Compare(place, _frame, i => new Comparison(i, null!, value, value, null, null, false, _frame, _loops.Count, true))) };
            result = result.Winning(TakeEqual(fake, source, place));
        }

        return result;
    }

    private Value Reduce(IInvocationOperation invocation, IMethodSymbol method, Value source, Value[] values, IdSet closures, SyntaxNode syntax, SyntaxNode named)
    {
        var origins = OriginsOf(source, named, out var rows);
        Value result;
        if (closures.Count > 0)
        {
            bool all = method.Name is "All" or "TrueForAll";
            if (all)
                _needsAll++;
            result = Map(source, closures, syntax, named);
            rows = rows.Union(_rowsOfLast);
            if (all)
                _needsAll--;
        }
        else if (method.Name is "Sum" or "Average" or "SumAsync" or "AverageAsync" || source.Objects.IsEmpty)
        {
            result = ElementOf(source, named);
        }
        else if (method.Name is "Contains" or "SequenceEqual")
        {
            var a = Deep(source);
            var b = Bounds(values.Select(v => Deep(v)).ToArray());
            Meets(a, b);
            result = a.Combine(b);
            result = result.With(tags: Tag.Move(result.Tags, Level.Whole, Tag.Has(source.Tags, Level.Element) || rows.IsEmpty ? Level.Element : Level.Aggregate));
        }
        else
        {
            return CountOf(source, syntax);
        }

        if (closures.Count > 0)
        {
            foreach (int id in source.Objects)
            {
                if (Tag.Has(_facts.Objects[id].Content.Tags, Level.Aggregate))
                    result = result.Combine(_facts.Objects[id].Content.With(traits: Traits.None));
            }
        }

        var filtered = CloseValue(result.With(objects: IdSet.Empty), origins, rows, syntax, 2);
        filtered = filtered.With(traits: filtered.Traits & ~(Traits.PValue | Traits.Tail | Traits.Text | Traits.Extreme), compares: IdSet.Empty, closures: IdSet.Empty);
        return filtered.Tagged(source.Tags).Winning(source.Wins).Varying(source.Varies);
    }

    private Value Aggregate(Value source, Value[] values, IdSet closures, SyntaxNode syntax, SyntaxNode named, SyntaxNode place)
    {
        var origins = OriginsOf(source, named, out var rows);
        var seed = values.FirstOrDefault(v => v.Closures.IsEmpty);
        var result = seed ?? ElementOf(source, named);
        var before = _placeOverride;
        _placeOverride = place;
        Loop(syntax, origins, rows, () =>
        {
            var item = ElementOf(source, named);
            foreach (int id in closures)
            {
                if (_closures[id].Symbol.Parameters.Length != 2)
                    continue;
                result = result.Join(InvokeClosure(id, new[] { result, item }, syntax));
            }
        });
        _placeOverride = before;
        return CloseValue(result, origins, rows, syntax, 3);
    }

    private Value Zip(Value source, Value[] values, IdSet closures, SyntaxNode syntax, SyntaxNode named, ITypeSymbol type)
    {
        var others = values.Where(v => v.Closures.IsEmpty).ToArray();
        var origins = OriginsOf(source, named, out var rows);
        foreach (var other in others)
        {
            origins = origins.Union(OriginsOf(other, syntax, out var otherRows));
            rows = rows.Union(otherRows);
        }

        var element = Value.Empty;
        Loop(syntax, origins, rows, () =>
        {
            var items = new List<Value> { ElementOf(source, named) };
            items.AddRange(others.Select(o => ElementOf(o, syntax)));
            if (closures.IsEmpty)
            {
                var fields = ImmutableDictionary.CreateBuilder<string, Value>(StringComparer.Ordinal);
                for (int i = 0; i < items.Count; i++)
                    fields["Item" + (i + 1)] = items[i];
                fields["First"] = items[0];
                if (items.Count > 1)
                    fields["Second"] = items[1];
                element = new Value { Fields = fields.ToImmutable() };
                return;
            }

            foreach (int id in closures)
            {
                var one = InvokeClosure(id, items.ToArray(), syntax);
                element = element.IsEmpty ? one : element.Join(one);
            }
        });
        var o = NewCollection(syntax, type, 40);
        o.Per = o.Per.Union(origins);
        o.IsWindow |= source.Objects.Count > 0 && _facts.Objects[source.Objects.First()].IsWindow;
        StoreInto(o, element);
        if (source.Objects.Count == 1 && _facts.Objects[source.Objects.First()].Rows is { } r && !HoldsQuantities(o))
            o.Rows ??= r;
        // a vector of one row zipped with weights still belongs to that row
        var within = ElementTags(source.Tags);
        foreach (var other in others)
            within = within.Union(ElementTags(other.Tags));
        return Ref(o).Tagged(within);
    }

    private Value Concat(Value source, Value[] values, SyntaxNode syntax, ITypeSymbol type)
    {
        var o = NewCollection(syntax, type, 40);
        var parts = new[] { source }.Concat(values).ToArray();
        foreach (var part in parts)
        {
            if (part.Objects.IsEmpty || !_facts.Objects[part.Objects.First()].IsCollection)
            {
                StoreInto(o, part);
                continue;
            }

            foreach (int id in part.Objects)
            {
                var from = _facts.Objects[id];
                StoreInto(o, from.Rows is null ? from.Element : Tagged(from.Element, IdSet.Of(Tag.Of(from.Rows.Id, Level.Element))));
                o.Per = o.Per.Union(from.Per);
                o.Content = o.Content.Join(from.Content);
                if (parts.Length == 1 || values.Length == 0)
                    o.Rows ??= from.Rows;
            }
        }

        o.Count ??= parts.Select(SizeOf).Aggregate((double?)0, (a, b) => a + b);
        return Ref(o).Tagged(ElementTags(source.Tags));
    }

    private Value GroupBy(Value source, Value[] values, IdSet closures, SyntaxNode syntax, SyntaxNode named, ITypeSymbol type)
    {
        var origins = OriginsOf(source, named, out var rows);
        var key = values.Length > 0 ? Map(source, values[0].Closures, syntax, named) : Value.Empty;
        var element = values.Length > 1 && values[1].Closures.Count > 0 ? Map(source, values[1].Closures, syntax, named) : ElementOf(source, named);
        var groups = NewCollection(syntax, type, 40);
        var own = OwnOrigin(groups);
        own.Rows = own.Rows.Union(rows);
        var group = _facts.ObjectAt(syntax, _frame.Chain, null, _loops.Count, 41);
        group.IsCollection = true;
        group.Element = group.Element.Join(element);
        group.Per = group.Per.Union(origins);
        foreach (int id in source.Objects)
            group.Content = group.Content.Join(_facts.Objects[id].Content);
        if (!Tag.Has(source.Tags, Level.Element) && rows.Count >= 1)
        {
            var part = _facts.PartOf(_facts.Rows[rows.First()], "group@" + group.Id, syntax);
            part.Cut = Cut.Filter;
            part.Varies = part.Varies.Union(IdSet.Of(own.Id));
            group.Rows = part;
            group.Element = Retag(group.Element, rows.First(), part.Id);
        }

        group.Key = group.Key.Join(CloseValue(key, origins, IdSet.Empty, syntax, 5).Varying(IdSet.Of(own.Id)));
        StoreInto(groups, Ref(group));
        return Ref(groups).Tagged(ElementTags(source.Tags));
    }

    private Value ToDictionary(IInvocationOperation invocation, Value source, Value[] values, SyntaxNode syntax, SyntaxNode named, ITypeSymbol type)
    {
        var key = values.Length > 0 ? Map(source, values[0].Closures, syntax, named) : Value.Empty;
        var element = values.Length > 1 && values[1].Closures.Count > 0 ? Map(source, values[1].Closures, syntax, named) : ElementOf(source, named);
        var result = Rebuild(source, element, syntax, type);
        foreach (int id in result.Objects)
        {
            var o = _facts.Objects[id];
            o.Key = o.Key.Join(key);
            if (o.Rows is not null && !DependsOn(o.Element, o.Rows))
                o.Rows = null;
        }

        return result;
    }

    private Value JoinSequences(Value source, Value[] values, SyntaxNode syntax, SyntaxNode named, ITypeSymbol type)
    {
        var inner = values.Length > 0 ? values[0] : Value.Empty;
        var one = ElementOf(source, named);
        var other = ElementOf(inner, syntax);
        var element = Value.Empty;
        foreach (var value in values)
        {
            foreach (int id in value.Closures)
            {
                if (_closures[id].Symbol.Parameters.Length == 2)
                    element = element.Join(InvokeClosure(id, new[] { one, other }, syntax));
            }
        }

        var result = Rebuild(source, element.IsEmpty ? one.Combine(other) : element, syntax, type);
        foreach (int id in result.Objects)
        {
            foreach (int from in inner.Objects)
                _facts.Objects[id].Per = _facts.Objects[id].Per.Union(_facts.Objects[from].Per);
        }

        return result;
    }

    private Value RangeOf(IInvocationOperation invocation, Value[] values, int at, Value source, SyntaxNode syntax, ITypeSymbol type)
    {
        var arguments = ArgumentValues(invocation);
        var o = NewCollection(syntax, type);
        if (arguments.Length > 1)
        {
            o.Count ??= arguments[1].Number;
            o.SizeVaries = o.SizeVaries.Union(arguments[1].Varies);
            o.CountText ??= arguments[1].CountText ?? (arguments[1].Number is null ? invocation.Arguments[1].Value.Syntax.ToString() : null);
        }

        return Ref(o);
    }

    private Value Adds(IMethodSymbol method, Value source, Value[] values, IdSet closures, SyntaxNode syntax)
    {
        foreach (int id in source.Objects)
        {
            var o = _facts.Objects[id];
            if (method.Name is "AddRange" or "InsertRange" or "UnionWith")
            {
                var range = values[values.Length - 1];
                foreach (int from in range.Objects)
                {
                    o.Per = o.Per.Union(_facts.Objects[from].Per).Union(RunningOrigins(o.Depth));
                    if (o.Rows is null && o.Element.IsEmpty)
                        o.Rows = _facts.Objects[from].Rows;
                }

                StoreInto(o, ElementOf(range, syntax));
                Written(o, Elements);
                continue;
            }

            if (method.Name == "AddOrUpdate")
            {
                var made = Value.Empty;
                foreach (int c in closures)
                    made = made.Join(InvokeClosure(c, new[] { values[0], o.Element }, syntax));
                Add(o, values.Length > 1 && values[1].Closures.IsEmpty ? made.Join(values[1]) : made, syntax, values[0]);
                continue;
            }

            var value = values.Length == 0 ? Value.Empty : values.Length == 1 ? values[0] : method.Name == "Insert" ? values[1] : values[1];
            if (method.Name == "Enqueue" && values.Length == 2)
            {
                Add(o, values[0], syntax);
                o.SortKey = o.SortKey is null ? values[1] : o.SortKey.Join(values[1]);
                o.SortPlace = NamePlace(syntax);
                continue;
            }

            value = Settle(o.Depth, value, syntax, null, survives: true);
            Add(o, value, syntax, values.Length == 2 && method.Name is "Add" or "TryAdd" ? values[0] : null);
        }

        return method.ReturnsVoid ? Value.Empty : source;
    }

    private Value Lookup(IInvocationOperation invocation, IMethodSymbol method, Value source, Value[] values, IdSet closures, SyntaxNode syntax)
    {
        var element = Value.Empty;
        foreach (int id in source.Objects)
            element = element.Join(_facts.Objects[id].Element);
        foreach (int c in closures)
        {
            var made = InvokeClosure(c, new[] { values[0] }, syntax);
            element = element.Join(made);
            foreach (int id in source.Objects)
                Add(_facts.Objects[id], made, syntax, values[0]);
        }

        if (values.Length > 0)
            element = element.Winning(values[0].Wins).Tagged(values[0].Tags).Varying(values[0].Varies);
        element = element.Tagged(source.Tags).Winning(source.Wins);
        foreach (var argument in invocation.Arguments)
        {
            if (argument.Parameter is { RefKind: RefKind.Out })
                Assign(argument.Value, element, syntax, survives: false);
        }

        return element;
    }

    private Value Copy(IInvocationOperation invocation, IMethodSymbol method, Value source, Value[] values, int at, SyntaxNode syntax)
    {
        var arguments = invocation.Arguments.OrderBy(a => a.Parameter?.Ordinal).ToArray();
        var all = ArgumentValues(invocation);
        var arrays = arguments.Where(a => RowsTypes.IsRowsLike(a.Value is IConversionOperation c ? c.Operand.Type : a.Value.Type)).Select(a => all[a.Parameter!.Ordinal]).ToList();
        if (method.Name == "CopyTo")
            arrays.Insert(0, source);
        if (arrays.Count < 2)
            return Value.Empty;
        var numbers = arguments.Where(a => RowsTypes.IsNumber(a.Value.Type)).Select(a => KeyOf(a.Value.Syntax)).ToArray();
        string start = numbers.Length == 3 ? numbers[0] : "0";
        string length = numbers.Length == 3 ? numbers[2] : numbers.Length == 1 && method.Name != "CopyTo" ? numbers[0] : "";
        var part = Span(arrays[0], start, length, Value.Empty, syntax, null!);
        foreach (int to in arrays[1].Objects)
        {
            foreach (int from in part.Objects)
            {
                var target = _facts.Objects[to];
                var origin = _facts.Objects[from];
                target.Rows ??= origin.Rows;
                StoreInto(target, origin.Element);
                target.Per = target.Per.Union(origin.Per);
            }
        }

        return Value.Empty;
    }
}
