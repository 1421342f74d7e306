using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

/// <summary>Comparisons, and what they decide.</summary>
internal sealed partial class Walker
{
    private IDisposable Guarded(Value condition, IOperation test, bool negated, bool otherExits = false)
    {
        _guards.Add(new Guard { Condition = condition, LoopDepth = _loops.Count, Negated = negated, Syntax = test.Syntax, OtherExits = otherExits });
        return new Popper(_guards);
    }

    private sealed class Popper : IDisposable
    {
        private readonly List<Guard> _guards;

        public Popper(List<Guard> guards) => _guards = guards;

        public void Dispose()
        {
            if (_guards.Count > 0)
                _guards.RemoveAt(_guards.Count - 1);
        }
    }

    /// <summary>What is set under a condition on single rows depends on those rows: `if (predicted == label) hits++`.</summary>
    private Value Implied(Value value, int fromGuard = 0)
    {
        for (int i = fromGuard; i < _guards.Count; i++)
        {
            var condition = _guards[i].Condition;
            if (!IsLoopCondition(_guards[i].Syntax) && IsOfOneRow(condition))
            {
                value = value.With(
                    tags: value.Tags.Union(condition.Tags), varies: value.Varies.Union(condition.Varies), indexed: value.Indexed.Union(condition.Indexed),
                    sites: value.Sites.Union(condition.Sites), wins: value.Wins.Union(condition.Wins), models: value.Models.Union(condition.Models));
            }
        }

        return value;
    }

    /// <summary>The condition is about one row at a time: a loop that is running goes through its rows.</summary>
    private bool IsOfOneRow(Value condition)
    {
        // two quantities over the same rows: candidates are compared, whatever list they were taken from
        foreach (int id in condition.Compares)
        {
            var comparison = _facts.Comparisons[id];
            if (Tag.At(comparison.Left.Tags, Level.Aggregate).Overlaps(Tag.At(comparison.Right.Tags, Level.Aggregate)))
                return false;
        }

        foreach (int tag in condition.Tags)
        {
            if (Tag.LevelOf(tag) == Level.Element && IsRunning(Tag.Rows(tag)))
                return true;
        }

        return false;
    }

    private bool IsRunning(int rows)
    {
        foreach (var scope in _loops)
        {
            if (scope.Rows.Contains(rows) || Related(scope.Rows, rows))
                return true;
        }

        return false;
    }

    /// <summary>A count of outcomes depends on what was compared, quantities included: a permutation test counts them.</summary>
    private Value Counted(Value value)
    {
        for (int i = _frame.GuardDepth; i < _guards.Count; i++)
        {
            var condition = _guards[i].Condition;
            bool innermost = i == _guards.Count - 1 && !IsLoopCondition(_guards[i].Syntax) && _guards[i].LoopDepth == _loops.Count;
            if (innermost && !condition.Compares.IsEmpty || !IsLoopCondition(_guards[i].Syntax) && IsOfOneRow(condition))
            {
                value = value.With(
                    tags: value.Tags.Union(condition.Tags), varies: value.Varies.Union(condition.Varies), indexed: value.Indexed.Union(condition.Indexed), sites: value.Sites.Union(condition.Sites));
            }
        }

        return value;
    }

    private Value Compare(IOperation operation, IOperation leftOperation, IOperation rightOperation, Value left, Value right, BinaryOperatorKind kind)
    {
        var result = left.Combine(right);
        LevelTestOf(operation, leftOperation, rightOperation, left, right, kind);
        bool equality = kind is BinaryOperatorKind.Equals or BinaryOperatorKind.NotEquals;
        bool quantities = Tag.Has(left.Tags, Level.Aggregate) || Tag.Has(right.Tags, Level.Aggregate);
        if (!quantities || (equality && !left.Has(Traits.Extreme) && !right.Has(Traits.Extreme)))
            return result.With(traits: Traits.None);
        bool smaller = kind is BinaryOperatorKind.LessThan or BinaryOperatorKind.LessThanOrEqual;
        int id = _facts.Compare(Place(operation.Syntax), _frame, i => new Comparison(
            i, operation, left, right, NameOf(leftOperation), NameOf(rightOperation), smaller, _frame, _loops.Count, equality));
        return result.With(compares: IdSet.Of(id), traits: Traits.None);
    }

    /// <summary>
    /// A value that is set under a comparison of scores and outlives the loop of the candidates won that comparison.
    /// <paramref name="depth"/> is how many loops were running where the target was declared.
    /// </summary>
    private Value Survive(int depth, Value value, SyntaxNode syntax, ISymbol? target)
    {
        for (int i = _guards.Count - 1; i >= 0; i--)
        {
            var guard = _guards[i];
            foreach (int id in guard.Condition.Compares)
            {
                var comparison = _facts.Comparisons[id];
                if (comparison.Equality)
                    continue;
                if (Decide(comparison, depth, value, guard) is { } choice)
                    value = value.Winning(IdSet.Of(choice.Id));
            }
        }

        return value;
    }

    private Choice? Decide(Comparison comparison, int depth, Value value, Guard? guard)
    {
        int loops = Math.Min(comparison.LoopDepth, _loops.Count);
        var running = IdSet.Empty;
        for (int i = Math.Max(0, depth); i < loops; i++)
            running = running.Union(_loops[i].Origins);
        var left = comparison.Left;
        var right = comparison.Right;
        var rows = Tag.At(left.Tags, Level.Aggregate).Intersect(Tag.At(right.Tags, Level.Aggregate));
        if (rows.IsEmpty)
            return null;
        var family = left.Varies.Union(right.Varies).Intersect(running);
        var weak = left.Indexed.Union(right.Indexed).Intersect(running).Except(family);
        var rowFamily = IdSet.Empty;
        foreach (int r in rows)
            rowFamily = rowFamily.Union(_facts.Rows[r].Varies.Intersect(running));
        bool straight = family.IsEmpty && weak.IsEmpty && rowFamily.IsEmpty;
        if (straight)
        {
            if (left.Sites.IsEmpty || right.Sites.IsEmpty || left.Sites.Overlaps(right.Sites) || !IsCandidate(value))
                return null;
        }

        // a loop that reads what another loop stored stands for it: its own variable names the candidate too
        var wide = family;
        for (int i = Math.Max(0, depth); i < loops; i++)
        {
            if (_loops[i].Origins.Overlaps(family))
                wide = wide.Union(_loops[i].Origins);
        }

        bool isScore = IsScoreOf(value, left) || IsScoreOf(value, right);
        if (!straight && !isScore && !value.Varies.Overlaps(wide) && !value.Indexed.Overlaps(wide) && !value.Indexed.Overlaps(weak) && !value.Varies.Overlaps(weak) && !VariesThroughObjects(value, family.Union(rowFamily)))
            return null;
        if (Silent)
            return null;
        var choice = _facts.ChoiceAt(Place(comparison.Operation.Syntax), comparison.Frame, ChoiceKind.Comparison);
        choice.Family = choice.Family.Union(family);
        choice.Weak = choice.Weak.Union(weak);
        choice.RowFamily = choice.RowFamily.Union(rowFamily);
        choice.Rows = choice.Rows.Union(rows);
        choice.Sites = choice.Sites.Union(left.Sites).Union(right.Sites);
        choice.Kept |= !isScore;
        choice.Running = RunningOrigins();
        choice.IsPValue |= left.Has(Traits.PValue) && right.Has(Traits.PValue);
        if (straight)
            choice.StraightCount = Math.Max(choice.StraightCount, StraightCount(left.Wins, choice) + StraightCount(right.Wins, choice));
        // "left < right" with left the new score: lower wins; guards that keep the branch out turn it round
        bool leftKept = IsKept(comparison.Operation, 0, comparison.LoopDepth), rightKept = IsKept(comparison.Operation, 1, comparison.LoopDepth);
        bool leftIsNew = leftKept != rightKept ? rightKept : !left.Varies.IsEmpty && (right.Wins.Contains(choice.Id) || right.Varies.Count <= left.Varies.Count);
        choice.LowerWins = (comparison.LeftSmaller == leftIsNew) != (guard?.Negated ?? false);
        choice.ScoreName ??= (leftIsNew ? comparison.RightName ?? comparison.LeftName : comparison.LeftName ?? comparison.RightName);
        return choice;
    }

    /// <summary>How many straight-line candidates stand behind one side: itself, or those it already beat.</summary>
    private int StraightCount(IdSet wins, Choice except)
    {
        int count = 1;
        foreach (int id in wins)
        {
            if (id != except.Id)
                count = Math.Max(count, _facts.Choices[id].StraightCount);
        }

        return count;
    }

    private static bool IsCandidate(Value value) =>
        !value.Objects.IsEmpty || !value.Tags.IsEmpty || !value.Closures.IsEmpty || value.Fields is not null || value.Has(Traits.Text) || value.Number is null;

    /// <summary>One side of a comparison is a variable that outlives the innermost loop: the best so far.</summary>
    private bool IsKept(IOperation comparison, int side, int loopDepth)
    {
        IOperation? operand = comparison switch
        {
            IBinaryOperation binary => side == 0 ? binary.LeftOperand : binary.RightOperand,
            _ => null,
        };
        while (operand is IConversionOperation or IParenthesizedOperation)
            operand = operand is IConversionOperation conversion ? conversion.Operand : ((IParenthesizedOperation)operand).Operand;
        return operand switch
        {
            ILocalReferenceOperation local => _declaredAt.TryGetValue(local.Local, out int depth) && depth < loopDepth,
            IParameterReferenceOperation parameter => _declaredAt.TryGetValue(parameter.Parameter, out int depth) && depth < loopDepth,
            IFieldReferenceOperation { Instance: ILocalReferenceOperation owner } => _declaredAt.TryGetValue(owner.Local, out int depth) && depth < loopDepth,
            IPropertyReferenceOperation { Instance: ILocalReferenceOperation owner } => _declaredAt.TryGetValue(owner.Local, out int depth) && depth < loopDepth,
            IFieldReferenceOperation or IPropertyReferenceOperation => true,
            _ => false,
        };
    }

    private static bool IsScoreOf(Value value, Value score) =>
        !score.Sites.IsEmpty && value.Fields is null && value.Objects.IsEmpty && value.Sites.Equals(score.Sites) && value.Tags.Equals(score.Tags);

    private bool VariesThroughObjects(Value value, IdSet family)
    {
        if (value.Fields is not null)
        {
            foreach (var field in value.Fields.Values)
            {
                if (field.Varies.Overlaps(family) || VariesThroughObjects(field, family))
                    return true;
            }
        }

        return !value.Objects.IsEmpty && Deep(value, 4).Varies.Overlaps(family);
    }

    /// <summary>`cond ? a : b`, with the choice it makes when the condition compares scores.</summary>
    private Value Conditional(IConditionalOperation conditional)
    {
        var condition = Expression(conditional.Condition);
        Value yes, no;
        using (Guarded(condition, conditional.Condition, negated: false))
            yes = Expression(conditional.WhenTrue);
        using (Guarded(condition, conditional.Condition, negated: true))
            no = conditional.WhenFalse is null ? Value.Empty : Expression(conditional.WhenFalse);
        var joined = yes.Join(no);
        var outcome = ConditionTags(joined, condition);
        foreach (int id in condition.Compares)
        {
            var comparison = _facts.Comparisons[id];
            if (comparison.Equality || (IsPlainText(yes) && IsPlainText(no) && conditional.Parent is not (IVariableInitializerOperation or ISimpleAssignmentOperation or IReturnOperation)))
                continue;
            var probe = joined.Number is null && joined.IsEmpty ? new Value { Traits = Traits.Text } : joined;
            if (Decide(comparison, 0, probe, null) is { } choice)
                outcome = outcome.Winning(IdSet.Of(choice.Id));
        }

        return outcome;
    }

    private static bool IsPlainText(Value value) => value.Has(Traits.Text) && value.Tags.IsEmpty && value.Objects.IsEmpty && value.Varies.IsEmpty;

    private Value ConditionTags(Value value, Value condition) =>
        IsOfOneRow(condition)
            ? value.With(
                tags: value.Tags.Union(condition.Tags), varies: value.Varies.Union(condition.Varies), indexed: value.Indexed.Union(condition.Indexed),
                sites: value.Sites.Union(condition.Sites), wins: value.Wins.Union(condition.Wins))
            : value;

    private Value Extreme(SyntaxNode syntax, Value a, Value b, bool lower)
    {
        var joined = a.Join(b);
        var rows = Tag.At(a.Tags, Level.Aggregate).Intersect(Tag.At(b.Tags, Level.Aggregate));
        if (rows.IsEmpty || Silent)
            return joined;
        var running = RunningOrigins();
        var family = a.Varies.Union(b.Varies).Intersect(running);
        var rowFamily = IdSet.Empty;
        foreach (int r in rows)
            rowFamily = rowFamily.Union(_facts.Rows[r].Varies.Intersect(running));
        if (family.IsEmpty && rowFamily.IsEmpty && (a.Sites.IsEmpty || b.Sites.IsEmpty || a.Sites.Overlaps(b.Sites)))
            return joined;
        var choice = _facts.ChoiceAt(Place(syntax), _frame, ChoiceKind.Extreme);
        choice.Family = choice.Family.Union(family);
        choice.RowFamily = choice.RowFamily.Union(rowFamily);
        choice.Rows = choice.Rows.Union(rows);
        choice.Sites = choice.Sites.Union(joined.Sites);
        choice.LowerWins = lower;
        choice.Running = running;
        if (family.IsEmpty && rowFamily.IsEmpty)
            choice.StraightCount = Math.Max(choice.StraightCount, StraightCount(a.Wins, choice) + StraightCount(b.Wins, choice));
        return joined.Winning(IdSet.Of(choice.Id)).With(traits: joined.Traits | Traits.Extreme);
    }

    /// <summary>A choice made by a call over a sequence: the key of its elements is a score.</summary>
    private Choice? ChoiceByKey(SyntaxNode place, IdSet origins, Value key, ChoiceKind kind, bool lower, string? name)
    {
        var rows = Tag.At(key.Tags, Level.Aggregate);
        if (rows.IsEmpty || Silent)
            return null;
        var family = key.Varies.Intersect(origins);
        var weak = key.Indexed.Intersect(origins).Except(family);
        var rowFamily = IdSet.Empty;
        foreach (int r in rows)
            rowFamily = rowFamily.Union(_facts.Rows[r].Varies.Intersect(origins));
        if (family.IsEmpty && rowFamily.IsEmpty && weak.IsEmpty)
            return null;
        var choice = _facts.ChoiceAt(Place(place), _frame, kind);
        choice.Weak = choice.Weak.Union(weak);
        if (kind == ChoiceKind.Call)
            choice.Kind = kind;
        choice.Family = choice.Family.Union(family);
        choice.RowFamily = choice.RowFamily.Union(rowFamily);
        choice.Rows = choice.Rows.Union(rows);
        choice.Sites = choice.Sites.Union(key.Sites);
        choice.Kept |= kind == ChoiceKind.Call;
        choice.LowerWins = lower;
        choice.IsPValue |= key.Has(Traits.PValue);
        choice.ScoreName ??= name;
        choice.Running = RunningOrigins();
        return choice;
    }

    private static string? NameOf(IOperation operation) => operation switch
    {
        ILocalReferenceOperation local => local.Local.Name,
        IParameterReferenceOperation parameter => parameter.Parameter.Name,
        IFieldReferenceOperation field => field.Field.Name,
        IPropertyReferenceOperation property => property.Property.IsIndexer && property.Instance is not null ? NameOf(property.Instance) : property.Property.Name,
        IConversionOperation conversion => NameOf(conversion.Operand),
        IParenthesizedOperation parenthesised => NameOf(parenthesised.Operand),
        IInvocationOperation invocation => invocation.TargetMethod.Name,
        IAwaitOperation awaited => NameOf(awaited.Operation),
        IArrayElementReferenceOperation element => NameOf(element.ArrayReference),
        IBinaryOperation binary => NameOf(binary.LeftOperand),
        _ => null,
    };

    // ---- p-values and levels

    private void LevelTestOf(IOperation operation, IOperation leftOperation, IOperation rightOperation, Value left, Value right, BinaryOperatorKind kind)
    {
        bool order = kind is BinaryOperatorKind.LessThan or BinaryOperatorKind.LessThanOrEqual or BinaryOperatorKind.GreaterThan or BinaryOperatorKind.GreaterThanOrEqual;
        if (!order || Silent)
            return;
        bool leftIsP = IsP(left, right), rightIsP = IsP(right, left);
        if (leftIsP == rightIsP)
            return;
        var p = leftIsP ? left : right;
        var level = leftIsP ? right : left;
        var levelOperation = leftIsP ? rightOperation : leftOperation;
        if (p.Has(Traits.Corrected) || level.Has(Traits.Corrected) || level.Has(Traits.PValue) || !IsLevel(level))
            return;
        if (!level.Varies.IsEmpty)
            return;
        var family = p.Varies.Union(p.Indexed).Intersect(RunningOrigins());
        foreach (var row in Tag.At(p.Tags, Level.Aggregate).Union(Tag.At(p.Tags, Level.Element)))
            family = family.Union(_facts.Rows[row].Varies.Intersect(RunningOrigins()));
        family = family.Union(p.Over);
        // a rule that a tree applies to itself at every node prunes; it picks no finding out of a family
        if (family.IsEmpty || _frame.Method is not null && Recurses(_frame.Method, 2))
            return;
        if (IsLoopConditionOf(operation, family))
            return;
        bool less = kind is BinaryOperatorKind.LessThan or BinaryOperatorKind.LessThanOrEqual;
        bool significantWhenTrue = less == leftIsP;
        var test = new LevelTest(operation.Syntax, p, level, family, _frame, NameOf(leftIsP ? leftOperation : rightOperation), NameOf(levelOperation), _facts.Order++)
        {
            Conjunction = IsConjunction(operation, significantWhenTrue) || _needsAll > 0,
            Kept = true,
        };
        _facts.Test(test);
    }

    /// <summary>A p-value, or a tail probability held against something as small as a level.</summary>
    private static bool IsP(Value value, Value other) => value.Has(Traits.PValue) || value.Has(Traits.Tail) && other.Number is > 0 and <= 0.1;

    /// <summary>`while (p &gt;= 0.05)`: one test repeated on more rows, not a family.</summary>
    private bool IsLoopConditionOf(IOperation comparison, IdSet family)
    {
        foreach (int id in family)
        {
            var condition = _facts.Origins[id].Syntax switch
            {
                WhileStatementSyntax loop => loop.Condition,
                DoStatementSyntax loop => loop.Condition,
                ForStatementSyntax loop => loop.Condition,
                _ => null,
            };
            if (condition is not null && condition.Span.Contains(comparison.Syntax.Span) && condition.SyntaxTree == comparison.Syntax.SyntaxTree)
                return true;
        }

        return false;
    }

    private static bool IsLevel(Value level) =>
        level.Number is { } number ? number is > 0 and < 0.5 : level.Has(Traits.NamedLevel);

    private int _needsAll;

    /// <summary>Every p must be small, or tests stop at the first that is not: nothing to correct.</summary>
    private static bool IsConjunction(IOperation comparison, bool significantWhenTrue)
    {
        bool sense = significantWhenTrue;
        IOperation child = comparison;
        for (var parent = comparison.Parent; parent is not null; child = parent, parent = parent.Parent)
        {
            switch (parent)
            {
                case IUnaryOperation { OperatorKind: UnaryOperatorKind.Not }:
                    sense = !sense;
                    continue;
                case IParenthesizedOperation or IConversionOperation:
                    continue;
                case IBinaryOperation { OperatorKind: BinaryOperatorKind.ConditionalAnd or BinaryOperatorKind.And }:
                case IBinaryOperation { OperatorKind: BinaryOperatorKind.ConditionalOr or BinaryOperatorKind.Or }:
                    continue;
                case ICompoundAssignmentOperation { OperatorKind: BinaryOperatorKind.And } when sense:
                    return true;
                case ISimpleAssignmentOperation assignment when sense && assignment.Value.DescendantsAndSelf().OfType<IBinaryOperation>().Any(b =>
                    b.OperatorKind is BinaryOperatorKind.ConditionalAnd or BinaryOperatorKind.And
                    && b.DescendantsAndSelf().Any(d => d.Syntax.IsEquivalentTo(assignment.Target.Syntax))):
                    return true;
                case IConditionalOperation conditional when ReferenceEquals(conditional.Condition, child):
                    var insignificant = sense ? conditional.WhenFalse : conditional.WhenTrue;
                    return insignificant is not null && (LeavesForGood(insignificant) || SetsFalse(insignificant));
                case IWhileLoopOperation:
                    return false;
                default:
                    return false;
            }
        }

        return false;
    }

    /// <summary>`if (p &gt;= level) allSmall = false;`</summary>
    private static bool SetsFalse(IOperation branch)
    {
        var only = branch is IBlockOperation { Operations.Length: 1 } block ? block.Operations[0] : branch;
        return only is IExpressionStatementOperation { Operation: ISimpleAssignmentOperation { Value.ConstantValue: { HasValue: true, Value: false } } };
    }
}
