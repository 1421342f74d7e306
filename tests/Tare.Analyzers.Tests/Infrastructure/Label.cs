using System.Collections.Immutable;
using System.Text.RegularExpressions;

namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>A marker in a labelled program: <c>// ! TARE101</c> must be reported on its line, <c>// ? TARE106</c> may be.</summary>
/// <param name="File">Name of the file.</param>
/// <param name="Line">Line, counted from 1.</param>
internal sealed partial record Label(string Rule, string File, int Line, bool Required)
{
    /// <summary>The markers of a source text.</summary>
    public static ImmutableArray<Label> In(string file, string text)
    {
        var labels = ImmutableArray.CreateBuilder<Label>();
        string[] lines = text.Split('\n');
        for (int i = 0; i < lines.Length; i++)
        {
            foreach (Match marker in Marker().Matches(lines[i]))
            {
                foreach (string rule in marker.Groups["rules"].Value.Split(','))
                    labels.Add(new Label(rule.Trim(), file, i + 1, marker.Groups["kind"].Value == "!"));
            }
        }

        return labels.ToImmutable();
    }

    [GeneratedRegex(@"//\s*(?<kind>[!?])\s*(?<rules>TARE\d{3}(\s*,\s*TARE\d{3})*)")]
    private static partial Regex Marker();
}
