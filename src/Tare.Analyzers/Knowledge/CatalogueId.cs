namespace Tare.Analyzers.Knowledge;

/// <summary>
/// Takes a documentation-comment id apart. The format is that of the C# standard's annex on documentation comments:
/// a letter for the kind, the full name with dots, type parameters as <c>`n</c> and <c>``n</c>, parameters in parentheses.
/// </summary>
internal static class CatalogueId
{
    public const string AllOverloads = "(*)";

    /// <summary>The names in <paramref name="id"/>, or the reason why there are none.</summary>
    public static string? Parse(string id, out string bareId, out string typeName, out string memberName, out bool allOverloads)
    {
        typeName = memberName = string.Empty;
        bareId = id;
        allOverloads = id.EndsWith(AllOverloads, StringComparison.Ordinal);
        if (allOverloads)
            bareId = id.Substring(0, id.Length - AllOverloads.Length);

        if (bareId.Length < 2 || bareId[1] != ':' || "MPFT".IndexOf(bareId[0]) < 0)
            return "The id must begin with 'M:', 'P:', 'F:' or 'T:'.";
        var kind = bareId[0];
        if (allOverloads && (kind is 'F' or 'T'))
            return "Only methods, constructors and indexers have overloads, so only they can end in '(*)'.";

        var open = bareId.IndexOf('(');
        if (open >= 0 && kind is not ('M' or 'P'))
            return "Only methods, constructors and indexers have parameters.";
        if (open >= 0 && allOverloads)
            return "Give either the parameters or '(*)', not both.";
        if (open >= 0 && ParametersReason(bareId, open) is { } reason)
            return reason;

        var name = open < 0 ? bareId.Substring(2) : bareId.Substring(2, open - 2);
        var parts = name.Split('.');
        foreach (var part in parts)
        {
            if (!IsName(part))
                return $"'{name}' is not a full name with dots.";
        }

        if (kind == 'T')
        {
            typeName = parts[parts.Length - 1];
            return typeName.Contains("``") || typeName[0] == '#' ? $"'{name}' is not the name of a type." : null;
        }

        if (parts.Length < 2)
            return "A member's id must name the type that the member belongs to.";
        typeName = parts[parts.Length - 2];
        memberName = parts[parts.Length - 1];
        var arity = memberName.IndexOf('`');
        if (arity >= 0 && (kind != 'M' || !memberName.Substring(arity).StartsWith("``", StringComparison.Ordinal)))
            return "Only a method has type parameters of its own, and their number stands after '``'.";
        if (arity >= 0 && allOverloads)
            return "Leave out the number of type parameters: '(*)' stands for every overload.";
        if (arity >= 0)
            memberName = memberName.Substring(0, arity);
        if (memberName[0] == '#')
            memberName = "." + memberName.Substring(1);
        return memberName[0] == '.' && (kind != 'M' || memberName is not (".ctor" or ".cctor"))
            ? $"'{name}' is not the name of a member."
            : null;
    }

    private static string? ParametersReason(string id, int open)
    {
        // A conversion operator has its result after the parameters: op_Explicit(A)~B.
        var depth = 0;
        for (var i = open; i < id.Length; i++)
        {
            switch (id[i])
            {
                case '(' or '{' or '[':
                    depth++;
                    break;
                case ')' or '}' or ']':
                    depth--;
                    break;
            }

            if (depth == 0 && i < id.Length - 1 && id[i + 1] != '~' && id.IndexOf('~', open) is var tilde && (tilde < 0 || tilde > i))
                return "Something stands behind the parameters.";
            if (depth < 0)
                return "The brackets of the parameters do not match.";
        }

        if (depth != 0)
            return "The brackets of the parameters do not match.";
        return id.EndsWith("()", StringComparison.Ordinal) ? "A member without parameters is written without parentheses." : null;
    }

    private static bool IsName(string part)
    {
        if (part.Length == 0)
            return false;
        var first = part[0];
        if (!(char.IsLetter(first) || first == '_' || first == '#'))
            return false;
        var ticks = part.IndexOf('`');
        var end = ticks < 0 ? part.Length : ticks;
        for (var i = 1; i < end; i++)
        {
            if (!(char.IsLetterOrDigit(part[i]) || part[i] == '_'))
                return false;
        }

        if (ticks < 0)
            return end > 1 || first != '#';
        while (ticks < part.Length && part[ticks] == '`')
            ticks++;
        if (ticks == part.Length)
            return false;
        for (; ticks < part.Length; ticks++)
        {
            if (part[ticks] is < '0' or > '9')
                return false;
        }

        return true;
    }
}
