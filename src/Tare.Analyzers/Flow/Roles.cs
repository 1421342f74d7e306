namespace Tare.Analyzers.Flow;

/// <summary>
/// Decides, after the walk, what each set of rows is for: declarations first, then what split it came from and what was
/// fitted on and scored with it, names only where nothing else is known.
/// </summary>
internal sealed class Roles
{
    private readonly Facts _facts;
    private readonly Dictionary<int, (Role Role, Evidence Evidence)> _decided = new();
    private readonly HashSet<int> _deciding = new();
    private readonly Dictionary<int, HashSet<int>> _fittedFor = new();
    private readonly Dictionary<int, HashSet<int>> _scoredBy = new();
    private readonly IdSet _chosenOn;

    public Roles(Facts facts)
    {
        _facts = facts;
        foreach (var meeting in facts.Meetings)
        {
            if (Related(meeting.Fitted, meeting.Scored))
                continue;
            Into(_fittedFor, meeting.Fitted).Add(meeting.Scored);
            Into(_scoredBy, meeting.Scored).Add(meeting.Fitted);
        }

        foreach (var choice in facts.Choices)
            _chosenOn = _chosenOn.Union(choice.Rows);
    }

    public RowSet Rows(int id) => _facts.Rows[id];

    /// <summary>One is a part of the other, or its indices.</summary>
    public bool Related(int a, int b)
    {
        var x = _facts.Rows[a];
        var y = _facts.Rows[b];
        return x.IsWithin(y) || y.IsWithin(x) || x.PointsInto.Contains(b) || y.PointsInto.Contains(a);
    }

    public (Role Role, Evidence Evidence) Of(int id)
    {
        if (_decided.TryGetValue(id, out var known))
            return known;
        if (!_deciding.Add(id))
            return (Role.Unknown, Evidence.None);
        var decided = Decide(_facts.Rows[id]);
        _deciding.Remove(id);
        _decided[id] = decided;
        return decided;
    }

    /// <summary>Some model learned from other rows was applied to these.</summary>
    public bool IsScored(RowSet rows) => Any(_scoredBy, rows);

    public bool IsFitted(RowSet rows) => Any(_fittedFor, rows);

    /// <summary>Rows that no choice used are scored after the choice: then the rows that chose were validation rows.</summary>
    public bool UntouchedScoredLater(Choice choice, RowSet rows)
    {
        foreach (var birth in _facts.Births)
        {
            if (birth.Order > choice.Order && IsUntouched(birth.Rows, choice, rows))
                return true;
        }

        foreach (var meeting in _facts.Meetings)
        {
            if (meeting.Order > choice.Order && IsUntouched(meeting.Scored, choice, rows) && !Related(meeting.Fitted, meeting.Scored))
                return true;
        }

        return false;
    }

    /// <summary>The winner of a choice was scored on rows that had no part in it.</summary>
    public bool WinnerScoredElsewhere(Choice choice)
    {
        foreach (var birth in _facts.Births)
        {
            if (birth.Wins.Contains(choice.Id) && IsElsewhere(birth.Rows, choice))
                return true;
        }

        foreach (var meeting in _facts.Meetings)
        {
            if (meeting.Wins.Contains(choice.Id) && IsElsewhere(meeting.Scored, choice))
                return true;
        }

        return false;
    }

    /// <summary>A model that differs with the family learned from these very rows.</summary>
    public bool FittedByFamily(Choice choice, RowSet rows)
    {
        foreach (var meeting in _facts.Meetings)
        {
            if (meeting.Stored && _facts.Rows[meeting.Fitted].Root == rows.Root && _facts.Rows[meeting.Scored].Root == rows.Root
                && (meeting.Fitted == meeting.Scored || Related(meeting.Fitted, meeting.Scored)) && Related(meeting.Scored, rows.Id))
                return true;
        }

        return false;
    }

    private bool IsElsewhere(int rows, Choice choice)
    {
        foreach (int r in choice.Rows)
        {
            if (r == rows || Related(r, rows))
                return false;
        }

        return Of(rows).Role is Role.Test or Role.Unsplit or Role.Unknown or Role.Validation && !IsFitted(_facts.Rows[rows]);
    }

    private bool IsUntouched(int candidate, Choice choice, RowSet rows)
    {
        if (_chosenOn.Contains(candidate) || Related(candidate, rows.Id))
            return false;
        foreach (int r in choice.Rows)
        {
            if (Related(candidate, r))
                return false;
        }

        var (role, evidence) = Of(candidate);
        if (role != Role.Test || IsFitted(_facts.Rows[candidate]))
            return false;
        return evidence != Evidence.None || _facts.Rows[candidate].Parent == rows.Parent;
    }

    private (Role Role, Evidence Evidence) Decide(RowSet rows)
    {
        if (rows.DeclaredRole != Role.Unknown)
            return (rows.DeclaredRole, Evidence.Declared);
        var parent = rows.Parent is null ? (Role: Role.Unknown, Evidence: Evidence.None) : Of(rows.Parent.Id);
        switch (rows.KnownRole)
        {
            case Role.Training:
                return (Role.Training, Evidence.Known);
            case Role.Validation:
                return (Role.Validation, Evidence.Known);
            case Role.Test:
                return (parent.Role is Role.Training or Role.Validation ? Role.Validation : Role.Test, Evidence.Known);
        }

        var named = ByName(rows);
        if (named != Role.Unknown)
        {
            if (named == Role.Test && parent.Role is Role.Training or Role.Validation && parent.Evidence != Evidence.None)
                return (Role.Validation, Evidence.Known);
            return (named, Evidence.Named);
        }

        bool fitted = IsFitted(rows), scored = IsScored(rows);
        if (parent.Evidence != Evidence.None)
        {
            if (parent.Role == Role.Training)
                return (scored && !fitted ? Role.Validation : Role.Training, parent.Evidence);
            if (parent.Role is Role.Test or Role.Validation or Role.None)
                return (fitted && !scored ? Role.Training : parent.Role, parent.Evidence);
        }

        if (fitted && (!scored || FittedMore(rows)) && !(rows.Parent is null && HasParts(rows)))
            return (Role.Training, Evidence.Known);
        if (rows.Source == Source.Part && IsRealPart(rows) && (scored || SiblingFitted(rows)))
            return (Role.Test, Evidence.Known);
        if (scored && rows.Source == Source.Loaded && !HasParts(rows) && ScoredByTraining(rows))
            return (Role.Test, Evidence.Known);
        if (rows.Parent is not null)
            return parent.Role is Role.Unknown ? parent : (parent.Role, Evidence.None);
        // rows that a caller hands over without a word: unsplit as far as this code shows
        return (Role.Unsplit, Evidence.None);
    }

    private bool FittedMore(RowSet rows) =>
        _fittedFor.TryGetValue(rows.Id, out var f) && _scoredBy.TryGetValue(rows.Id, out var s) && f.Count > s.Count;

    private Role ByName(RowSet rows)
    {
        foreach (bool paths in new[] { false, true })
        {
            foreach (var name in rows.Names)
            {
                if (name.Role == Role.Unknown || name.IsPath != paths)
                    continue;
                // a path speaks of a role only in a flow that also fits or predicts
                if (name.IsPath && !IsScored(rows) && !IsFitted(rows))
                    continue;
                if (name.IsEval)
                    return HasOtherTestRows(rows) ? Role.Validation : Role.Test;
                return name.Role;
            }
        }

        return Role.Unknown;
    }

    private bool HasOtherTestRows(RowSet rows)
    {
        foreach (var other in _facts.Rows)
        {
            if (other != rows && !Related(other.Id, rows.Id) && (other.DeclaredRole == Role.Test || other.Names.Any(n => n.Role == Role.Test && !n.IsEval)))
                return true;
        }

        return false;
    }

    /// <summary>A part that was cut for a purpose: it has a name, or the rest of the rows is used too.</summary>
    private bool IsRealPart(RowSet rows)
    {
        if (rows.Cut == Cut.Half || rows.Names.Any(n => n.Role != Role.Unknown))
            return true;
        foreach (var other in _facts.Rows)
        {
            if (other != rows && other.Parent == rows.Parent && other.Source == Source.Part && other.Key != rows.Key
                && (rows.Cut != Cut.Filter || other.Key == rows.OtherKey || rows.Key == other.OtherKey || other.Key!.StartsWith("if@", StringComparison.Ordinal)))
                return true;
        }

        return false;
    }

    /// <summary>It was cut into parts, or others hold indices into it: then those have the roles.</summary>
    private bool HasParts(RowSet rows)
    {
        foreach (var other in _facts.Rows)
        {
            if (other.PointsInto.Contains(rows.Id) || other.Parent == rows && other.Source == Source.Part && other.Cut != Cut.Filter)
                return true;
        }

        return false;
    }

    private bool SiblingFitted(RowSet rows)
    {
        foreach (var other in _facts.Rows)
        {
            if (other != rows && other.Parent == rows.Parent && other.Source == Source.Part && IsFitted(other))
                return true;
        }

        return false;
    }

    private bool ScoredByTraining(RowSet rows)
    {
        if (!_scoredBy.TryGetValue(rows.Id, out var fitted))
            return false;
        foreach (int f in fitted)
        {
            if (Of(f) is { Role: Role.Training, Evidence: Evidence.Declared or Evidence.Named })
                return true;
        }

        return false;
    }

    private bool Any(Dictionary<int, HashSet<int>> map, RowSet rows)
    {
        if (map.ContainsKey(rows.Id))
            return true;
        foreach (int id in map.Keys)
        {
            var other = _facts.Rows[id];
            if (other != rows && other.IsWithin(rows) && map[id].Any(o => !Related(o, rows.Id)) && !HasRealSibling(other, rows))
                return true;
        }

        return false;
    }

    /// <summary>Between a part and the rows asked about there is a cut that separates roles.</summary>
    private bool HasRealSibling(RowSet part, RowSet rows)
    {
        for (var r = part; r is not null && r != rows; r = r.Parent)
        {
            if (r.Source == Source.Part && IsRealPart(r))
                return true;
        }

        return false;
    }

    private static HashSet<int> Into(Dictionary<int, HashSet<int>> map, int key)
    {
        if (!map.TryGetValue(key, out var set))
            map[key] = set = new HashSet<int>();
        return set;
    }
}
