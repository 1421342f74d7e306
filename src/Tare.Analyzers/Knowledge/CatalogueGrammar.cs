namespace Tare.Analyzers.Knowledge;

/// <summary>The words of the catalogue's format: effects, keys, and which keys an effect takes.</summary>
internal static class CatalogueGrammar
{
    private static readonly Form[] _forms =
    [
        new("loads", CatalogueEffect.Loads, [], [CatalogueKey.Path]),
        new("passes", CatalogueEffect.Passes, [CatalogueKey.Rows], []),
        new("transforms", CatalogueEffect.Transforms, [CatalogueKey.Rows], [CatalogueKey.Model]),
        new("shuffles", CatalogueEffect.Shuffles, [CatalogueKey.Rows], [CatalogueKey.Seed]),
        new("splits", CatalogueEffect.Splits, [CatalogueKey.Rows], [CatalogueKey.Seed, CatalogueKey.Group]),
        new("part", CatalogueEffect.Part, [CatalogueKey.Role], []),
        new("crossvalidates", CatalogueEffect.CrossValidates, [CatalogueKey.Rows], [CatalogueKey.Model, CatalogueKey.Group, CatalogueKey.Seed]),
        new("fits", CatalogueEffect.Fits, [CatalogueKey.Rows], [CatalogueKey.Validation, CatalogueKey.Model, CatalogueKey.Seed]),
        new("stops", CatalogueEffect.Stops, [CatalogueKey.Rows], [CatalogueKey.Model]),
        new("scores", CatalogueEffect.Scores, [CatalogueKey.Rows], [CatalogueKey.Model, CatalogueKey.Better]),
        new("metric", CatalogueEffect.Metric, [], [CatalogueKey.Better]),
        new("pvalue", CatalogueEffect.PValue, [], [CatalogueKey.Rows]),
        new("tail", CatalogueEffect.Tail, [], [CatalogueKey.Value]),
        new("reports", CatalogueEffect.Reports, [CatalogueKey.Value], []),
        new("carries", CatalogueEffect.Carries, [], [CatalogueKey.Value]),
        new("corrects", CatalogueEffect.Corrects, [CatalogueKey.Count], [CatalogueKey.Level]),
        new("chooses", CatalogueEffect.Chooses, [CatalogueKey.Objective], [CatalogueKey.Better]),
        new("searches", CatalogueEffect.Searches, [CatalogueKey.Rows], [CatalogueKey.Validation, CatalogueKey.Model, CatalogueKey.Seed]),
        new("nothing", CatalogueEffect.Nothing, [], []),
    ];

    public static string NameOf(CatalogueEffect effect) => _forms[(int)effect].Name;

    public static string NameOf(CatalogueKey key) => key switch
    {
        CatalogueKey.Rows => "rows",
        CatalogueKey.Path => "path",
        CatalogueKey.Model => "model",
        CatalogueKey.Seed => "seed",
        CatalogueKey.Group => "group",
        CatalogueKey.Validation => "validation",
        CatalogueKey.Value => "value",
        CatalogueKey.Count => "count",
        CatalogueKey.Level => "level",
        CatalogueKey.Objective => "objective",
        CatalogueKey.Role => "role",
        _ => "better",
    };

    public static bool TryEffect(string word, out CatalogueEffect effect)
    {
        foreach (var form in _forms)
        {
            if (form.Name == word)
            {
                effect = form.Effect;
                return true;
            }
        }

        effect = default;
        return false;
    }

    public static bool TryKey(string word, out CatalogueKey key)
    {
        for (key = CatalogueKey.Rows; key <= CatalogueKey.Better; key++)
        {
            if (NameOf(key) == word)
                return true;
        }

        key = default;
        return false;
    }

    public static CatalogueKey[] Required(CatalogueEffect effect) => _forms[(int)effect].Required;

    public static bool Takes(CatalogueEffect effect, CatalogueKey key)
    {
        var form = _forms[(int)effect];
        return Array.IndexOf(form.Required, key) >= 0 || Array.IndexOf(form.Optional, key) >= 0;
    }

    /// <summary>The only words a key may have, or null when its values are names of parameters.</summary>
    public static string[]? WordsOf(CatalogueKey key) => key switch
    {
        CatalogueKey.Role => ["training", "validation", "test"],
        CatalogueKey.Better => ["higher", "lower"],
        _ => null,
    };

    private sealed class Form(string name, CatalogueEffect effect, CatalogueKey[] required, CatalogueKey[] optional)
    {
        public string Name { get; } = name;

        public CatalogueEffect Effect { get; } = effect;

        public CatalogueKey[] Required { get; } = required;

        public CatalogueKey[] Optional { get; } = optional;
    }
}
