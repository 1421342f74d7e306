using System.Collections.Immutable;
using Microsoft.CodeAnalysis.Text;

namespace Tare.Analyzers.Knowledge;

/// <summary>
/// Reads a catalogue: <c>documentation-comment id = effect key:value,value …</c>, one member a line. A <c>#</c> at the
/// start of a line or after a blank begins a comment. A line that is not understood gives one error and no entry.
/// </summary>
internal static class CatalogueReader
{
    public static CatalogueText Read(SourceText text)
    {
        var entries = ImmutableArray.CreateBuilder<CatalogueEntry>();
        var errors = ImmutableArray.CreateBuilder<CatalogueError>();
        var lines = new Dictionary<string, int>(StringComparer.Ordinal);
        foreach (var line in text.Lines)
        {
            var content = WithoutComment(line.ToString());
            if (content.Length == 0)
                continue;
            var reader = new Line(content, line.Start, line.LineNumber);
            var entry = reader.Read();
            if (entry is not null)
            {
                var key = entry.Id + (entry.AllOverloads ? CatalogueId.AllOverloads : string.Empty);
                if (lines.TryGetValue(key, out var earlier))
                {
                    reader.Fail(reader.IdStart, reader.IdLength, $"'{key}' already stands in line {earlier + 1}.");
                }
                else
                {
                    lines.Add(key, line.LineNumber);
                    entries.Add(entry);
                }
            }

            if (reader.Error is not null)
                errors.Add(reader.Error);
        }

        return new CatalogueText(entries.ToImmutable(), errors.ToImmutable());
    }

    private static string WithoutComment(string line)
    {
        // "#ctor" is part of an id, so a comment needs a blank (or nothing) before it.
        for (var i = 0; i < line.Length; i++)
        {
            if (line[i] == '#' && (i == 0 || char.IsWhiteSpace(line[i - 1])))
            {
                line = line.Substring(0, i);
                break;
            }
        }

        return line.TrimEnd();
    }

    private sealed class Line(string content, int offset, int number)
    {
        public CatalogueError? Error { get; private set; }

        public int IdStart { get; private set; }

        public int IdLength { get; private set; }

        public void Fail(int start, int length, string reason) =>
            Error ??= new CatalogueError(number, new TextSpan(offset + start, length), reason);

        public CatalogueEntry? Read()
        {
            var start = 0;
            while (char.IsWhiteSpace(content[start]))
                start++;
            var equals = content.IndexOf('=');
            if (equals < 0)
            {
                Fail(start, content.Length - start, "A line must read 'id = effect'.");
                return null;
            }

            var id = content.Substring(start, equals - start).TrimEnd();
            (IdStart, IdLength) = (start, id.Length);
            if (id.Length == 0)
            {
                Fail(equals, 1, "No id stands before '='.");
                return null;
            }

            foreach (var character in id)
            {
                if (char.IsWhiteSpace(character))
                {
                    Fail(start, id.Length, "An id has no blanks.");
                    return null;
                }
            }

            if (CatalogueId.Parse(id, out var bareId, out var typeName, out var memberName, out var allOverloads) is { } reason)
            {
                Fail(start, id.Length, reason);
                return null;
            }

            var position = equals + 1;
            if (!Next(ref position, out var wordStart, out var word))
            {
                Fail(equals, 1, "No effect stands behind '='.");
                return null;
            }

            if (!CatalogueGrammar.TryEffect(word, out var effect))
            {
                Fail(wordStart, word.Length, $"'{word}' is not an effect.");
                return null;
            }

            var effectStart = wordStart;
            var keys = ImmutableArray.CreateBuilder<KeyValuePair<CatalogueKey, ImmutableArray<string>>>();
            while (Next(ref position, out wordStart, out word))
            {
                if (!ReadKey(word, wordStart, effect, keys))
                    return null;
            }

            foreach (var required in CatalogueGrammar.Required(effect))
            {
                if (!Has(keys, required))
                {
                    var name = CatalogueGrammar.NameOf(effect);
                    Fail(effectStart, name.Length, $"The effect '{name}' needs the key '{CatalogueGrammar.NameOf(required)}'.");
                    return null;
                }
            }

            return new CatalogueEntry(bareId, typeName, memberName, allOverloads, effect, keys.ToImmutable(), number);
        }

        private static bool Has(ImmutableArray<KeyValuePair<CatalogueKey, ImmutableArray<string>>>.Builder keys, CatalogueKey key)
        {
            foreach (var pair in keys)
            {
                if (pair.Key == key)
                    return true;
            }

            return false;
        }

        private bool ReadKey(
            string word, int start, CatalogueEffect effect, ImmutableArray<KeyValuePair<CatalogueKey, ImmutableArray<string>>>.Builder keys)
        {
            var colon = word.IndexOf(':');
            if (colon < 0)
                return Refuse(start, word.Length, $"'{word}' is not of the form 'key:value'.");
            var name = word.Substring(0, colon);
            if (!CatalogueGrammar.TryKey(name, out var key))
                return Refuse(start, word.Length, $"'{name}' is not a key.");
            if (!CatalogueGrammar.Takes(effect, key))
                return Refuse(start, word.Length, $"The effect '{CatalogueGrammar.NameOf(effect)}' does not take the key '{name}'.");
            if (Has(keys, key))
                return Refuse(start, word.Length, $"The key '{name}' is given twice.");

            var values = word.Substring(colon + 1).Split(',');
            var words = CatalogueGrammar.WordsOf(key);
            if (words is not null && values.Length != 1)
                return Refuse(start, word.Length, $"The key '{name}' has one value.");
            var position = start + colon + 1;
            for (var i = 0; i < values.Length; i++)
            {
                var value = values[i];
                if (words is not null && Array.IndexOf(words, value) < 0)
                    return Refuse(position, value.Length, $"The key '{name}' is one of: {string.Join(", ", words)}.");
                if (words is null && !IsIdentifier(value))
                    return Refuse(position, value.Length, $"'{value}' is not the name of a parameter.");
                if (Array.IndexOf(values, value) < i)
                    return Refuse(position, value.Length, $"'{value}' is given twice.");
                position += value.Length + 1;
            }

            keys.Add(new KeyValuePair<CatalogueKey, ImmutableArray<string>>(key, ImmutableArray.Create(values)));
            return true;
        }

        private bool Refuse(int start, int length, string reason)
        {
            Fail(start, length, reason);
            return false;
        }

        private bool Next(ref int position, out int start, out string word)
        {
            while (position < content.Length && char.IsWhiteSpace(content[position]))
                position++;
            start = position;
            while (position < content.Length && !char.IsWhiteSpace(content[position]))
                position++;
            word = content.Substring(start, position - start);
            return word.Length > 0;
        }

        private static bool IsIdentifier(string value)
        {
            if (value.Length == 0 || !(char.IsLetter(value[0]) || value[0] == '_'))
                return false;
            foreach (var character in value)
            {
                if (!(char.IsLetterOrDigit(character) || character == '_'))
                    return false;
            }

            return true;
        }
    }
}
