using System.Globalization;
using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>A diagnostic by what labels speak of.</summary>
/// <param name="Line">Line on which it starts, counted from 1.</param>
internal sealed record Finding(string Rule, string File, int Line, string Message)
{
    public static Finding Of(Diagnostic diagnostic)
    {
        var place = diagnostic.Location.GetLineSpan();
        return new Finding(
            diagnostic.Id,
            Path.GetFileName(place.Path),
            place.StartLinePosition.Line + 1,
            diagnostic.GetMessage(CultureInfo.InvariantCulture));
    }
}
