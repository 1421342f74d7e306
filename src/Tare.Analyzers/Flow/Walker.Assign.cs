using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Flow;

/// <summary>Where values are put.</summary>
internal sealed partial class Walker
{
    private Value Assign(IOperation target, Value value, SyntaxNode syntax, bool survives = true)
    {
        switch (target)
        {
            case ILocalReferenceOperation local:
                if (local.IsDeclaration)
                    Declare(local.Local);
                return Put(local.Local, local.Local.Type, value, syntax, survives);
            case IParameterReferenceOperation parameter:
                return Put(parameter.Parameter, parameter.Parameter.Type, value, syntax, survives);
            case IFieldReferenceOperation field:
                if (field.Field.IsStatic)
                {
                    value = Settle(0, value, syntax, field.Field, survives);
                    value = Named(value, field.Field.Name, field.Field, field.Field.Type, syntax);
                    Static(field.Field, field.Field.Type);
                    StoreStatic(field.Field, value);
                    return value;
                }

                return StoreMember(Expression(field.Instance), field.Field.CorrespondingTupleField?.Name ?? field.Field.Name, field.Field, field.Field.Type, value, syntax, survives);
            case IPropertyReferenceOperation property:
                return StoreProperty(property, value, syntax, survives);
            case IArrayElementReferenceOperation element:
                return StoreElement(Expression(element.ArrayReference), element.Indices, value, syntax, survives);
            case IImplicitIndexerReferenceOperation indexer:
                return StoreElement(Expression(indexer.Instance), new[] { indexer.Argument }, value, syntax, survives);
            case IDeclarationExpressionOperation declaration:
                DeclareIn(declaration.Expression);
                return Assign(declaration.Expression, value, syntax, survives);
            case ITupleOperation tuple:
                Deconstruct(tuple, value, syntax, survives);
                return value;
            case IConversionOperation conversion:
                return Assign(conversion.Operand, value, syntax, survives);
            case IVariableDeclaratorOperation declarator:
                Declare(declarator.Symbol);
                return Put(declarator.Symbol, declarator.Symbol.Type, value, syntax, survives);
            case IConditionalAccessOperation access:
                var receiver = Expression(access.Operation);
                _conditionalReceivers.Push(receiver);
                Assign(access.WhenNotNull, value, syntax, survives);
                _conditionalReceivers.Pop();
                return value;
            default:
                return value;
        }
    }

    private void DeclareIn(IOperation operation)
    {
        switch (operation)
        {
            case ILocalReferenceOperation local:
                Declare(local.Local);
                break;
            case ITupleOperation tuple:
                foreach (var element in tuple.Elements)
                    DeclareIn(element);
                break;
            case IDeclarationExpressionOperation declaration:
                DeclareIn(declaration.Expression);
                break;
        }
    }

    private Value Put(ISymbol symbol, ITypeSymbol type, Value value, SyntaxNode syntax, bool survives)
    {
        int depth = _declaredAt.TryGetValue(symbol, out int declared) ? declared : _frame.LoopDepth;
        value = Settle(depth, value, syntax, symbol, survives);
        Bind(symbol, type, value, syntax);
        return value;
    }

    private Value Settle(int depth, Value value, SyntaxNode syntax, ISymbol? target, bool survives)
    {
        if (survives && _guards.Count > 0)
            value = Survive(depth, value, syntax, target);
        return Implied(value, _frame.GuardDepth);
    }

    private void Bind(ISymbol symbol, ITypeSymbol type, Value value, SyntaxNode syntax)
    {
        value = Named(value, symbol.Name, symbol, type, syntax);
        _state.Set(symbol, value);
    }

    private void StoreStatic(ISymbol member, Value value)
    {
        var old = _statics.TryGetValue(member, out var known) ? known : Value.Empty;
        var joined = old.Join(value);
        if (!joined.Same(old))
            Changed();
        _statics[member] = joined;
    }

    private Value StoreMember(Value instance, string name, ISymbol member, ITypeSymbol type, Value value, SyntaxNode syntax, bool survives)
    {
        int depth = int.MaxValue;
        foreach (int id in instance.Objects)
            depth = Math.Min(depth, _facts.Objects[id].Depth);
        if (depth == int.MaxValue)
            depth = 0;
        value = Settle(depth, value, syntax, member, survives);
        value = Named(value, member.Name, member, type, syntax);
        var stored = value.Varying(instance.Varies.Intersect(RunningOrigins()));
        Hold(value);
        foreach (int id in instance.Objects)
        {
            var o = _facts.Objects[id];
            if (o.Store(name, stored))
                Changed();
            Written(o, name);
        }

        return value;
    }

    private void Written(HeapObject o, string member)
    {
        for (int i = Math.Max(0, o.Depth); i < _loops.Count; i++)
            _loops[i].Written.Add((o, member));
    }

    private Value StoreProperty(IPropertyReferenceOperation reference, Value value, SyntaxNode syntax, bool survives)
    {
        var property = reference.Property;
        if (property.IsStatic)
        {
            Static(property, property.Type);
            value = Settle(0, value, syntax, property, survives);
            StoreStatic(property, value);
            return value;
        }

        var instance = Expression(reference.Instance);
        if (property.IsIndexer)
            return StoreElement(instance, reference.Arguments.Select(a => a.Value).ToArray(), value, syntax, survives);
        if (property.SetMethod is { } setter && _bodies.Of(setter) is not null)
        {
            Call(setter, instance, System.Collections.Immutable.ImmutableArray.Create(value), syntax);
            return value;
        }

        value = StoreMember(instance, property.Name, property, property.Type, value, syntax, survives);
        if (property.DeclaringSyntaxReferences.Length == 0)
        {
            // a setting of a library object acts through the object as a whole
            foreach (int id in instance.Objects)
                Absorb(_facts.Objects[id], value);
        }

        return value;
    }

    /// <summary>Objects that something else now holds.</summary>
    private void Hold(Value value)
    {
        foreach (int id in value.Objects)
            _facts.Objects[id].Escaped = true;
        if (value.Fields is not null)
        {
            foreach (var field in value.Fields.Values)
                Hold(field);
        }
    }

    private void Absorb(HeapObject o, Value value)
    {
        Hold(value);
        var joined = o.Content.Join(Deep(value));
        if (!joined.Same(o.Content))
        {
            o.Content = joined;
            Changed();
        }

        Written(o, Contents);
    }

    private void Deconstruct(ITupleOperation target, Value value, SyntaxNode syntax, bool survives)
    {
        for (int i = 0; i < target.Elements.Length; i++)
            Assign(target.Elements[i], PartOf(value, i, target.Elements.Length), syntax, survives);
    }

    /// <summary>One part of a value taken apart: a tuple's item, a pair's key or value, a record's positional member.</summary>
    private Value PartOf(Value value, int index, int count)
    {
        Value? part = null;
        if (value.Fields is { } fields)
        {
            if (fields.TryGetValue("Item" + (index + 1), out var item))
                part = item;
            else if (count == 2 && fields.TryGetValue(index == 0 ? "Key" : "Value", out var pair))
                part = pair;
        }

        foreach (int id in value.Objects)
        {
            var o = _facts.Objects[id];
            if (o.Type is not INamedTypeSymbol type)
                continue;
            string? name = PositionalMember(type, index, count);
            if (name is not null && o.Field(name) is { } stored)
                part = part is null ? stored : part.Join(stored);
        }

        if (part is null)
            return value.With(closures: IdSet.Empty);
        return part.Tagged(value.Tags).Varying(value.Varies).Winning(value.Wins);
    }

    private static string? PositionalMember(INamedTypeSymbol type, int index, int count)
    {
        foreach (var member in type.GetMembers("Deconstruct"))
        {
            if (member is not IMethodSymbol method || method.Parameters.Length != count)
                continue;
            string name = method.Parameters[index].Name;
            foreach (var candidate in type.GetMembers())
            {
                if (candidate is IPropertySymbol or IFieldSymbol { AssociatedSymbol: null } && string.Equals(candidate.Name, name, StringComparison.OrdinalIgnoreCase))
                    return candidate.Name;
            }
        }

        return null;
    }

    private void Initialise(IObjectOrCollectionInitializerOperation initialiser)
    {
        foreach (var part in initialiser.Initializers)
        {
            switch (part)
            {
                case ISimpleAssignmentOperation assignment:
                    var value = Expression(assignment.Value);
                    if (assignment.Target is IPropertyReferenceOperation { Property.IsIndexer: true } indexer)
                        StoreElement(_initialised.Peek(), indexer.Arguments.Select(a => a.Value).ToArray(), value, assignment.Syntax, false);
                    else
                        Assign(assignment.Target, value, assignment.Syntax, survives: false);
                    break;
                case IMemberInitializerOperation member:
                    _initialised.Push(Expression(member.InitializedMember));
                    Initialise(member.Initializer);
                    _initialised.Pop();
                    break;
                default:
                    Expression(part);
                    break;
            }
        }
    }
}
