using Microsoft.CodeAnalysis;

namespace Tare.CodeFixes.Claims;

/// <summary>What the parameters of followed methods and lambdas stand for: an operation, or an element of one.</summary>
internal sealed class Bindings
{
    private readonly Dictionary<ISymbol, (IOperation Value, Bindings Of, bool Element)> _values = new(SymbolEqualityComparer.Default);
    private readonly Bindings? _outer;

    public Bindings(Bindings? outer = null)
    {
        _outer = outer;
    }

    public void Bind(IParameterSymbol parameter, IOperation value, Bindings of, bool element = false) => _values[parameter] = (value, of, element);

    public bool TryGet(ISymbol parameter, out IOperation value, out Bindings of, out bool element)
    {
        for (var at = this; at is not null; at = at._outer)
        {
            if (at._values.TryGetValue(parameter, out var bound))
            {
                (value, of, element) = bound;
                return true;
            }
        }

        (value, of, element) = (null!, this, false);
        return false;
    }
}
