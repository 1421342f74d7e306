using System.Runtime.CompilerServices;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.Analyzers.Flow;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers;

/// <summary>
/// A cheap look at the text before any flow is built: one pass over the characters, comments left out, that asks which of
/// the words occur that every finding needs. The words come from the vocabulary and the catalogue.
/// </summary>
internal sealed class Gate
{
    private const int Split = 1, Load = 2, Sink = 4, P = 8, Level = 16, Pick = 32, Real = 64, Slice = 128, RoleName = 256, Loop = 512, Tail = 1024, Small = 8192, Extreme = 2048, Best = 4096;

    // what a text says hangs on its tree and goes with it; no symbols
    private readonly ConditionalWeakTable<SyntaxTree, StrongBox<bool>> _answers = new();
    private readonly Dictionary<int, int> _words = new();
    private static readonly string[] BestWords = { "best", "top", "lowest", "highest", "least", "winner", "winning", "chosen", "optimal", "kept", "smallest", "largest" };

    private readonly HashSet<int> _roleWords = new();
    private readonly HashSet<int> _bestWords = new();
    private readonly Vocabulary _vocabulary;

    public Gate(Vocabulary vocabulary, Catalogue catalogue)
    {
        _vocabulary = vocabulary;
        foreach (string word in vocabulary.JudgingWords)
            _roleWords.Add(HashOf(word));
        foreach (var entry in catalogue.Entries)
        {
            switch (entry.Effect)
            {
                // names that mean nothing else; `Random` or `split` alone say too little
                case CatalogueEffect.Splits or CatalogueEffect.CrossValidates or CatalogueEffect.Part or CatalogueEffect.Searches:
                    if (SaysSplit(entry.SimpleName))
                        Learn(entry.SimpleName, Split);
                    else if (entry.TypeName is "HoldOut" or "ChooseAndJudge" or "ThreeWay")
                        Learn(entry.TypeName, Split);
                    break;
                case CatalogueEffect.Loads when entry.SimpleName.Length >= 7:
                    Learn(entry.SimpleName, Load);
                    break;
                // `Log` alone is a logarithm in most code
                case CatalogueEffect.Reports when entry.SimpleName.Length > 3:
                    Learn(entry.SimpleName, Sink);
                    break;
                case CatalogueEffect.PValue when entry.SimpleName.Length >= 5:
                    Learn(entry.SimpleName, P);
                    break;
                case CatalogueEffect.Tail:
                    Learn(entry.SimpleName, Tail);
                    break;
            }
        }

        foreach (string word in BestWords)
            _bestWords.Add(HashOf(word));
        foreach (string word in new[] { "Take", "Skip", "GetRange", "AsSpan", "Where", "TakeLast", "SkipLast" })
            Learn(word, Slice);
        foreach (string word in new[] { "MaxBy", "MinBy", "OrderBy", "OrderByDescending", "Sort", "orderby", "PriorityQueue", "SortedDictionary", "SortedList", "SortedSet" })
            Learn(word, Pick);
        foreach (string word in new[] { "Max", "Min", "Aggregate", "Order", "OrderDescending" })
            Learn(word, Extreme);
        foreach (string word in new[] { "double", "float", "decimal", "Double", "Single" })
            Learn(word, Real);
        foreach (string word in new[] { "for", "foreach", "while", "do", "goto", "Select", "Any", "Count", "Where", "Parallel", "ForEach", "First", "FirstOrDefault", "Find", "FindAll", "from" })
            Learn(word, Loop);
        foreach (string word in new[] { "alpha", "significance", "Alpha", "Significance", "_alpha", "_significance", "significanceLevel", "SignificanceLevel" })
            Learn(word, Level);
    }

    public bool MayMatter(SyntaxTree tree, CancellationToken cancellation)
    {
        if (_answers.TryGetValue(tree, out var known))
            return known.Value;
        bool answer = Ask(tree, cancellation);
        return _answers.GetValue(tree, _ => new StrongBox<bool>(answer)).Value;
    }

    private bool Ask(SyntaxTree tree, CancellationToken cancellation)
    {
        int seen = Scan(tree.GetText(cancellation).ToString());
        if ((seen & Split) != 0)
            return true;
        // an `alpha` is a level beside p-values; beside a distribution it may be its parameter
        if (((seen & P) != 0 && (seen & Level) != 0 || (seen & Tail) != 0 && (seen & Small) != 0) && (seen & (Loop | Pick | Extreme)) != 0)
            return true;
        if ((seen & Real) != 0)
        {
            bool picks = (seen & (Pick | Extreme | Best)) != 0;
            if ((seen & Load) != 0 && (seen & (Slice | Sink)) != 0)
                return true;
            if ((seen & Sink) != 0 && picks)
                return true;
        }

        return (seen & RoleName) != 0 && DeclaresRows(tree, cancellation);
    }

    /// <summary>A name that says test or validation stands at a declaration whose type can hold rows.</summary>
    private bool DeclaresRows(SyntaxTree tree, CancellationToken cancellation)
    {
        foreach (var node in tree.GetRoot(cancellation).DescendantNodes())
        {
            bool found = node switch
            {
                ParameterSyntax p => Says(p.Identifier) && MayHoldRows(p.Type),
                VariableDeclaratorSyntax { Parent: VariableDeclarationSyntax declaration } v => Says(v.Identifier) && (declaration.Type.IsVar ? MayBeRows(v.Initializer?.Value) && IsUsedAsRows(v, tree, cancellation) : MayHoldRows(declaration.Type)),
                PropertyDeclarationSyntax p => Says(p.Identifier) && MayHoldRows(p.Type),
                SingleVariableDesignationSyntax d => Says(d.Identifier) && (d.Parent is not DeclarationPatternSyntax pattern || MayHoldRows(pattern.Type)),
                AttributeSyntax a => a.Name.ToString().EndsWith("Rows", StringComparison.Ordinal),
                _ => false,
            };
            if (found)
                return true;
        }

        return false;
    }

    private bool Says(SyntaxToken identifier) => _vocabulary.RoleOf(identifier.ValueText, out _) is Role.Test or Role.Validation;

    private static bool MayHoldRows(TypeSyntax? type) => type switch
    {
        null => true,
        PredefinedTypeSyntax => false,
        GenericNameSyntax { Identifier.ValueText: "Func" or "Action" or "Predicate" or "Expression" or "Comparison" or "Lazy" or "Nullable" } => false,
        NullableTypeSyntax nullable => MayHoldRows(nullable.ElementType),
        IdentifierNameSyntax name => name.IsVar || RowsTypes.SaysRows(name.Identifier.ValueText),
        QualifiedNameSyntax qualified => MayHoldRows(qualified.Right),
        _ => true,
    };

    /// <summary>Members of it are read, it is gone through, or handed to a call that is no function of one number.</summary>
    private static bool IsUsedAsRows(VariableDeclaratorSyntax declarator, SyntaxTree tree, CancellationToken cancellation)
    {
        var scope = declarator.FirstAncestorOrSelf<BaseMethodDeclarationSyntax>() ?? tree.GetRoot(cancellation);
        foreach (var node in scope.DescendantNodes())
        {
            if (node is not IdentifierNameSyntax name || name.Identifier.ValueText != declarator.Identifier.ValueText)
                continue;
            bool used = name.Parent switch
            {
                MemberAccessExpressionSyntax member => member.Expression == name,
                ElementAccessExpressionSyntax element => element.Expression == name,
                CommonForEachStatementSyntax => true,
                ArgumentSyntax { Parent.Parent: InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax { Expression: IdentifierNameSyntax { Identifier.ValueText: "Math" or "MathF" or "Complex" } or PredefinedTypeSyntax } } } => false,
                ArgumentSyntax => true,
                _ => false,
            };
            if (used)
                return true;
        }

        return false;
    }

    /// <summary>What a `var` is set to: numbers, comparisons and single elements are no rows.</summary>
    private static bool MayBeRows(ExpressionSyntax? initial) => initial switch
    {
        null => false,
        LiteralExpressionSyntax or BinaryExpressionSyntax or PrefixUnaryExpressionSyntax or IsPatternExpressionSyntax => false,
        CastExpressionSyntax cast => MayHoldRows(cast.Type),
        ParenthesizedExpressionSyntax parenthesised => MayBeRows(parenthesised.Expression),
        ElementAccessExpressionSyntax element => element.ArgumentList.Arguments.Any(a => a.Expression is RangeExpressionSyntax),
        InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax { Expression: IdentifierNameSyntax { Identifier.ValueText: "Math" or "MathF" or "Complex" or "Convert" } } } => false,
        ObjectCreationExpressionSyntax creation => MayHoldRows(creation.Type),
        _ => true,
    };

    private int Scan(string text)
    {
        int seen = 0;
        int i = 0;
        while (i < text.Length)
        {
            char c = text[i];
            if (c == '/' && i + 1 < text.Length)
            {
                if (text[i + 1] == '/')
                {
                    i = text.IndexOf('\n', i);
                    if (i < 0)
                        break;
                    continue;
                }

                if (text[i + 1] == '*')
                {
                    i = text.IndexOf("*/", i + 2, StringComparison.Ordinal);
                    if (i < 0)
                        break;
                    i += 2;
                    continue;
                }
            }

            if (c == '.' && i + 1 < text.Length && text[i + 1] == '.')
            {
                seen |= Slice;
                i += 2;
                continue;
            }

            if (IsLetter(c))
            {
                i = Word(text, i, ref seen);
                continue;
            }

            if (c == '0' && i + 3 < text.Length && text[i + 1] == '.' && (i == 0 || !IsDigit(text[i - 1])))
            {
                int end = i + 2;
                while (end < text.Length && IsDigit(text[end]))
                    end++;
                if (IsUsualLevel(text, i + 2, end))
                    seen |= Level | Small;
                i = end;
                continue;
            }

            i++;
        }

        return seen;
    }

    private int Word(string text, int i, ref int seen)
    {
        int whole = 17, word = 17;
        char before = '\0';
        int start = i;
        int humps = 0;
        for (; i < text.Length; i++)
        {
            char c = text[i];
            if (!IsLetter(c) && !(c >= '0' && c <= '9'))
                break;
            whole = unchecked((whole * 31) + c);
            bool letter = c != '_' && !(c >= '0' && c <= '9');
            bool hump = letter && c <= 'Z' && c >= 'A' && before >= 'a' && before <= 'z';
            if (!letter || hump)
            {
                seen |= Meaning(word);
                word = 17;
                humps++;
            }

            if (letter)
                word = unchecked((word * 31) + (c | 0x20));
            before = c;
        }

        seen |= Meaning(word);
        if (_words.TryGetValue(whole, out int flags))
        {
            bool member = start > 0 && text[start - 1] == '.';
            // `Normal.CDF(` uses a distribution; `double CDF(` makes one. `Math.Max` picks nothing out of a sequence
            if ((flags & Tail) != 0 && member)
                seen |= Tail;
            flags &= ~Tail;
            if ((flags & Extreme) != 0 && (!member || start >= 5 && (text[start - 2] == 'h' && text[start - 5] == 'M' || text[start - 2] == 'F')))
                flags &= ~Extreme;
            seen |= flags;
        }

        if (i - start >= 4 && (text[i - 1] == 'P' || text[start] is 'p' or 'P' or '_') && Vocabulary.SaysPValue(text.Substring(start, i - start)))
            seen |= P;
        return i;
    }

    private int Meaning(int word) => word == 17 ? 0 : _roleWords.Contains(word) ? RoleName : _bestWords.Contains(word) ? Best : 0;

    private static bool SaysSplit(string name)
    {
        foreach (string word in Vocabulary.Words(name))
        {
            if (word is "split" or "validate" or "validation" or "train" or "test" or "fold" or "folds")
                return name.Length > 7;
        }

        return false;
    }

    private static bool IsUsualLevel(string text, int from, int to) => (to - from) switch
    {
        1 => text[from] == '1',
        2 => text[from] == '0' || text[from] == '1' && text[from + 1] == '0',
        3 => text[from] == '0' && (text[from + 1] == '0' || text[from + 1] == '2' && text[from + 2] == '5'),
        _ => false,
    };

    private static bool IsDigit(char c) => c is >= '0' and <= '9';

    private static bool IsLetter(char c) => c is (>= 'a' and <= 'z') or (>= 'A' and <= 'Z') or '_' or > '\u00bf';

    private void Learn(string word, int flag)
    {
        int hash = 17;
        foreach (char c in word)
            hash = unchecked((hash * 31) + c);
        _words.TryGetValue(hash, out int flags);
        _words[hash] = flags | flag;
    }

    private static int HashOf(string word)
    {
        int hash = 17;
        foreach (char c in word)
            hash = unchecked((hash * 31) + (c | 0x20));
        return hash;
    }
}
