using Microsoft.CodeAnalysis;

namespace Tare.Analyzers.Flow;

/// <summary>What rules read: the facts of one walk with the roles decided.</summary>
internal sealed class Reading
{
    private readonly Roles _roles;

    public Reading(Facts facts, FlowOptions options)
    {
        Facts = facts;
        Options = options;
        _roles = new Roles(facts);
    }

    public Facts Facts { get; }

    public FlowOptions Options { get; }

    public Roles Roles => _roles;

    /// <summary>The rows by which a choice was made, with the role they turned out to have.</summary>
    public ChoiceRows? RowsOf(Choice choice)
    {
        ChoiceRows? best = null;
        foreach (int id in Effective(choice.Rows))
        {
            var rows = Facts.Rows[id];
            var (role, evidence) = _roles.Of(id);
            if (role is Role.Training or Role.None)
                continue;
            var family = FamilyOver(choice, rows);
            if (family.IsEmpty && choice.StraightCount == 0)
                continue;
            if (evidence != Evidence.None && evidence < Options.LeastEvidence)
                continue;
            if (role == Role.Test && evidence != Evidence.Declared && _roles.UntouchedScoredLater(choice, rows))
                role = Role.Validation;
            if (role == Role.Unsplit && _roles.FittedByFamily(choice, rows))
                continue;
            if (role is Role.Test or Role.Unsplit && IsAveragedOver(choice, rows))
                role = Role.Validation;
            if (best is null || Rank(role) > Rank(best.Role))
                best = new ChoiceRows(rows, role, evidence, family);
        }

        return best;
    }

    /// <summary>All rows of the same role that a choice was made by: parallel arrays count each.</summary>
    public IReadOnlyList<RowSet> SameRole(Choice choice, Role role)
    {
        var same = new List<RowSet>();
        foreach (int id in Effective(choice.Rows))
        {
            if (_roles.Of(id).Role == role)
                same.Add(Facts.Rows[id]);
        }

        return same;
    }

    /// <summary>Rows without those of which a part, that stands for them, is there too.</summary>
    public IdSet Effective(IdSet rows) => rows.Where(id =>
    {
        foreach (int other in rows)
        {
            if (other == id)
                continue;
            var part = Facts.Rows[other];
            if (part.PointsInto.Contains(id) && _roles.Of(other).Evidence != Evidence.None)
                return false;
            if ((part.IsWithin(Facts.Rows[id]) || part.PointsInto.Contains(id)) && _roles.Of(other).Evidence >= _roles.Of(id).Evidence && _roles.Of(other).Role != Role.Training)
                return false;
            if (part.IsWithin(Facts.Rows[id]) && _roles.Of(id).Evidence == Evidence.None && _roles.Of(other).Evidence != Evidence.None)
                return false;
        }

        return true;
    });

    public double? SizeOf(Choice choice, IdSet family)
    {
        if (family.IsEmpty)
            return choice.StraightCount;
        return Product(family);
    }

    public double? Product(IdSet family)
    {
        double product = 1;
        foreach (int id in family)
        {
            if (Facts.Origins[id].Size is not { } size)
                return null;
            product *= size;
        }

        return product;
    }

    public string? CountText(IdSet family)
    {
        if (family.IsEmpty)
            return null;
        var parts = new List<string>();
        foreach (int id in family)
        {
            var origin = Facts.Origins[id];
            string? text = origin.CountText ?? origin.Size?.ToString(System.Globalization.CultureInfo.InvariantCulture);
            if (text is null)
                return null;
            parts.Add(text.IndexOfAny(new[] { ' ', '+', '-', '?' }) >= 0 && family.Count > 1 ? "(" + text + ")" : text);
        }

        return string.Join(" * ", parts);
    }

    public string? GridName(IdSet family)
    {
        foreach (int id in family)
        {
            if (Facts.Origins[id].Name is { } name)
                return name;
        }

        return null;
    }

    public SyntaxNode? FamilyPlace(IdSet family)
    {
        SyntaxNode? first = null;
        foreach (int id in family)
        {
            if (Facts.Origins[id].Syntax is { } syntax && (first is null || syntax.SpanStart < first.SpanStart))
                first = syntax;
        }

        return first;
    }

    /// <summary>The name users know rows by.</summary>
    public static string NameOf(RowSet rows)
    {
        foreach (bool telling in new[] { true, false })
        {
            foreach (var name in rows.Names)
            {
                if (!name.IsPath && (name.Role != Role.Unknown) == telling)
                    return name.Name;
            }
        }

        foreach (var name in rows.Names)
            return System.IO.Path.GetFileName(name.Name.Trim());
        return rows.Parent is not null ? NameOf(rows.Parent) : "rows";
    }

    /// <summary>
    /// The place of a finding that helpers made: while the rows came in only through parameters that say nothing of them,
    /// it is the call that brought them.
    /// </summary>
    public SyntaxNode Climb(SyntaxNode place, Frame frame, IEnumerable<RowSet> rows, out SyntaxNode? helper)
    {
        helper = null;
        var ids = IdSet.Of(rows.Select(r => r.Id));
        var at = place;
        for (var f = frame; f is not null;)
        {
            var method = f;
            while (method.IsFunction && method.Parent is not null && !(method.Method?.MethodKind == Microsoft.CodeAnalysis.MethodKind.LocalFunction && Brought(method, ids)))
                method = method.Parent;
            if (method.Parent is null || method.Call is null || !Brought(method, ids))
                break;
            helper ??= place;
            at = CallPlace(method.Call);
            f = method.Parent;
        }

        return at;
    }

    private bool Brought(Frame frame, IdSet rows)
    {
        foreach (int id in rows)
        {
            if (Covers(frame.EvidentRows, id) || !Covers(frame.NeutralRows, id))
                return false;
        }

        return !rows.IsEmpty;
    }

    private bool Covers(IdSet set, int id)
    {
        if (set.Contains(id))
            return true;
        for (var r = Facts.Rows[id].Parent; r is not null; r = r.Parent)
        {
            if (set.Contains(r.Id) && _roles.Of(r.Id).Evidence != Evidence.None)
                return true;
        }

        return false;
    }

    private static SyntaxNode CallPlace(SyntaxNode call) => call switch
    {
        Microsoft.CodeAnalysis.CSharp.Syntax.InvocationExpressionSyntax { Expression: Microsoft.CodeAnalysis.CSharp.Syntax.MemberAccessExpressionSyntax member } => member.Name,
        Microsoft.CodeAnalysis.CSharp.Syntax.InvocationExpressionSyntax { Expression: var expression } => expression,
        _ => call,
    };

    private static int Rank(Role role) => role switch { Role.Test => 3, Role.Validation => 2, Role.Unsplit => 1, _ => 0 };

    /// <summary>The origins of a family that are candidates for these rows, not a way through them.</summary>
    private IdSet FamilyOver(Choice choice, RowSet rows) => (_roles.IsScored(rows) ? choice.Family.Union(choice.Weak) : choice.Family).Where(id =>
    {
        foreach (int r in Facts.Origins[id].Rows)
        {
            if (r == rows.Id || _roles.Related(r, rows.Id) || ParallelTo(r, rows) || _roles.Of(r) is { Role: Role.Training, Evidence: not Evidence.None })
                return false;
        }

        return true;
    });

    /// <summary>Labels beside features: other rows of the same role that the same score read.</summary>
    private bool ParallelTo(int other, RowSet rows)
    {
        var mine = _roles.Of(rows.Id);
        var theirs = _roles.Of(other);
        return mine.Role == theirs.Role && mine.Role is Role.Test or Role.Validation && (theirs.Evidence is Evidence.Named or Evidence.Declared || Facts.Rows[other].Parent is not null && theirs.Evidence != Evidence.None);
    }

    /// <summary>The score is an average over draws of the rows: cross-validation or repeated splits.</summary>
    private bool IsAveragedOver(Choice choice, RowSet rows)
    {
        var left = rows.Varies.Except(choice.Running).Except(choice.Family).Except(choice.RowFamily);
        return !left.IsEmpty;
    }
}

/// <summary>Rows that a choice was made by.</summary>
internal sealed record ChoiceRows(RowSet Rows, Role Role, Evidence Evidence, IdSet Family);

/// <summary>What the project set.</summary>
internal sealed record FlowOptions(Evidence LeastEvidence, double FamilyLevel, bool Sidak)
{
    public static readonly FlowOptions Default = new(Evidence.Named, 0.05, false);
}
