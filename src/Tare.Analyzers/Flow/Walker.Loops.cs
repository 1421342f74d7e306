using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

internal sealed partial class Walker
{
    private const string Elements = "[]";
    private const string Contents = "()";

    private IdSet _rowsOfLast;

    /// <summary>Runs a body as a loop: twice, so that what one round leaves is seen by the next, then closes it.</summary>
    private void Loop(SyntaxNode syntax, IdSet origins, IdSet rows, Action body)
    {
        var scope = new LoopScope { Origins = origins, Rows = rows, Syntax = syntax, Frame = _frame };
        _loops.Add(scope);
        for (int pass = 0; pass < 2; pass++)
        {
            var layer = new State(_state);
            scope.Layer = layer;
            scope.IsFirst = pass == 0;
            _state = layer;
            int before = _changes;
            body();
            _state = layer.Under!;
            bool changed = Carry(layer, scope) | CarryObjects(scope) || _changes != before;
            if ((!changed && !scope.Again) || Spent)
                break;
        }

        _loops.RemoveAt(_loops.Count - 1);
        Close(scope);
        _rowsOfLast = scope.Rows;
    }

    /// <summary>Variables that outlive a round differ from round to round.</summary>
    private bool Carry(State layer, LoopScope scope)
    {
        bool changed = false;
        foreach (var pair in layer.Changes.ToArray())
        {
            var before = _state.Get(pair.Key);
            if (before is null)
            {
                if (IsDeclaredOutside(pair.Key))
                    _state.Set(pair.Key, pair.Value);
                continue;
            }

            if (pair.Value.Same(before))
                continue;
            var joined = before.Join(pair.Value).Varying(scope.Origins);
            if (!joined.Same(before))
            {
                _state.Set(pair.Key, joined);
                changed = true;
            }
        }

        return changed;
    }

    /// <summary>The state of an object that a loop changes differs from round to round: a network while it trains.</summary>
    private bool CarryObjects(LoopScope scope)
    {
        _version++;
        bool changed = false;
        foreach (var (o, member) in scope.Written)
        {
            if (o.Depth >= _loops.Count || o.Per.Overlaps(scope.Origins) && member == Elements)
                continue;
            switch (member)
            {
                case Elements:
                    var element = o.Element.Varying(scope.Origins);
                    changed |= !element.Same(o.Element);
                    o.Element = element;
                    break;
                case Contents:
                    var content = o.Content.Varying(scope.Origins);
                    changed |= !content.Same(o.Content);
                    o.Content = content;
                    break;
                default:
                    if (o.Field(member) is { } field && !field.Varying(scope.Origins).Same(field))
                    {
                        o.Fields![member] = field.Varying(scope.Origins);
                        changed = true;
                    }

                    break;
            }
        }

        return changed;
    }

    private bool IsDeclaredOutside(ISymbol symbol) =>
        _declaredAt.TryGetValue(symbol, out int depth) && depth < _loops.Count;

    /// <summary>After a loop over rows, what was gathered from each row is a quantity over all of them.</summary>
    private void Close(LoopScope scope)
    {
        foreach (var pair in scope.Layer.Changes.ToArray())
        {
            var now = _state.Get(pair.Key);
            if (now is null)
                continue;
            if (!scope.Bound.IsEmpty)
                now = now.Varying(scope.Bound);
            int symbolHash = SymbolEqualityComparer.Default.GetHashCode(pair.Key);
            _state.Set(pair.Key, CloseValue(now, scope.Origins, scope.Rows, scope.Syntax, symbolHash));
        }

        if (!scope.Bound.IsEmpty)
        {
            foreach (var (o, member) in scope.Written.ToArray())
            {
                if (o.Depth > _loops.Count)
                    continue;
                if (member == Elements)
                    o.Element = o.Element.Varying(scope.Bound);
                else if (member == Contents)
                    o.Content = o.Content.Varying(scope.Bound);
                else if (o.Field(member) is { } field)
                    o.Fields![member] = field.Varying(scope.Bound);
            }
        }

        foreach (var o in scope.Written.Select(w => w.Object).Distinct().ToArray())
            CloseObject(o, scope);
    }

    private void CloseObject(HeapObject o, LoopScope scope)
    {
        _version++;
        if (o.Depth > _loops.Count)
            return;
        bool perElement = o.Per.Overlaps(scope.Origins);
        if (!perElement)
        {
            o.Element = CloseValue(o.Element, scope.Origins, scope.Rows, scope.Syntax, o.Id);
            o.Key = CloseValue(o.Key, scope.Origins, scope.Rows, scope.Syntax, o.Id);
        }

        o.Content = CloseValue(o.Content, scope.Origins, scope.Rows, scope.Syntax, o.Id);
        if (o.Fields is null)
            return;
        foreach (string name in o.Fields.Keys.ToArray())
            o.Fields[name] = CloseValue(o.Fields[name], scope.Origins, scope.Rows, scope.Syntax, StringComparer.Ordinal.GetHashCode(name) ^ o.Id);
    }

    private Value CloseValue(Value value, IdSet origins, IdSet rows, SyntaxNode syntax, int salt)
    {
        if (value.IsEmpty)
            return value;
        rows = WithAncestors(rows);
        var tags = rows.IsEmpty ? value.Tags : Tag.Move(value.Tags, Level.Element, Level.Aggregate, rows.Contains);
        var sites = value.Sites;
        if (!tags.Equals(value.Tags))
        {
            int site = _facts.SiteOf(syntax, unchecked((_frame.Chain * 31) + salt));
            sites = sites.Add(site);
            Born(site, syntax, tags, value.Wins, rows);
        }

        var varies = value.Varies.Except(origins);
        var indexed = value.Indexed.Except(origins);
        var fields = value.Fields is null ? null : value.MapFields(f => CloseValue(f, origins, rows, syntax, salt));
        if (tags.Equals(value.Tags) && varies.Equals(value.Varies) && indexed.Equals(value.Indexed) && fields is null)
            return value;
        return value.With(tags: tags, varies: varies, indexed: indexed, sites: sites, fields: fields);
    }

    /// <summary>Going through a part goes through rows of all that it is a part of, and of what its indices point at.</summary>
    private IdSet WithAncestors(IdSet rows)
    {
        var all = rows;
        foreach (int id in rows)
        {
            all = all.Union(_facts.Rows[id].PointsInto);
            for (var r = _facts.Rows[id].Parent; r is not null; r = r.Parent)
                all = all.Add(r.Id);
        }

        return all;
    }

    private void Born(int site, SyntaxNode place, IdSet tags, IdSet wins, IdSet? only = null)
    {
        foreach (int tag in tags)
        {
            if (Tag.LevelOf(tag) == Level.Aggregate && (only is null || only.Value.Contains(Tag.Rows(tag))) && _facts.Births.Count < 20000)
                _facts.Births.Add(new Birth(site, place, Tag.Rows(tag), wins, _facts.Order++, _frame));
        }
    }

    private void ForEach(IForEachLoopOperation loop)
    {
        var collection = Expression(loop.Collection);
        var origins = OriginsOf(collection, loop.Collection.Syntax, out var rows);
        Loop(loop.Syntax, origins, rows, () =>
        {
            var element = ElementOf(collection, loop.Collection.Syntax);
            foreach (var local in loop.Locals)
                Declare(local);
            Assign(loop.LoopControlVariable, element, loop.LoopControlVariable.Syntax);
            Statement(loop.Body);
        });
    }

    private void For(IForLoopOperation loop)
    {
        foreach (var local in loop.Locals)
            Declare(local);
        foreach (var before in loop.Before)
            Statement(before);
        var own = _facts.OriginOf(loop.Syntax);
        own.Name ??= loop.Locals.Length > 0 ? loop.Locals[0].Name : null;
        own.Size ??= Counting.For(loop, NumberOf);
        own.CountText ??= Counting.ForText(loop);
        foreach (var local in loop.Locals)
        {
            if (loop.AtLoopBottom.Any(step => step.DescendantsAndSelf().Any(d => d is ILocalReferenceOperation r && SymbolEqualityComparer.Default.Equals(r.Local, local))))
                _state.Set(local, (_state.Get(local) ?? Value.Empty).Join(new Value { Varies = IdSet.Of(own.Id) }));
        }

        Loop(loop.Syntax, IdSet.Of(own.Id), IdSet.Empty, () =>
        {
            var condition = loop.Condition is null ? Value.Empty : Expression(loop.Condition);
            Bounded(condition);
            using (Guarded(condition, loop.Condition ?? loop, negated: false))
                Statement(loop.Body);
            foreach (var after in loop.AtLoopBottom)
                Statement(after);
        });
    }

    private void While(IWhileLoopOperation loop)
    {
        var own = _facts.OriginOf(loop.Syntax);
        own.Size ??= Counting.While(loop, NumberOf);
        Loop(loop.Syntax, IdSet.Of(own.Id), IdSet.Empty, () =>
        {
            if (loop.ConditionIsTop && loop.Condition is not null)
            {
                var condition = Expression(loop.Condition);
                Bounded(condition);
                using (Guarded(condition, loop.Condition, negated: false))
                    Statement(loop.Body);
            }
            else
            {
                Statement(loop.Body);
                if (loop.Condition is not null)
                    Bounded(Expression(loop.Condition));
            }
        });
    }

    /// <summary>How often a loop runs may itself differ between candidates: a number of epochs, of trees, of lags.</summary>
    private void Bounded(Value condition)
    {
        var scope = _loops[_loops.Count - 1];
        scope.Bound = scope.Bound.Union(condition.Varies.Union(condition.Indexed).Except(scope.Origins));
    }

    private double? NumberOf(IOperation operation)
    {
        if (operation.ConstantValue is { HasValue: true, Value: { } constant })
            return Counting.ToDouble(constant);
        // a quiet look at what a variable holds: constants reach loops through locals, fields and parameters
        switch (operation)
        {
            case ILocalReferenceOperation local:
                return _state.Get(local.Local)?.Number;
            case IParameterReferenceOperation parameter:
                return _state.Get(parameter.Parameter)?.Number;
            case IConversionOperation conversion:
                return NumberOf(conversion.Operand);
            case IParenthesizedOperation parenthesised:
                return NumberOf(parenthesised.Operand);
            case IUnaryOperation { OperatorKind: UnaryOperatorKind.Minus } minus:
                return -NumberOf(minus.Operand);
            case IFieldReferenceOperation or IPropertyReferenceOperation:
                var value = Expression(operation);
                return value.Number;
            case IBinaryOperation binary when NumberOf(binary.LeftOperand) is { } a && NumberOf(binary.RightOperand) is { } b:
                return Counting.Apply(binary.OperatorKind, a, b);
            default:
                return null;
        }
    }

    private void Declare(ISymbol local) => _declaredAt[local] = _loops.Count;
}
