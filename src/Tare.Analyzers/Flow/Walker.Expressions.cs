using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

internal sealed partial class Walker
{
    private Value Expression(IOperation? operation)
    {
        if (operation is null || !Enter())
            return Value.Empty;
        try
        {
            return Evaluate(operation);
        }
        finally
        {
            Leave();
        }
    }

    private Value Evaluate(IOperation operation)
    {
        if (operation.ConstantValue is { HasValue: true } constant && operation.Kind != OperationKind.SimpleAssignment)
            return Constant(operation, constant.Value);
        switch (operation)
        {
            case ILocalReferenceOperation local:
                return _state.Get(local.Local) ?? Value.Empty;
            case IParameterReferenceOperation parameter:
                return Parameter(parameter);
            case IFieldReferenceOperation field:
                return Field(field);
            case IPropertyReferenceOperation property:
                return Property(property);
            case IInstanceReferenceOperation instance:
                return instance.ReferenceKind == InstanceReferenceKind.ImplicitReceiver && _initialised.Count > 0 ? _initialised.Peek() : _frame.This;
            case IParenthesizedOperation parenthesised:
                return Expression(parenthesised.Operand);
            case IConversionOperation conversion:
                return Converted(conversion);
            case IInvocationOperation invocation:
                return Invoke(invocation);
            case IObjectCreationOperation creation:
                return Create(creation);
            case IBinaryOperation binary:
                return Binary(binary);
            case IUnaryOperation unary:
                return Expression(unary.Operand) is var v && unary.OperatorKind == UnaryOperatorKind.Not ? v.With(traits: v.Traits) : Negated(v, unary);
            case IConditionalOperation conditional:
                return Conditional(conditional);
            case ISimpleAssignmentOperation assignment:
                return SimpleAssign(assignment);
            case ICompoundAssignmentOperation compound:
                return CompoundAssign(compound);
            case IIncrementOrDecrementOperation step:
                var stepped = Counted(Expression(step.Target).Data());
                Assign(step.Target, stepped, step.Syntax, survives: false);
                return stepped;
            case ICoalesceAssignmentOperation coalesce:
                var filled = Expression(coalesce.Target).Join(Expression(coalesce.Value));
                Assign(coalesce.Target, filled, coalesce.Syntax);
                return filled;
            case ICoalesceOperation coalesce:
                return Expression(coalesce.Value).Join(Expression(coalesce.WhenNull));
            case IDeconstructionAssignmentOperation deconstruction:
                var parts = Expression(deconstruction.Value);
                Assign(deconstruction.Target, parts, deconstruction.Syntax);
                return parts;
            case IDeclarationExpressionOperation declaration:
                DeclareIn(declaration.Expression);
                return Value.Empty;
            case ITupleOperation tuple:
                return Tuple(tuple);
            case IAnonymousObjectCreationOperation anonymous:
                return Anonymous(anonymous);
            case IArrayCreationOperation array:
                return CreateArray(array);
            case IArrayElementReferenceOperation element:
                return IndexInto(Expression(element.ArrayReference), element.Indices, element.Syntax, element.Type);
            case IImplicitIndexerReferenceOperation implicitIndexer:
                return ImplicitIndex(implicitIndexer);
            case IConditionalAccessOperation access:
                var receiver = Expression(access.Operation);
                _conditionalReceivers.Push(receiver);
                var accessed = Expression(access.WhenNotNull);
                _conditionalReceivers.Pop();
                return accessed;
            case IConditionalAccessInstanceOperation:
                return _conditionalReceivers.Count > 0 ? _conditionalReceivers.Peek() : Value.Empty;
            case IInterpolatedStringOperation text:
                return Interpolated(text);
            case IAnonymousFunctionOperation function:
                return Function(function.Symbol, function.Body, function.Syntax);
            case IDelegateCreationOperation creation:
                return Expression(creation.Target);
            case IMethodReferenceOperation method:
                return MethodGroup(method);
            case IAwaitOperation awaited:
                return Expression(awaited.Operation);
            case IWithOperation with:
                return With(with);
            case IIsPatternOperation pattern:
                return IsPattern(pattern);
            case ISwitchExpressionOperation choice:
                return SwitchExpression(choice);
            case ITranslatedQueryOperation query:
                return Expression(query.Operation);
            case IObjectOrCollectionInitializerOperation initialiser:
                Initialise(initialiser);
                return Value.Empty;
            case IRangeOperation range:
                return Expression(range.LeftOperand).Combine(Expression(range.RightOperand));
            case IArrayInitializerOperation initialiser:
                return Literal(initialiser.ElementValues, initialiser.Syntax, null);
            case ITypeParameterObjectCreationOperation or IDefaultValueOperation or ITypeOfOperation or INameOfOperation or ILiteralOperation or ISizeOfOperation:
                return Value.Empty;
            case IThrowOperation thrown:
                Expression(thrown.Exception);
                return Value.Empty;
            case IDynamicInvocationOperation or IDynamicMemberReferenceOperation or IInvalidOperation or IDynamicIndexerAccessOperation or IDynamicObjectCreationOperation:
                return Unbound(operation);
            case IBlockOperation or IVariableDeclarationGroupOperation or ILoopOperation or IReturnOperation or IExpressionStatementOperation or ISwitchOperation or ITryOperation or IUsingOperation:
                Dispatch(operation);
                return Value.Empty;
            default:
                return CollectionExpression.IsOne(operation) ? Literal(CollectionExpression.Elements(operation), operation.Syntax, operation.Type) : Children(operation);
        }
    }

    private static Value Negated(Value value, IUnaryOperation unary) =>
        unary.OperatorKind == UnaryOperatorKind.Minus && value.Number is { } number ? new Value { Number = -number } : value;

    private Value Children(IOperation operation)
    {
        var value = Value.Empty;
        foreach (var child in operation.ChildOperations)
            value = value.Combine(Deep(Expression(child)));
        return value;
    }

    private Value Constant(IOperation operation, object? constant)
    {
        if (constant is string text)
            return new Value { Traits = Traits.Text, CountText = null, Number = null, Label = text.Length <= 200 ? text : null };
        if (constant is null || Counting.ToDouble(constant) is not { } number)
            return Value.Empty;
        return new Value { Number = number, Traits = IsDerivedLevel(operation) ? Traits.Corrected : Traits.None };
    }

    /// <summary>A constant that divides a level, as in `const double Level = 0.05 / Tests;`.</summary>
    private bool IsDerivedLevel(IOperation operation)
    {
        switch (operation)
        {
            case IConversionOperation conversion:
                return IsDerivedLevel(conversion.Operand);
            case IParenthesizedOperation parenthesised:
                return IsDerivedLevel(parenthesised.Operand);
            case IBinaryOperation { OperatorKind: BinaryOperatorKind.Divide } division:
                return division.LeftOperand.ConstantValue is { HasValue: true, Value: double and > 0 and < 0.5 }
                    && Counting.ToDouble(division.RightOperand.ConstantValue.Value ?? 0) is >= 2;
            case IFieldReferenceOperation { Field: { IsConst: true } field } when field.DeclaringSyntaxReferences.Length > 0:
                return _bodies.InitialiserOf(field) is { } initial && IsDerivedLevel(initial);
            case ILocalReferenceOperation { Local: { IsConst: true } local } when local.DeclaringSyntaxReferences.Length > 0:
                return _bodies.InitialiserOf(local) is { } value && IsDerivedLevel(value);
            default:
                return false;
        }
    }

    private Value Parameter(IParameterReferenceOperation reference)
    {
        if (_state.Get(reference.Parameter) is { } value)
            return value;
        // a primary-constructor parameter that a member captured
        if (reference.Parameter.ContainingSymbol is IMethodSymbol { MethodKind: MethodKind.Constructor } constructor)
            return ReadMember(_frame.This, PrimaryName(reference.Parameter), reference.Parameter, reference.Parameter.Type);
        return Value.Empty;
    }

    private static string PrimaryName(IParameterSymbol parameter) => "(" + parameter.Name + ")";

    private Value Field(IFieldReferenceOperation reference)
    {
        var field = reference.Field;
        if (field.ContainingType?.TypeKind == TypeKind.Enum)
            return Value.Empty;
        if (field.IsStatic)
            return Static(field, field.Type);
        var instance = Expression(reference.Instance);
        string name = field.CorrespondingTupleField?.Name ?? field.Name;
        if (_catalogue.TryGet(field, out var entry))
            return Known(entry, field, instance, reference.Syntax, field.Type);
        return ReadMember(instance, name, field, field.Type);
    }

    private Value Static(ISymbol member, ITypeSymbol type)
    {
        if (member is IFieldSymbol { HasConstantValue: true } or { DeclaringSyntaxReferences.Length: 0 })
            return Value.Empty;
        if (_statics.TryGetValue(member, out var value))
            return value;
        _statics[member] = Value.Empty;
        if (_bodies.InitialiserOf(member) is { } initial)
        {
            var (frame, loops, guards) = (_frame, _loops.ToArray(), _guards.ToArray());
            _loops.Clear();
            _guards.Clear();
            _frame = new Frame(null, null, null, false);
            value = Expression(initial);
            _frame = frame;
            _loops.AddRange(loops);
            _guards.AddRange(guards);
            value = Named(value, member.Name, member, type, initial.Syntax);
        }
        else
        {
            value = Unseen(member, type, member.DeclaringSyntaxReferences[0].GetSyntax(), Source.Field);
        }

        _statics[member] = _statics[member].Join(value);
        return _statics[member];
    }

    /// <summary>Reads a member of whatever objects a value may be.</summary>
    private Value ReadMember(Value instance, string name, ISymbol member, ITypeSymbol type)
    {
        if (instance.Fields is not null && instance.Fields.TryGetValue(name, out var held))
            return NamedTraits(held.Winning(instance.Wins).Varying(instance.Varies).Tagged(instance.Tags.Where(t => Tag.LevelOf(t) == Level.Aggregate)), member.Name, type);
        var result = Value.Empty;
        bool found = false;
        foreach (int id in instance.Objects)
        {
            var o = _facts.Objects[id];
            if (o.Field(name) is { } stored)
            {
                result = found ? result.Join(stored) : stored;
                found = true;
            }
            else if (!o.Content.IsEmpty)
            {
                result = found ? result.Join(o.Content) : o.Content;
                found = true;
            }
        }

        if (!found && member.DeclaringSyntaxReferences.Length > 0 && instance.Objects.Count <= 1 && !IsCaptured(member))
        {
            // never set where we can see: the caller, a deserialiser or a framework sets it
            if (RowsTypes.IsRowsLike(type) && instance.Objects.Count == 1 && instance.Tags.IsEmpty)
            {
                var o = _facts.Objects[instance.Objects.First()];
                var unseen = Unseen(member, type, member.DeclaringSyntaxReferences[0].GetSyntax(), Source.Field);
                o.Store(name, unseen);
                result = unseen;
            }
        }

        if (Tag.Has(instance.Tags, Level.Aggregate) && Tag.Has(result.Tags, Level.Element))
        {
            // a row picked by looking at all of them: what it holds depends on all
            var over = WithAncestors(Tag.At(instance.Tags, Level.Aggregate).Except(Tag.At(instance.Tags, Level.Element)));
            result = result.With(tags: Tag.Move(result.Tags, Level.Element, Level.Aggregate, over.Contains));
        }

        if (!instance.Tags.IsEmpty || !instance.Varies.IsEmpty || !instance.Wins.IsEmpty || !instance.Indexed.IsEmpty)
        {
            result = result.Tagged(instance.Tags).Varying(instance.Varies).Winning(instance.Wins);
            if (!instance.Sites.IsEmpty)
                result = result.With(sites: result.Sites.Union(instance.Sites));
            if (!instance.Indexed.IsEmpty)
                result = result.With(indexed: result.Indexed.Union(instance.Indexed));
        }

        return NamedTraits(Stored(result), member.Name, type);
    }

    private static bool IsCaptured(ISymbol member) => member is IPropertySymbol { IsIndexer: true };

    /// <summary>A number that is called a p-value is one, unless its making was seen to be something else.</summary>
    private static Value NamedTraits(Value value, string name, ITypeSymbol? type)
    {
        if (!RowsTypes.IsReal(type) || value.Has(Traits.PValue))
            return value;
        if (Vocabulary.SaysPValue(name) && value.Number is null)
            return value.With(traits: value.Traits | Traits.PValue);
        if (value.Has(Traits.Tail) && name is "p" or "P" or "pv" or "pVal" or "prob")
            return value.With(traits: value.Traits | Traits.PValue);
        if (value.IsEmpty && Vocabulary.SaysLevel(name))
            return new Value { Traits = Traits.NamedLevel };
        return value;
    }

    private Value Property(IPropertyReferenceOperation reference)
    {
        var property = reference.Property;
        if (property.IsStatic)
        {
            if (_catalogue.TryGet(property, out var known))
                return Known(known, property, Value.Empty, reference.Syntax, property.Type);
            if (property.GetMethod is { } getter && _bodies.Of(getter) is not null)
                return Call(getter, Value.Empty, ImmutableArray<Value>.Empty, reference.Syntax);
            return Static(property, property.Type);
        }

        var instance = Expression(reference.Instance);
        if (property.IsIndexer)
            return Indexer(reference, instance);
        if (Sequence(property, instance, reference.Syntax) is { } sequence)
            return sequence;
        if (_catalogue.TryGet(property, out var entry))
            return Known(entry, property, instance, reference.Syntax, property.Type);
        if (property.ContainingType is { IsAnonymousType: true } or { IsTupleType: true })
            return ReadMember(instance, property.Name, property, property.Type);
        if (property.Name == "Result" && RowsTypes.IsTask(property.ContainingType, out _))
            return instance;
        if (property.Name == "Value" && property.ContainingType?.OriginalDefinition.SpecialType == SpecialType.System_Nullable_T)
            return instance;
        if (ImplementationsOf(property.GetMethod, instance) is { Count: > 0 } getters)
        {
            var result = Value.Empty;
            foreach (var getter in getters)
                result = result.Join(Call(getter, instance, ImmutableArray<Value>.Empty, reference.Syntax));
            return NamedTraits(result.Varying(instance.Varies).Winning(instance.Wins), property.Name, property.Type);
        }

        return ReadMember(instance, property.Name, property, property.Type) is var read
            && read.IsEmpty && property.DeclaringSyntaxReferences.Length == 0 ? NamedTraits(Opaque(instance, property.Type, reference.Syntax), property.Name, property.Type) : read;
    }

    /// <summary>A member of an object whose source is not here: it depends on all that the object holds.</summary>
    private Value Opaque(Value instance, ITypeSymbol type, SyntaxNode syntax)
    {
        if (instance.Objects.IsEmpty && instance.Fields is null)
            return instance.Data();
        return Typed(Deep(instance), type, syntax, instance);
    }

    private Value Converted(IConversionOperation conversion)
    {
        var value = Expression(conversion.Operand);
        if (conversion.OperatorMethod is { } method && _bodies.Of(method) is not null)
            return Call(method, Value.Empty, ImmutableArray.Create(value), conversion.Syntax);
        return value;
    }

    private Value Binary(IBinaryOperation binary)
    {
        var left = Expression(binary.LeftOperand);
        if (binary.OperatorKind is BinaryOperatorKind.ConditionalAnd or BinaryOperatorKind.ConditionalOr)
        {
            Value other;
            using (Guarded(left, binary.LeftOperand, negated: binary.OperatorKind == BinaryOperatorKind.ConditionalOr))
                other = Expression(binary.RightOperand);
            var both = left.Combine(other);
            return both.With(compares: left.Compares.Union(other.Compares));
        }

        var right = Expression(binary.RightOperand);
        if (binary.OperatorMethod is { } method && _bodies.Of(method) is not null)
            return Call(method, Value.Empty, ImmutableArray.Create(left, right), binary.Syntax);
        Meets(left, right);
        switch (binary.OperatorKind)
        {
            case BinaryOperatorKind.LessThan or BinaryOperatorKind.LessThanOrEqual or BinaryOperatorKind.GreaterThan or BinaryOperatorKind.GreaterThanOrEqual
                or BinaryOperatorKind.Equals or BinaryOperatorKind.NotEquals:
                return Compare(binary, binary.LeftOperand, binary.RightOperand, left, right, binary.OperatorKind);
            case BinaryOperatorKind.And or BinaryOperatorKind.Or when !left.Compares.IsEmpty || !right.Compares.IsEmpty:
                return left.Combine(right).With(compares: left.Compares.Union(right.Compares));
        }

        if (left.Number is { } a && right.Number is { } b && Counting.Apply(binary.OperatorKind, a, b) is { } number)
        {
            bool divided = binary.OperatorKind == BinaryOperatorKind.Divide && IsLevel(left) && !IsHalf(right) && b >= 2;
            return new Value { Number = number, Traits = ((left.Traits | right.Traits) & Traits.Corrected) | (divided ? Traits.Corrected : Traits.None) };
        }

        return Arithmetic(binary, left, right);
    }

    private Value Arithmetic(IBinaryOperation binary, Value left, Value right)
    {
        if (!RowsTypes.IsScalar(binary.Type))
        {
            left = Deep(left);
            right = Deep(right);
            Meets(left, right);
            return Typed(left.Combine(right), binary.Type, binary.Syntax, Value.Empty);
        }

        var value = left.Combine(right);
        if (binary.Type?.SpecialType == SpecialType.System_String && (left.Label ?? right.Label) is { } label)
            return value.Labelled(left.Label is not null && right.Label is not null ? left.Label + right.Label : label);
        // a level divided by a count, or a power of it, is corrected
        if (binary.OperatorKind == BinaryOperatorKind.Divide && (IsLevel(left) || left.Has(Traits.NamedLevel)) && !IsHalf(right))
            return value.With(traits: (value.Traits | Traits.Corrected) & ~Traits.PValue);
        if (value.Has(Traits.PValue) && binary.OperatorKind is BinaryOperatorKind.Multiply && !IsSmallNumber(left) && !IsSmallNumber(right) && left.Has(Traits.PValue) != right.Has(Traits.PValue)
            && (left.Has(Traits.PValue) ? right : left) is { Tags.IsEmpty: true } factor && (factor.Number is > 2 || factor.CountText is not null || factor.IsEmpty))
            return value.With(traits: value.Traits | Traits.Corrected);
        if (value.Has(Traits.Tail) && binary.OperatorKind is BinaryOperatorKind.Multiply or BinaryOperatorKind.Subtract)
            return value.With(traits: value.Traits);
        if (value.Has(Traits.PValue) && binary.OperatorKind is BinaryOperatorKind.Divide)
            return value.With(traits: value.Traits & ~Traits.PValue);
        return value;
    }

    /// <summary>A bare 2 halves a level for two sides; a count that happens to be 2 corrects it.</summary>
    private static bool IsHalf(Value value) => value is { Number: 1 or 2, CountText: null };

    private static bool IsSmallNumber(Value value) => value.Number is <= 2;

    private Value SimpleAssign(ISimpleAssignmentOperation assignment)
    {
        var value = Expression(assignment.Value);
        return Assign(assignment.Target, value, assignment.Syntax);
    }

    private Value CompoundAssign(ICompoundAssignmentOperation compound)
    {
        var old = Expression(compound.Target);
        var by = Expression(compound.Value);
        if (compound.OperatorMethod is { } method && _bodies.Of(method) is not null)
            return Assign(compound.Target, Call(method, Value.Empty, ImmutableArray.Create(old, by), compound.Syntax), compound.Syntax);
        Meets(old, by);
        var value = RowsTypes.IsScalar(compound.Type) ? old.Combine(by) : Typed(Deep(old).Combine(Deep(by)), compound.Type, compound.Syntax, Value.Empty);
        if (compound.OperatorKind == BinaryOperatorKind.Divide && (IsLevel(old) || old.Has(Traits.NamedLevel)) && !IsHalf(by))
            value = value.With(traits: value.Traits | Traits.Corrected);
        return Assign(compound.Target, by.Number is not null ? Counted(value) : value, compound.Syntax, survives: false);
    }

    private Value Tuple(ITupleOperation tuple)
    {
        var fields = ImmutableDictionary.CreateBuilder<string, Value>(StringComparer.Ordinal);
        for (int i = 0; i < tuple.Elements.Length; i++)
            fields["Item" + (i + 1)] = Expression(tuple.Elements[i]);
        return new Value { Fields = fields.ToImmutable() };
    }

    private Value Anonymous(IAnonymousObjectCreationOperation anonymous)
    {
        var fields = ImmutableDictionary.CreateBuilder<string, Value>(StringComparer.Ordinal);
        foreach (var initialiser in anonymous.Initializers)
        {
            if (initialiser is ISimpleAssignmentOperation { Target: IPropertyReferenceOperation property } assignment)
                fields[property.Property.Name] = Expression(assignment.Value);
        }

        return new Value { Fields = fields.ToImmutable() };
    }

    private Value Interpolated(IInterpolatedStringOperation text)
    {
        var value = Value.Empty;
        foreach (var part in text.Parts)
        {
            if (part is IInterpolationOperation hole)
                value = value.Combine(TextOf(Expression(hole.Expression), hole.Expression.Type, hole.Syntax));
        }

        string label = string.Join(" ", text.Parts.Select(PartLabel).Where(l => l is not null));
        var made = value.With(traits: value.Traits | Traits.Text);
        return label.Length is > 0 and <= 200 ? made.Labelled(label) : made;
    }

    private string? PartLabel(IInterpolatedStringContentOperation part) => part switch
    {
        IInterpolatedStringTextOperation plain => plain.Text.ConstantValue.Value as string,
        IInterpolationOperation { Expression: ILocalReferenceOperation local } => _state.Get(local.Local)?.Label,
        IInterpolationOperation { Expression: IParameterReferenceOperation parameter } => _state.Get(parameter.Parameter)?.Label,
        _ => null,
    };

    /// <summary>What a reader sees of a value: its `ToString`, or for records all they hold.</summary>
    private Value TextOf(Value value, ITypeSymbol? type, SyntaxNode syntax)
    {
        if (RowsTypes.IsScalar(type) || value.Objects.IsEmpty)
            return Deep(value);
        if (type is INamedTypeSymbol { DeclaringSyntaxReferences.Length: > 0 } named)
        {
            for (var t = named; t is not null && t.DeclaringSyntaxReferences.Length > 0; t = t.BaseType)
            {
                foreach (var member in t.GetMembers("ToString"))
                {
                    if (member is IMethodSymbol { Parameters.Length: 0, IsStatic: false } method && _bodies.Of(method) is not null)
                        return Call(method, value, ImmutableArray<Value>.Empty, syntax).Winning(value.Wins).Varying(value.Varies);
                }
            }

            return named.IsRecord ? Deep(value) : Value.Empty;
        }

        return Deep(value);
    }

    private Value With(IWithOperation with)
    {
        var original = Expression(with.Operand);
        var o = _facts.ObjectAt(with.Syntax, _frame.Chain, with.Type, _loops.Count);
        foreach (int id in original.Objects)
        {
            if (_facts.Objects[id].Fields is { } fields)
            {
                foreach (var pair in fields.ToArray())
                    o.Store(pair.Key, pair.Value.Varying(original.Varies).Winning(original.Wins));
            }
        }

        var value = new Value { Objects = IdSet.Of(o.Id), Tags = original.Tags, Varies = original.Varies };
        if (with.Initializer is not null)
        {
            _initialised.Push(value);
            Initialise(with.Initializer);
            _initialised.Pop();
        }

        return value;
    }

    private Value IsPattern(IIsPatternOperation pattern)
    {
        var value = Expression(pattern.Value);
        return Pattern(pattern.Pattern, value, pattern.Value, pattern);
    }

    private Value Pattern(IPatternOperation pattern, Value value, IOperation subject, IOperation whole)
    {
        switch (pattern)
        {
            case IRelationalPatternOperation relational:
                var bound = Expression(relational.Value);
                return Compare(whole, subject, relational.Value, value, bound, relational.OperatorKind);
            case INegatedPatternOperation negated:
                return Pattern(negated.Pattern, value, subject, whole);
            case IBinaryPatternOperation both:
                var left = Pattern(both.LeftPattern, value, subject, whole);
                var right = Pattern(both.RightPattern, value, subject, whole);
                return left.Combine(right).With(compares: left.Compares.Union(right.Compares));
            case IDeclarationPatternOperation { DeclaredSymbol: ILocalSymbol local }:
                Declare(local);
                _state.Set(local, value);
                return value.Data();
            case IRecursivePatternOperation recursive:
                if (recursive.DeclaredSymbol is ILocalSymbol named)
                {
                    Declare(named);
                    _state.Set(named, value);
                }

                var result = value.Data();
                foreach (var sub in recursive.PropertySubpatterns)
                {
                    if (sub.Member is IMemberReferenceOperation member)
                        result = result.Join(Pattern(sub.Pattern, ReadMember(value, member.Member.Name, member.Member, member.Type!), sub.Member, whole));
                }

                int ordinal = 0;
                foreach (var sub in recursive.DeconstructionSubpatterns)
                {
                    ordinal++;
                    var part = value.Fields is not null && value.Fields.TryGetValue("Item" + ordinal, out var item) ? item : value;
                    result = result.Join(Pattern(sub, part, subject, whole));
                }

                return result;
            default:
                foreach (var part in pattern.Descendants())
                {
                    if (part is IDeclarationPatternOperation { DeclaredSymbol: ILocalSymbol inner })
                    {
                        Declare(inner);
                        _state.Set(inner, RowsTypes.IsCollection(subject.Type) && !value.Objects.IsEmpty ? ElementOf(value, subject.Syntax) : value.With(closures: IdSet.Empty));
                    }
                }

                return value.With(closures: IdSet.Empty);
        }
    }

    private Value SwitchExpression(ISwitchExpressionOperation choice)
    {
        var subject = Expression(choice.Value);
        var result = Value.Empty;
        bool first = true;
        foreach (var arm in choice.Arms)
        {
            var condition = Pattern(arm.Pattern, subject, choice.Value, arm.Pattern);
            if (arm.Guard is not null)
                condition = condition.Combine(Expression(arm.Guard)) is var c ? c : condition;
            Value value;
            using (Guarded(condition.Combine(Deep(subject)), choice.Value, negated: false))
                value = Expression(arm.Value);
            value = ConditionTags(value, Deep(subject));
            result = first ? value : result.Join(value);
            first = false;
        }

        foreach (int id in subject.Compares)
        {
            if (!_facts.Comparisons[id].Equality && Decide(_facts.Comparisons[id], 0, result, null) is { } made)
                result = result.Winning(IdSet.Of(made.Id));
        }

        return result;
    }

    private Value Unbound(IOperation operation)
    {
        var value = Value.Empty;
        foreach (var child in operation.ChildOperations)
            value = value.Combine(Deep(Expression(child)));
        return Typed(value, operation.Type, operation.Syntax, Value.Empty);
    }
}
