using System.Text;

namespace Tare.CodeFixes.Rows;

/// <summary>Reads the role out of a name, and makes the names of other rows from it.</summary>
internal static class RowsName
{
    private static readonly HashSet<string> Training = new(StringComparer.OrdinalIgnoreCase)
        { "train", "training", "trn", "fit", "fitting", "learn", "learning", "tr" };

    private static readonly HashSet<string> Validation = new(StringComparer.OrdinalIgnoreCase)
        { "valid", "validation", "val", "dev", "develop", "development", "tune", "tuning", "vld", "va" };

    private static readonly HashSet<string> Test = new(StringComparer.OrdinalIgnoreCase)
        { "test", "testing", "tst", "holdout", "heldout", "held", "hold", "unseen", "oos", "te" };

    public static RowsRole RoleOf(string name)
    {
        var role = RowsRole.None;
        foreach (string word in Words(name))
        {
            if (Validation.Contains(word))
                return RowsRole.Validation;
            if (Test.Contains(word) && role == RowsRole.None)
                role = RowsRole.Test;
            else if (Training.Contains(word) && role == RowsRole.None)
                role = RowsRole.Training;
        }

        return role;
    }

    /// <summary>The name without the words that say a role, in lower case: what parallel rows of two roles share.</summary>
    public static string Stem(string name) =>
        string.Concat(Words(name).Where(w => !IsRoleWord(w) && !w.Equals("set", StringComparison.OrdinalIgnoreCase) && !w.Equals("rows", StringComparison.OrdinalIgnoreCase) && !w.Equals("data", StringComparison.OrdinalIgnoreCase)))
            .ToLowerInvariant();

    /// <summary>The name with its role word replaced, as a local's name: <c>xTrain</c> gives <c>xFit</c>.</summary>
    public static string With(string name, string roleWord)
    {
        // TrainSet and TestSet of a split are named by their role alone.
        var words = Words(name).Where(w => w is not ("Set" or "set")).ToList();
        var result = new StringBuilder();
        bool placed = false;
        if (!words.Any(IsRoleWord))
            words.Insert(0, "train");
        foreach (string word in words)
        {
            bool isRole = IsRoleWord(word);
            if (isRole && placed)
                continue;
            placed |= isRole;
            string next = isRole ? roleWord : word;
            result.Append(result.Length == 0 ? Lower(next) : Upper(next));
        }

        return result.ToString();
    }

    public static string Upper(string word) => word.Length == 0 ? word : char.ToUpperInvariant(word[0]) + word.Substring(1);

    public static string Lower(string word) => word.Length == 0 ? word : char.ToLowerInvariant(word[0]) + word.Substring(1);

    public static List<string> Words(string name)
    {
        var words = new List<string>();
        var word = new StringBuilder();
        for (int i = 0; i < name.Length; i++)
        {
            char c = name[i];
            bool starts = char.IsUpper(c) && i > 0 && (!char.IsUpper(name[i - 1]) || (i + 1 < name.Length && char.IsLower(name[i + 1])));
            if ((!char.IsLetterOrDigit(c) || starts) && word.Length > 0)
            {
                words.Add(word.ToString());
                word.Clear();
            }

            if (char.IsLetterOrDigit(c))
                word.Append(c);
        }

        if (word.Length > 0)
            words.Add(word.ToString());
        return words;
    }

    private static bool IsRoleWord(string word) => Training.Contains(word) || Validation.Contains(word) || Test.Contains(word);
}
