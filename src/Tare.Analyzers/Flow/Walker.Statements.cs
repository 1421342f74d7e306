using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;

namespace Tare.Analyzers.Flow;

internal sealed partial class Walker
{
    private void Statement(IOperation? operation)
    {
        if (operation is null || !Enter())
            return;
        try
        {
            Dispatch(operation);
        }
        finally
        {
            Leave();
        }
    }

    private void Dispatch(IOperation operation)
    {
        switch (operation)
        {
            case IBlockOperation block:
                Block(block.Operations);
                break;
            case IExpressionStatementOperation statement:
                Expression(statement.Operation);
                break;
            case IVariableDeclarationGroupOperation group:
                Declarations(group);
                break;
            case IConditionalOperation conditional:
                If(conditional);
                break;
            case IForEachLoopOperation loop:
                ForEach(loop);
                break;
            case IForLoopOperation loop:
                For(loop);
                break;
            case IWhileLoopOperation loop:
                While(loop);
                break;
            case IReturnOperation { Kind: OperationKind.YieldReturn } yield:
                Yield(yield);
                break;
            case IReturnOperation { Kind: OperationKind.Return } returned:
                Return(returned);
                break;
            case ISwitchOperation choice:
                Switch(choice);
                break;
            case ITryOperation attempt:
                Statement(attempt.Body);
                foreach (var handler in attempt.Catches)
                {
                    var layer = new State(_state);
                    _state = layer;
                    Statement(handler.Handler);
                    _state = layer.Under!;
                    _state.Merge(layer);
                }

                Statement(attempt.Finally);
                break;
            case IUsingOperation use:
                Statement(use.Resources);
                Statement(use.Body);
                break;
            case IUsingDeclarationOperation use:
                Statement(use.DeclarationGroup);
                break;
            case ILockOperation locked:
                Expression(locked.LockedValue);
                Statement(locked.Body);
                break;
            case ILabeledOperation labelled:
                Statement(labelled.Operation);
                break;
            case ILocalFunctionOperation or IEmptyOperation or IBranchOperation or IEndOperation or IStopOperation:
                break;
            case IThrowOperation thrown:
                Expression(thrown.Exception);
                break;
            default:
                Expression(operation);
                break;
        }
    }

    private void Block(IReadOnlyList<IOperation> operations)
    {
        var held = new List<IDisposable>();
        foreach (var operation in operations)
        {
            Statement(operation);
            // a branch that leaves makes the rest of the block the other branch
            if (operation is IConditionalOperation { WhenTrue: var yes, WhenFalse: var no } conditional)
            {
                bool leaves = Leaves(yes), otherLeaves = no is not null && Leaves(no);
                if (leaves != otherLeaves && _lastConditions.TryGetValue(conditional, out var condition))
                    held.Add(Guarded(condition, conditional.Condition, negated: leaves, otherExits: true));
            }
        }

        for (int i = held.Count - 1; i >= 0; i--)
            held[i].Dispose();
    }

    private readonly Dictionary<IOperation, Value> _lastConditions = new();

    private void If(IConditionalOperation conditional)
    {
        var condition = Expression(conditional.Condition);
        _lastConditions[conditional] = condition;
        bool trueLeaves = Leaves(conditional.WhenTrue), falseLeaves = conditional.WhenFalse is not null && Leaves(conditional.WhenFalse);
        var yes = Branch(conditional.WhenTrue, condition, conditional.Condition, negated: false, falseLeaves);
        var no = Branch(conditional.WhenFalse, condition, conditional.Condition, negated: true, trueLeaves);
        _state.MergeEither(yes, no);
    }

    private State Branch(IOperation? body, Value condition, IOperation test, bool negated, bool otherExits)
    {
        var layer = new State(_state);
        if (body is null)
            return layer;
        _state = layer;
        using (Guarded(condition, test, negated, otherExits))
            Statement(body);
        _state = layer.Under!;
        return layer;
    }

    private static bool Leaves(IOperation? operation) => operation switch
    {
        IBlockOperation block => block.Operations.Length > 0 && Leaves(block.Operations[block.Operations.Length - 1]),
        IBranchOperation => true,
        IReturnOperation { Kind: OperationKind.Return or OperationKind.YieldBreak } => true,
        IThrowOperation => true,
        IExpressionStatementOperation { Operation: IThrowOperation } => true,
        IConditionalOperation conditional => conditional.WhenFalse is not null && Leaves(conditional.WhenTrue) && Leaves(conditional.WhenFalse),
        _ => false,
    };

    /// <summary>The branch leaves the loop or the method for good, rather than going on with the next round.</summary>
    private static bool LeavesForGood(IOperation? operation) => operation switch
    {
        IBlockOperation block => block.Operations.Length > 0 && LeavesForGood(block.Operations[block.Operations.Length - 1]),
        IBranchOperation branch => branch.BranchKind != BranchKind.Continue,
        IReturnOperation { Kind: OperationKind.Return or OperationKind.YieldBreak } => true,
        IThrowOperation => true,
        IExpressionStatementOperation { Operation: IThrowOperation } => true,
        _ => false,
    };

    private void Declarations(IVariableDeclarationGroupOperation group)
    {
        foreach (var declaration in group.Declarations)
        {
            foreach (var declarator in declaration.Declarators)
            {
                Declare(declarator.Symbol);
                var initial = declarator.Initializer ?? declaration.Initializer;
                if (initial is null)
                    continue;
                var value = Expression(initial.Value);
                Bind(declarator.Symbol, declarator.Symbol.Type, value, declarator.Syntax);
            }
        }
    }

    private void Return(IReturnOperation returned)
    {
        if (returned.ReturnedValue is null)
            return;
        var value = Expression(returned.ReturnedValue);
        value = Survive(_frame.LoopDepth, value, returned.Syntax, null);
        value = Implied(value, _frame.GuardDepth);
        _frame.Return = _frame.Return is null ? value : _frame.Return.Join(value);
    }

    private void Yield(IReturnOperation yield)
    {
        if (yield.ReturnedValue is null)
            return;
        var value = Implied(Expression(yield.ReturnedValue), _frame.GuardDepth);
        var o = _frame.Yields ??= NewCollection(_frame.Method?.DeclaringSyntaxReferences.FirstOrDefault()?.GetSyntax() ?? yield.Syntax, null, slot: 7);
        o.Depth = _frame.LoopDepth;
        Add(o, value, yield.Syntax);
    }

    private void Switch(ISwitchOperation choice)
    {
        var subject = Expression(choice.Value);
        var merged = new State(_state);
        foreach (var section in choice.Cases)
        {
            var layer = new State(_state);
            _state = layer;
            using (Guarded(Deep(subject), choice.Value, negated: false))
            {
                foreach (var statement in section.Body)
                    Statement(statement);
            }

            _state = layer.Under!;
            merged.Merge(layer);
        }

        _state.Merge(merged);
    }
}
