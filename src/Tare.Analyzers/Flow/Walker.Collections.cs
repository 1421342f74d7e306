using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

/// <summary>Arrays, lists and dictionaries: one abstract element each.</summary>
internal sealed partial class Walker
{
    private HeapObject NewCollection(SyntaxNode syntax, ITypeSymbol? type, int slot = 0)
    {
        var o = _facts.ObjectAt(syntax, _frame.Chain, type, _loops.Count, slot);
        o.IsCollection = true;
        return o;
    }

    private static Value Ref(HeapObject o) => new() { Objects = IdSet.Of(o.Id) };

    private Value CreateArray(IArrayCreationOperation array)
    {
        if (array.Initializer is not null)
            return Literal(array.Initializer.ElementValues, array.Syntax, array.Type);
        var o = NewCollection(array.Syntax, array.Type);
        _version++;
        o.Renew();
        foreach (var size in array.DimensionSizes)
        {
            var value = Expression(size);
            o.Count ??= value.Number;
            o.SizeVaries = o.SizeVaries.Union(value.Varies);
        }

        return Ref(o);
    }

    private Value Literal(IReadOnlyList<IOperation> elements, SyntaxNode syntax, ITypeSymbol? type)
    {
        var o = NewCollection(syntax, type);
        _version++;
        o.Renew();
        double count = 0;
        bool counted = true;
        // a very long literal says no more than its beginning does
        int most = Math.Min(elements.Count, 200);
        for (int i = 0; i < elements.Count; i++)
        {
            if (i >= most)
            {
                count += elements.Count - most;
                break;
            }

            var element = elements[i];
            if (element is IArrayInitializerOperation nested)
            {
                StoreInto(o, Literal(nested.ElementValues, nested.Syntax, null));
                count++;
                continue;
            }

            bool spread = CollectionExpression.IsSpread(element);
            if (spread)
            {
                foreach (var child in element.ChildOperations)
                {
                    var inner = Expression(child);
                    StoreInto(o, ElementOf(inner, child.Syntax));
                    o.Per = o.Per.Union(OriginsOf(inner, child.Syntax, out var rows));
                    if (rows is { Count: 1 } && o.Rows is null && elements.Count == 1)
                        o.Rows = _facts.Rows[rows.First()];
                    counted = counted && SizeOf(inner) is { } size && (count += size) > 0;
                    break;
                }

                continue;
            }

            StoreInto(o, Expression(element));
            count++;
        }

        if (counted && count > 0 && o.Count is null)
            o.Count = count;
        return Ref(o);
    }

    private void StoreInto(HeapObject o, Value value)
    {
        Hold(value);
        var joined = o.Element.Join(value);
        if (o.HoldsPValues && joined.Fields is null && joined.Objects.IsEmpty)
            joined = joined.With(traits: joined.Traits | Traits.PValue);
        if (!joined.Same(o.Element))
        {
            o.Element = joined;
            Changed();
        }
    }

    /// <summary>Adds one element: the loops that run now, but did not when the collection was made, tell elements apart.</summary>
    private void Add(HeapObject o, Value value, SyntaxNode syntax, Value? key = null)
    {
        value = Implied(value, _frame.GuardDepth);
        var origins = RunningOrigins(o.Depth);
        if (origins.IsEmpty)
            (o.AddSites ??= new HashSet<SyntaxNode>()).Add(syntax);
        PartByCondition(o, value, syntax);
        if (!o.Per.ContainsAll(origins))
        {
            o.Per = o.Per.Union(origins);
            Changed();
        }

        StoreInto(o, value);
        if (key is not null)
        {
            var joined = o.Key.Join(key);
            if (!joined.Same(o.Key))
            {
                o.Key = joined;
                Changed();
            }
        }

        Written(o, Elements);
    }

    /// <summary>A list that takes some rows and not others, by a condition or by the bounds of an index loop, is a part of them.</summary>
    private void PartByCondition(HeapObject o, Value value, SyntaxNode syntax)
    {
        if (o.Rows is not null || !IsWholeRow(value, out int row))
            return;
        int loop = _loops.FindIndex(l => l.Rows.Contains(row));
        if (loop < 0 || o.Depth > loop)
            return;
        var rows = _facts.Rows[row];
        bool conditional = false;
        for (int i = 0; i < _guards.Count; i++)
            conditional |= _guards[i].LoopDepth > loop && !IsLoopCondition(_guards[i].Syntax);
        string? key = conditional ? "if@" + o.Id : null;
        if (key is null && _loops[loop].Syntax is ForStatementSyntax loopSyntax)
        {
            string start = loopSyntax.Declaration?.Variables.FirstOrDefault()?.Initializer?.Value.ToString() ?? "0";
            string end = loopSyntax.Condition is BinaryExpressionSyntax binary ? binary.Right.ToString() : "";
            if (end.EndsWith(".Length", StringComparison.Ordinal) || end.EndsWith(".Count", StringComparison.Ordinal))
                end = "";
            if (start != "0" || end != "")
                key = Bounds(start.Replace(" ", ""), end.Replace(" ", "")).Key;
        }

        if (key is null or "..")
            return;
        var part = _facts.PartOf(rows, key, o.Site ?? syntax);
        part.Cut = conditional ? Cut.Filter : key.StartsWith("0..", StringComparison.Ordinal) ? Cut.Head : key.EndsWith("..", StringComparison.Ordinal) ? Cut.Tail : Cut.Middle;
        o.Rows = part;
    }

    private static bool IsLoopCondition(SyntaxNode syntax) => syntax.Parent is ForStatementSyntax or WhileStatementSyntax or DoStatementSyntax;

    private bool IsWholeRow(Value value, out int row)
    {
        row = -1;
        var rows = Tag.At(value.Tags, Level.Element);
        if (rows.IsEmpty && value.Fields is not null)
        {
            foreach (var field in value.Fields.Values)
                rows = rows.Union(Tag.At(field.Tags, Level.Element));
        }

        if (rows.Count != 1 || Tag.Has(value.Tags, Level.Aggregate))
            return false;
        row = rows.First();
        return true;
    }

    private Value StoreElement(Value collection, IReadOnlyList<IOperation> indices, Value value, SyntaxNode syntax, bool survives)
    {
        var index = Value.Empty;
        foreach (var i in indices)
            index = index.Combine(Expression(i));
        int depth = int.MaxValue;
        foreach (int id in collection.Objects)
            depth = Math.Min(depth, _facts.Objects[id].Depth);
        value = Settle(depth == int.MaxValue ? 0 : depth, value, syntax, null, survives);
        foreach (int id in collection.Objects)
        {
            var o = _facts.Objects[id];
            var per = index.Varies.Union(index.Indexed).Intersect(RunningOrigins(o.Depth));
            // an index that a row decides stores one element a row
            if (per.IsEmpty && index.Has(Traits.Random))
                per = RunningOrigins(o.Depth);
            if (!o.Per.ContainsAll(per))
            {
                o.Per = o.Per.Union(per);
                Changed();
            }

            if (per.IsEmpty && RunningOrigins(o.Depth).IsEmpty && !(o.Type is IArrayTypeSymbol))
                (o.AddSites ??= new HashSet<SyntaxNode>()).Add(syntax);
            if (o.Rows is null && !o.IsWindow && !per.IsEmpty)
                PartByCondition(o, value, syntax);
            StoreInto(o, value);
            if (!index.IsEmpty)
            {
                var key = o.Key.Join(index);
                if (!key.Same(o.Key))
                {
                    o.Key = key;
                    Changed();
                }
            }

            Written(o, Elements);
        }

        return value;
    }

    /// <summary>One element, not a particular one.</summary>
    private Value ElementOf(Value collection, SyntaxNode syntax)
    {
        var element = Value.Empty;
        bool first = true;
        foreach (int id in collection.Objects)
        {
            var one = ElementOf(_facts.Objects[id]);
            element = first ? one : element.Join(one);
            first = false;
        }

        if (first)
            return collection.With(objects: IdSet.Empty, closures: IdSet.Empty);
        element = element.Tagged(collection.Tags).Winning(collection.Wins).Varying(collection.Varies);
        return collection.Indexed.IsEmpty ? element : element.With(indexed: element.Indexed.Union(collection.Indexed));
    }

    private Value ElementOf(HeapObject o)
    {
        if (!o.IsCollection && o.Rows is null)
            return o.Content.Join(o.Element);
        var element = Stored(o.Element);
        if (o.Key is { IsEmpty: false } && IsDictionary(o.Type))
            element = Pair(o.Key, element);
        if (!o.Content.IsEmpty && o.Element.IsEmpty)
            element = element.Join(o.Content);
        if (o.Rows is not null)
            element = Tagged(element, IdSet.Of(Tag.Of(o.Rows.Id, Level.Element)));
        if (!o.SizeVaries.IsEmpty)
            element = element.Varying(o.SizeVaries);
        if (o.Per.IsEmpty)
            element = element.Varying(IdSet.Of(OwnOrigin(o).Id));
        else if (!element.Objects.IsEmpty || !element.Closures.IsEmpty)
            element = element.With(indexed: element.Indexed.Union(o.Per));
        return element;
    }

    private static Value Stored(Value value) =>
        value.Has(Traits.Stored) || !Tag.Has(value.Tags, Level.Aggregate) ? value : value.With(traits: value.Traits | Traits.Stored);

    private static Value Tagged(Value value, IdSet tags) =>
        value.Fields is null ? value.Tagged(tags) : value.With(tags: value.Tags.Union(tags), fields: value.MapFields(f => f.IsEmpty || f.Number is not null ? f.Tagged(tags) : f));

    private static bool IsDictionary(ITypeSymbol? type) => type is INamedTypeSymbol { TypeArguments.Length: 2 } named
        && (named.Name.Contains("Dictionary") || named.Name is "SortedList" or "KeyedCollection");

    private static Value Pair(Value key, Value value) => new()
    {
        Fields = System.Collections.Immutable.ImmutableDictionary<string, Value>.Empty.Add("Key", key).Add("Value", value),
    };

    private Origin OwnOrigin(HeapObject o)
    {
        if (o.Own is null)
        {
            o.Own = _facts.NewOrigin(o.Site);
            if (o.Rows is not null)
                o.Own.Rows = IdSet.Of(o.Rows.Id);
        }

        o.Own.Size ??= o.Count ?? (o.AddSites is { Count: > 1 } adds ? adds.Count : null);
        o.Own.CountText ??= o.CountText;
        return o.Own;
    }

    /// <summary>What going through a collection varies with, and the rows it goes through.</summary>
    private IdSet OriginsOf(Value collection, SyntaxNode syntax, out IdSet rows)
    {
        var origins = IdSet.Empty;
        rows = IdSet.Empty;
        foreach (int id in collection.Objects)
        {
            var o = _facts.Objects[id];
            var own = o.Per.IsEmpty ? IdSet.Of(OwnOrigin(o).Id) : o.Per;
            origins = origins.Union(own);
            rows = rows.Union(RowsThrough(collection, o));
            if (o.Per.IsEmpty && o.Own!.Name is null)
            {
                o.Own.Name = NameOfSyntax(syntax);
                if (o.Own.CountText is null && o.Own.Name is not null && syntax is IdentifierNameSyntax or MemberAccessExpressionSyntax)
                    o.Own.CountText = CountTextOf(o.Own.Name, o.Type);
            }
        }

        if (origins.IsEmpty)
        {
            var own = _facts.OriginOf(syntax);
            own.Name ??= NameOfSyntax(syntax);
            origins = IdSet.Of(own.Id);
            rows = Tag.At(collection.Tags, Level.Whole).Union(Tag.At(collection.Tags, Level.Element));
            if (!rows.IsEmpty && Tag.Has(collection.Tags, Level.Element))
                rows = IdSet.Empty;
        }

        foreach (int id in origins)
        {
            if (!rows.IsEmpty)
                MarkRows(_facts.Origins[id], rows);
        }

        return origins;
    }

    /// <summary>An origin goes through rows when the elements are rows, not when they merely carry scores of them.</summary>
    private void MarkRows(Origin origin, IdSet rows) => origin.Rows = origin.Rows.Union(rows);

    private static string? NameOfSyntax(SyntaxNode syntax) => syntax switch
    {
        IdentifierNameSyntax identifier => identifier.Identifier.ValueText,
        MemberAccessExpressionSyntax member => member.Name.Identifier.ValueText,
        _ => null,
    };

    private static string? CountTextOf(string name, ITypeSymbol? type) => type switch
    {
        IArrayTypeSymbol { Rank: 1 } => name + ".Length",
        INamedTypeSymbol { Name: "List" or "IReadOnlyList" or "IList" or "IReadOnlyCollection" or "ICollection" or "Dictionary" or "HashSet" } => name + ".Count",
        _ => null,
    };

    private double? SizeOf(Value collection)
    {
        if (collection.Objects.Count != 1)
            return null;
        var o = _facts.Objects[collection.Objects.First()];
        if (o.Count is { } count)
            return count;
        double product = 1;
        if (o.Per.IsEmpty)
            return OwnOrigin(o).Size;
        foreach (int id in o.Per)
        {
            if (_facts.Origins[id].Size is not { } size)
                return null;
            product *= size;
        }

        return product;
    }

    /// <summary>`collection[i]`: an index that a running loop moves reads every element in turn.</summary>
    private Value IndexInto(Value collection, IReadOnlyList<IOperation> indices, SyntaxNode syntax, ITypeSymbol? type)
    {
        if (indices.Count == 1 && RangeIn(indices[0]) is { } range)
            return SliceByRange(collection, range, syntax, type);
        var index = Value.Empty;
        foreach (var i in indices)
            index = index.Combine(Expression(i));
        // a column by its name holds the same rows
        if (indices.Count == 1 && indices[0].Type?.SpecialType == SpecialType.System_String && collection.Objects.Count == 1
            && _facts.Objects[collection.Objects.First()] is { Rows: not null } table && !IsDictionary(table.Type))
            return collection;
        if (indices.Count > 1)
        {
            // a table: the first index goes down the rows, the others along one
            var row = Expression(indices[0]);
            var column = index.With(varies: index.Varies.Except(row.Varies));
            var cell = ElementAt(collection, row, null, syntax, indices);
            return cell.With(indexed: cell.Indexed.Union(column.Varies), wins: cell.Wins.Union(column.Wins));
        }

        return ElementAt(collection, index, index, syntax, indices);
    }

    /// <summary>A range, as such or converted to a library's own index type.</summary>
    private static IRangeOperation? RangeIn(IOperation index) => index switch
    {
        IRangeOperation range => range,
        IConversionOperation conversion => RangeIn(conversion.Operand),
        IArrayCreationOperation { Initializer.ElementValues: { Length: > 0 } values } => RangeIn(values[0]),
        _ when CollectionExpression.IsOne(index) && CollectionExpression.Elements(index) is { Count: > 0 } elements => RangeIn(elements[0]),
        _ => null,
    };

    private Value ElementAt(Value collection, Value index, Value? single, SyntaxNode syntax, IReadOnlyList<IOperation> indices)
    {
        if (collection.Objects.IsEmpty)
        {
            // the row of a matrix, the cell of a row: belongs to what it is taken from
            var cell = collection.With(closures: IdSet.Empty);
            return index.Varies.IsEmpty && index.Wins.IsEmpty ? cell : cell.With(indexed: cell.Indexed.Union(index.Varies), wins: cell.Wins.Union(index.Wins));
        }

        var value = Value.Empty;
        bool first = true;
        foreach (int id in collection.Objects)
        {
            var o = _facts.Objects[id];
            if (IsEdge(indices) && o.SortKey is not null && TakeEdge(o, collection, IsFromEnd(indices), syntax) is { } taken)
            {
                value = first ? taken : value.Join(taken);
                first = false;
                continue;
            }

            var element = Stored(o.Element.Join(o.Content));
            if (o.Rows is not null)
                element = Tagged(element, IdSet.Of(Tag.Of(o.Rows.Id, Level.Element)));
            if (!o.SizeVaries.IsEmpty)
                element = element.Varying(o.SizeVaries);
            MoveThrough(collection, o, index);
            var moved = index.Varies.Union(index.Indexed);
            bool throughRows = !RowsIn(o).IsEmpty || Tag.Has(collection.Tags, Level.Element);
            if (throughRows || o.Per.IsEmpty)
            {
                if (o.Rows is null && !throughRows)
                    element = element.Varying(index.Varies);
                else if (!moved.IsEmpty)
                    element = element.With(indexed: element.Indexed.Union(moved));
            }

            value = first ? element : value.Join(element);
            first = false;
        }

        // an index that itself stands for rows: the rows it points at
        var pointing = Tag.At(index.Tags, Level.Element);
        if (!pointing.IsEmpty)
        {
            foreach (int id in collection.Objects)
            {
                foreach (int target in RowsIn(_facts.Objects[id]))
                {
                    foreach (int p in pointing)
                    {
                        if (p != target)
                            _facts.Rows[p].PointsInto = _facts.Rows[p].PointsInto.Add(target);
                    }
                }
            }
        }

        return value.Tagged(collection.Tags.Union(index.Tags)).Winning(collection.Wins.Union(index.Wins)).Varying(collection.Varies);
    }

    /// <summary>A loop whose variable indexes a collection goes through that collection's rows.</summary>
    private void MoveThrough(Value collection, HeapObject o, Value index)
    {
        var rows = RowsThrough(collection, o);
        var moved = index.Varies.Union(index.Indexed);
        bool through = false;
        for (int i = _loops.Count - 1; i >= 0; i--)
        {
            var scope = _loops[i];
            bool random = index.Has(Traits.Random) && i == _loops.Count - 1;
            // an index computed from data goes where the data says, not where the loop goes
            if (!random && (!index.Tags.IsEmpty || !moved.Overlaps(scope.Origins)))
                continue;
            // the innermost loop moves the index; around it only a loop that steps it by hand does so too
            if (through && !(scope.Syntax is WhileStatementSyntax or DoStatementSyntax))
                continue;
            if (!rows.IsEmpty && !scope.Rows.ContainsAll(rows))
            {
                scope.Rows = scope.Rows.Union(rows);
                foreach (int origin in scope.Origins)
                    MarkRows(_facts.Origins[origin], rows);
            }

            if (!o.Per.IsEmpty && !random && !scope.Origins.ContainsAll(o.Per) && !o.Per.Overlaps(RunningOrigins()))
                scope.Origins = scope.Origins.Union(o.Per);
            through = true;
        }
    }

    /// <summary>A waiting list that a hand-stepped loop fills and empties as it goes: in its first round it may yet turn out to go through the rows.</summary>
    private bool IsQueueOfRunning()
    {
        for (int i = 0; i < _loops.Count; i++)
        {
            if (_loops[i].IsFirst && _loops[i].Syntax is WhileStatementSyntax or DoStatementSyntax)
            {
                _loops[i].Again = true;
                return true;
            }
        }

        return false;
    }

    private static bool IsEdge(IReadOnlyList<IOperation> indices) => indices.Count == 1 && indices[0].Syntax.ToString().Replace(" ", "") is var text
        && (text is "0" or "^1" || text.EndsWith(".Length-1", StringComparison.Ordinal) || text.EndsWith(".Count-1", StringComparison.Ordinal));

    private static bool IsFromEnd(IReadOnlyList<IOperation> indices) => indices[0].Syntax.ToString() != "0";

    private Value ImplicitIndex(IImplicitIndexerReferenceOperation reference)
    {
        var collection = Expression(reference.Instance);
        if (reference.Argument is IRangeOperation range)
            return SliceByRange(collection, range, reference.Syntax, reference.Type);
        return IndexInto(collection, new[] { reference.Argument }, reference.Syntax, reference.Type);
    }

    private Value SliceByRange(Value collection, IRangeOperation range, SyntaxNode syntax, ITypeSymbol? type)
    {
        var bounds = Expression(range.LeftOperand).Combine(Expression(range.RightOperand));
        var (key, other, cut) = Bounds(KeyOf(range.LeftOperand?.Syntax), KeyOf(range.RightOperand?.Syntax));
        if (cut == Cut.None)
            return collection;
        return Slice(collection, key, other, cut, bounds, syntax, type);
    }

    private Value Indexer(IPropertyReferenceOperation reference, Value instance)
    {
        var arguments = reference.Arguments.Select(a => a.Value).ToArray();
        if (reference.Property.GetMethod is { } getter && _bodies.Of(getter) is not null && !instance.Objects.IsEmpty)
            return Call(getter, instance, System.Collections.Immutable.ImmutableArray.CreateRange(arguments.Select(Expression)), reference.Syntax);
        return IndexInto(instance, arguments, reference.Syntax, reference.Type);
    }

    /// <summary>The first or last element of sorted elements: the sort chose it.</summary>
    private Value? TakeEdge(HeapObject o, Value collection, bool last, SyntaxNode syntax)
    {
        if (o.SortKey is not { } key)
            return null;
        var origins = o.Per.IsEmpty ? IdSet.Of(OwnOrigin(o).Id) : o.Per;
        bool self = key.Sites.Equals(o.Element.Sites) && !key.Sites.IsEmpty && o.Element.Fields is null && o.Element.Objects.IsEmpty;
        var choice = ChoiceByKey(o.SortPlace ?? syntax, origins, key, self ? ChoiceKind.Extreme : ChoiceKind.Call, o.Descending == last, null);
        var element = ElementOf(o);
        // which one comes first depends on all of them
        var rows = RowsThrough(collection, o).Where(r => !IsRunning(r) && !IsQueueOfRunning());
        element = CloseValue(element, origins, rows, syntax, 4);
        var order = key.With(tags: Tag.Move(key.Tags, Level.Element, Level.Aggregate, rows.Contains));
        if (Tag.At(key.Tags, Level.Element).Overlaps(rows))
            element = Tagged(element, order.Tags);
        return (choice is null ? element : element.Winning(IdSet.Of(choice.Id))).Tagged(collection.Tags).Winning(collection.Wins);
    }
}
