using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

/// <summary>Row sets: naming, cutting, and what a value's rows are.</summary>
internal sealed partial class Walker
{
    /// <summary>Gives rows the name of the variable they are put in, and numbers what their name says.</summary>
    private Value Named(Value value, string name, ISymbol symbol, ITypeSymbol? type, SyntaxNode syntax)
    {
        if (!value.Objects.IsEmpty)
        {
            foreach (int id in value.Objects)
                Name(_facts.Objects[id], name, symbol, syntax);
            return value;
        }

        if (value.Fields is not null)
            return value;
        return NamedTraits(value, name, type);
    }

    private void Name(HeapObject o, string name, ISymbol? symbol, SyntaxNode syntax, int depth = 0)
    {
        var declared = RoleAttributes.RoleOf(symbol, o.Type);
        var role = _vocabulary.RoleOf(name, out bool isEval);
        if (o.IsCollection && !o.HoldsPValues && Vocabulary.SaysPValue(name))
        {
            o.HoldsPValues = true;
            StoreInto(o, Value.Empty);
        }

        if (o.Rows is null)
        {
            if (role == Role.Unknown && declared == Role.Unknown)
                return;
            if (!o.IsCollection && !RowsTypes.IsRowsLike(o.Type))
                return;
            if (o.IsCollection)
            {
                if (RowsIn(o).IsEmpty && !HoldsQuantities(o))
                    EnsureRows(o, syntax);
            }
            else if (depth < 2)
            {
                // a wrapper: its members are the rows
                EnsureRows(o, syntax);
                if (o.Fields is not null)
                {
                    foreach (var field in o.Fields.Values.ToArray())
                    {
                        foreach (int id in field.Objects)
                        {
                            var inner = _facts.Objects[id];
                            if (inner.IsCollection)
                                Name(inner, name, symbol, syntax, depth + 1);
                        }
                    }
                }
            }
        }

        if (o.Rows is null && o.IsCollection && RowsIn(o) is { IsEmpty: false, Count: 1 } only && role != Role.Unknown)
            o.Rows = _facts.Rows[only.First()];
        if (o.Rows is not { } rows)
            return;
        rows.AddName(name, symbol, role, isEval: isEval);
        if (declared != Role.Unknown)
        {
            rows.DeclaredRole = declared;
            rows.DeclaredEvidence = Evidence.Declared;
        }
    }

    /// <summary>The elements are scores or models, not rows.</summary>
    private bool HoldsQuantities(HeapObject o)
    {
        var element = Deep(o.Element, 3);
        return Tag.Has(element.Tags, Level.Aggregate) && !Tag.Has(element.Tags, Level.Element);
    }

    private RowSet EnsureRows(HeapObject o, SyntaxNode syntax)
    {
        if (o.Rows is { } rows)
            return rows;
        rows = _facts.NewRows(Source.Fresh, null, syntax);
        o.Rows = rows;
        foreach (int origin in o.Per)
            _facts.Origins[origin].Rows = _facts.Origins[origin].Rows.Add(rows.Id);
        if (o.Own is not null)
            o.Own.Rows = o.Own.Rows.Add(rows.Id);
        return rows;
    }

    /// <summary>The rows that a collection holds, directly or because each element belongs to a row.</summary>
    private IdSet RowsIn(HeapObject o)
    {
        if (o.IsWindow)
            return IdSet.Empty;
        var rows = o.Rows is null ? IdSet.Empty : IdSet.Of(o.Rows.Id);
        if (!o.IsCollection)
            return rows;
        rows = rows.Union(o.Along);
        var held = Tag.At(o.Element.Tags, Level.Element);
        if (o.Element.Fields is not null)
        {
            foreach (var field in o.Element.Fields.Values)
                held = held.Union(Tag.At(field.Tags, Level.Element));
        }

        // one element a row: the loops that stored them went through those rows
        if (o.Rows is null && !o.Per.IsEmpty && !held.IsEmpty)
        {
            var through = IdSet.Empty;
            foreach (int origin in o.Per)
                through = through.Union(_facts.Origins[origin].Rows);
            held = held.Where(r => through.Contains(r) || Related(through, r));
        }

        return rows.Union(held);
    }

    /// <summary>
    /// The rows that going through a collection goes through: not those to one of which the whole collection belongs,
    /// as the readings of one board do.
    /// </summary>
    private IdSet RowsThrough(Value collection, HeapObject o)
    {
        var rows = RowsIn(o);
        if (rows.IsEmpty)
            return rows;
        var within = Tag.At(collection.Tags, Level.Element);
        return rows.Where(r => r == o.Rows?.Id ? !within.Contains(r) : !Related(within, r) && !MadeInside(o, r));
    }

    private bool Related(IdSet rows, int row)
    {
        foreach (int r in rows)
        {
            if (_facts.Rows[r].IsWithin(_facts.Rows[row]) || _facts.Rows[row].IsWithin(_facts.Rows[r]) || _facts.Rows[r].PointsInto.Contains(row))
                return true;
        }

        return false;
    }

    /// <summary>Made anew for each of these rows.</summary>
    private bool MadeInside(HeapObject o, int row)
    {
        for (int i = 0; i < _loops.Count && i < o.Depth; i++)
        {
            if (Related(_loops[i].Rows, row))
                return true;
        }

        return false;
    }

    /// <summary>All rows that a value depends on or holds.</summary>
    private static IdSet RowsOf(Value deep)
    {
        var rows = IdSet.Empty;
        foreach (int tag in deep.Tags)
            rows = rows.Add(Tag.Rows(tag));
        return rows;
    }

    /// <summary>A slice, a filter or a half of a collection.</summary>
    private Value Slice(Value collection, string key, string? otherKey, Cut cut, Value bounds, SyntaxNode syntax, ITypeSymbol? type, SyntaxNode? named = null)
    {
        var result = IdSet.Empty;
        bool withinRow = Tag.Has(collection.Tags, Level.Element);
        int slot = 20;
        foreach (int id in collection.Objects)
        {
            var o = _facts.Objects[id];
            var n = NewCollection(syntax, type, slot++);
            n.Element = n.Element.Join(o.Element);
            n.Key = n.Key.Join(o.Key);
            n.Content = o.Content;
            n.Per = n.Per.Union(o.Per);
            n.Own ??= o.Own;
            n.SortKey = o.SortKey;
            n.SortPlace = o.SortPlace;
            n.Descending = o.Descending;
            result = result.Add(n.Id);
            if (withinRow)
                continue;
            var rows = o.Rows ?? (RowsIn(o) is { Count: 1 } only ? _facts.Rows[only.First()] : null);
            if (rows is null && (HoldsQuantities(o) || o.IsWindow))
                continue;
            rows ??= EnsureRows(o, syntax);
            var running = bounds.Varies.Union(bounds.Indexed).Intersect(RunningOrigins());
            n.IsWindow = cut != Cut.Filter && (OverRows(running, rows) || IsTentative(running));
            if (n.IsWindow)
            {
                n.Element = n.Element.Tagged(IdSet.Of(Tag.Of(rows.Id, Level.Element)));
                continue;
            }

            var part = _facts.PartOf(rows, key, named ?? syntax);
            part.Cut = cut;
            part.OtherKey = otherKey;
            part.Varies = part.Varies.Union(running);
            part.Shuffled |= rows.Shuffled;
            n.Rows = part;
            n.Element = Retag(n.Element, rows.Id, part.Id);
        }

        return new Value
        {
            Objects = result,
            Tags = collection.Tags,
            Varies = collection.Varies.Union(withinRow ? bounds.Varies : IdSet.Empty),
            Wins = collection.Wins,
            Sites = collection.Sites,
            Indexed = collection.Indexed,
        };
    }

    /// <summary>Bounds that move with an index loop in its first round: whether it goes through the rows shows by its end.</summary>
    private bool IsTentative(IdSet running)
    {
        bool tentative = false;
        foreach (var scope in _loops)
        {
            if (scope.IsFirst && scope.Syntax is ForStatementSyntax or WhileStatementSyntax or DoStatementSyntax && running.Overlaps(scope.Origins))
            {
                scope.Again = true;
                tentative = true;
            }
        }

        return tentative;
    }

    private static Value Retag(Value value, int from, int to)
    {
        var tags = IdSet.Empty;
        foreach (int tag in value.Tags)
            tags = tags.Add(Tag.Rows(tag) == from && Tag.LevelOf(tag) == Level.Element ? Tag.Of(to, Level.Element) : tag);
        var fields = value.Fields is null ? null : value.MapFields(f => Retag(f, from, to));
        return value.With(tags: tags, fields: fields);
    }

    /// <summary>Some of the origins go through these rows or rows around them.</summary>
    private bool OverRows(IdSet origins, RowSet rows)
    {
        foreach (int id in origins)
        {
            foreach (int r in _facts.Origins[id].Rows)
            {
                if (rows.IsWithin(_facts.Rows[r]) || _facts.Rows[r].IsWithin(rows))
                    return true;
            }
        }

        return false;
    }

    private static string KeyOf(SyntaxNode? syntax) => syntax is null ? "" : syntax.ToString().Replace(" ", "").Replace("(", "").Replace(")", "");

    private static (string Key, string? Other, Cut Cut) Bounds(string start, string end)
    {
        if (start is "" or "0")
            return end is "" ? ("..", null, Cut.None) : ("0.." + end, end + "..", Cut.Head);
        return end is "" ? (start + "..", "0.." + start, Cut.Tail) : (start + ".." + end, null, Cut.Middle);
    }

    /// <summary>A predicate as text, and the text of its negation, with the lambda's own parameter names taken out.</summary>
    private static (string Key, string? Other) PredicateKey(SyntaxNode syntax)
    {
        if (syntax is not LambdaExpressionSyntax lambda || lambda.ExpressionBody is not { } body)
            return ("?" + KeyOf(syntax), null);
        string text = " " + body.ToString() + " ";
        var parameters = lambda switch
        {
            SimpleLambdaExpressionSyntax simple => new[] { simple.Parameter.Identifier.ValueText },
            ParenthesizedLambdaExpressionSyntax many => many.ParameterList.Parameters.Select(p => p.Identifier.ValueText).ToArray(),
            _ => Array.Empty<string>(),
        };
        for (int i = 0; i < parameters.Length; i++)
        {
            if (parameters[i] != "_")
                text = System.Text.RegularExpressions.Regex.Replace(text, "\\b" + System.Text.RegularExpressions.Regex.Escape(parameters[i]) + "\\b", "$" + i);
        }

        text = text.Replace(" ", "");
        string? other = body switch
        {
            BinaryExpressionSyntax binary => Negate(text, binary.OperatorToken.ValueText),
            PrefixUnaryExpressionSyntax { OperatorToken.ValueText: "!" } => text.Substring(1).Trim('(', ')'),
            _ => "!" + text,
        };
        return ("?" + text.Trim('(', ')'), other is null ? null : "?" + other.Trim('(', ')'));
    }

    private static string? Negate(string text, string op)
    {
        string? opposite = op switch { "==" => "!=", "!=" => "==", "<" => ">=", ">=" => "<", ">" => "<=", "<=" => ">", _ => null };
        if (opposite is null)
            return "!" + text;
        int at = text.IndexOf(op, StringComparison.Ordinal);
        return at < 0 ? null : text.Substring(0, at) + opposite + text.Substring(at + op.Length);
    }

    /// <summary>A model made from some rows is applied to others.</summary>
    private void Meets(Value a, Value b)
    {
        if (Silent || a.Tags.IsEmpty || b.Tags.IsEmpty)
            return;
        MeetOneWay(a, b);
        MeetOneWay(b, a);
    }

    private void MeetOneWay(Value model, Value rows)
    {
        foreach (int m in model.Tags)
        {
            if (Tag.LevelOf(m) != Level.Aggregate)
                continue;
            foreach (int r in rows.Tags)
            {
                if (Tag.LevelOf(r) == Level.Aggregate)
                    continue;
                _facts.Meet(Tag.Rows(m), Tag.Rows(r), model.Varies, model.Wins.Union(rows.Wins), model.Has(Traits.Stored));
            }
        }
    }
}
