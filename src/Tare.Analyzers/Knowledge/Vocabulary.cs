using Tare.Analyzers.Flow;

namespace Tare.Analyzers.Knowledge;

/// <summary>Splits identifiers into words and says what the words mean.</summary>
internal sealed class Vocabulary
{
    private static readonly string[] TrainingWords = { "train", "training", "trn", "fit", "fitting", "learn", "learning", "insample", "tr" };
    private static readonly string[] ValidationWords = { "valid", "validation", "val", "dev", "develop", "development", "tune", "tuning", "vld", "va" };
    private static readonly string[] TestWords = { "test", "testing", "tst", "holdout", "heldout", "held", "unseen", "oos", "outofsample", "te", "hold" };
    private static readonly string[] EvalWords = { "eval", "evaluation", "evaluate" };

    /// <summary>Words that take the role away from a name beside them: a test's score, a test run, fit quality.</summary>
    private static readonly string[] NotRows =
    {
        "score", "scores", "accuracy", "accuracies", "loss", "losses", "error", "errors", "rmse", "mae", "mse", "auc", "f1", "metric", "metrics",
        "result", "results", "outcome", "outcomes", "prediction", "predictions", "predicted", "preds", "pred", "case", "cases", "name", "names",
        "context", "host", "runner", "statistic", "statistics", "pvalue", "pvalues", "path", "file", "size", "count", "ratio", "fraction", "share",
    };

    public static readonly Vocabulary Default = new(Array.Empty<string>(), Array.Empty<string>(), Array.Empty<string>());

    private readonly HashSet<string> _training;
    private readonly HashSet<string> _validation;
    private readonly HashSet<string> _test;

    public Vocabulary(IEnumerable<string> test, IEnumerable<string> validation, IEnumerable<string> training)
    {
        _training = new HashSet<string>(TrainingWords.Concat(training.Select(w => w.ToLowerInvariant())), StringComparer.Ordinal);
        _validation = new HashSet<string>(ValidationWords.Concat(validation.Select(w => w.ToLowerInvariant())), StringComparer.Ordinal);
        _test = new HashSet<string>(TestWords.Concat(test.Select(w => w.ToLowerInvariant())), StringComparer.Ordinal);
    }

    /// <summary>Words of rows that choose or judge: without one, or a split, nothing is chosen on test rows.</summary>
    public IEnumerable<string> JudgingWords => _validation.Concat(_test).Concat(EvalWords).Concat(new[] { "sample" });

    public IEnumerable<string> RoleWords => _training.Concat(_validation).Concat(_test).Concat(EvalWords);

    /// <summary>The role that an identifier's words say, if they say one.</summary>
    public Role RoleOf(string identifier, out bool isEval)
    {
        isEval = false;
        var role = Role.Unknown;
        var words = Words(identifier);
        for (int i = 0; i < words.Count; i++)
        {
            string word = words[i];
            if (i + 1 < words.Count)
            {
                string two = word + words[i + 1];
                if (two is "heldout" or "holdout")
                    return Role.Test;
                if (two == "insample")
                    return Role.Training;
                if (two == "outof" && i + 2 < words.Count && words[i + 2] == "sample")
                    return Role.Test;
            }

            if (i > 0 && Array.IndexOf(NotRows, word) >= 0)
                return Role.Unknown;
            // "stdDev", "maxVal", a lone "val": no rows
            if (word is "dev" && i > 0 && words[i - 1] is "std" or "standard" or "mean" or "abs" or "sd")
                continue;
            if (word is "val" or "va" or "te" or "tr" && (words.Count == 1 || i > 0 && words[i - 1] is "max" or "min" or "old" or "new" or "init" or "cur" or "key" or "ret" or "tmp" or "temp"))
                continue;
            if (_validation.Contains(word))
                role = Role.Validation;
            else if (_test.Contains(word))
                role = role == Role.Unknown ? Role.Test : role;
            else if (_training.Contains(word))
                role = role == Role.Unknown ? Role.Training : role;
            else if (Array.IndexOf(EvalWords, word) >= 0)
                isEval = true;
        }

        if (role == Role.Unknown && isEval)
            return Role.Test;
        isEval = false;
        return role;
    }

    /// <summary>The role that a path or a loader's argument says: its last words count.</summary>
    public Role RoleOfText(string text, out bool isEval)
    {
        isEval = false;
        if (text.Length > 200)
            return Role.Unknown;
        var found = Role.Unknown;
        foreach (string piece in text.Split('/', '\\', '.', ' ', ':', ';', '?', '=', '&'))
        {
            // "te" and "tr" are too short to mean a role in a path
            if (piece.Length <= 2)
                continue;
            var role = RoleOf(piece, out bool eval);
            if (role != Role.Unknown)
            {
                found = role;
                isEval = eval;
            }
        }

        return found;
    }

    public static bool SaysPValue(string identifier)
    {
        var words = Words(identifier);
        for (int i = 0; i < words.Count; i++)
        {
            if (words[i] is "pvalue" or "pvalues" or "pval" or "pvals")
                return true;
            if (words[i] == "p" && i + 1 < words.Count && words[i + 1] is "value" or "values" or "val" or "vals")
                return i + 1 < words.Count && words[i] == "p";
            // "PermutationP", "NonInferiorityP"
            if (words[i] == "p" && i > 0 && i == words.Count - 1 && words.Count >= 2 && words[0].Length > 3)
                return true;
        }

        return words.Count > 0 && words[words.Count - 1] is "significance" && words.Count > 1;
    }

    public static bool SaysLevel(string identifier)
    {
        foreach (string word in Words(identifier))
        {
            if (word is "alpha" or "level" or "significance" or "sig")
                return true;
        }

        return false;
    }

    public static bool SaysLearn(string identifier)
    {
        var words = Words(identifier);
        return words.Count > 0 && words[0] is "fit" or "train" or "learn" or "update" or "step" or "epoch" or "boost" or "grow" or "add" or "partial" or "optimize" or "optimise" or "refit" or "retrain";
    }

    /// <summary>Things to choose among, not rows.</summary>
    public static bool SaysCandidate(string identifier)
    {
        foreach (string word in Words(identifier))
        {
            if (word is "setting" or "settings" or "config" or "configs" or "configuration" or "configurations" or "option" or "options" or "candidate" or "candidates"
                or "parameter" or "parameters" or "grid" or "prompt" or "prompts" or "model" or "models" or "variant" or "variants" or "trainer" or "trainers" or "hyper")
                return true;
        }

        return false;
    }

    public static bool SaysSeed(string identifier)
    {
        foreach (string word in Words(identifier))
        {
            if (word is "seed" or "seeds" or "restart" or "restarts")
                return true;
        }

        return false;
    }

    /// <summary>Camel humps, digits and underscores part words; all words come out in lower case.</summary>
    public static List<string> Words(string identifier)
    {
        var words = new List<string>(4);
        int start = -1;
        for (int i = 0; i <= identifier.Length; i++)
        {
            char c = i < identifier.Length ? identifier[i] : '_';
            bool letter = char.IsLetter(c);
            if (start >= 0)
            {
                bool hump = letter && char.IsUpper(c)
                    && (char.IsLower(identifier[i - 1]) || (i + 1 < identifier.Length && char.IsLower(identifier[i + 1])));
                if (!letter || hump)
                {
                    words.Add(identifier.Substring(start, i - start).ToLowerInvariant());
                    start = -1;
                }
            }

            if (letter && start < 0)
                start = i;
        }

        return words;
    }
}
