using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.Analyzers.Knowledge;

namespace Tare.CodeFixes.Claims;

/// <summary>
/// Replaces a raw score in a reporting call by the runtime library's claim, which prints how many rows and comparisons it
/// stands on and corrects its interval for them. Only for shares of rows that can be counted again.
/// </summary>
public abstract class ClaimFix : DocumentFix
{
    /// <summary>Key of the only action.</summary>
    public const string Key = "ClaimCorrected";

    private protected override string Title => "Claim the score with its interval, corrected for all candidates compared";

    private protected override string EquivalenceKey => Key;

    private protected override Edit? EditFor(Place place)
    {
        if (!place.Library.Has("Claim") || place.Node.FirstAncestorOrSelf<InvocationExpressionSyntax>(i => i.Span == place.Diagnostic.Location.SourceSpan) is not { } call)
            return null;
        if (LooksAt(place, call) is not { } looks)
            return null;
        var writes = new Writes(place.Model.Compilation, place.Cancel);
        var shares = new List<(Slot Slot, string Rows)>();
        foreach (var slot in Slot.In(place, call))
        {
            if (place.Model.GetOperation(slot.Number, place.Cancel) is { } value && new Proportion(place, slot.Whole, writes).RowsOf(value) is { } rows && IsAmong(place, rows))
                shares.Add((slot, rows));
        }

        // beside the winner's score the call may show others, such as the trivial one
        if (shares.Count > 1)
            shares.RemoveAll(s => NameOf(s.Slot.Number) != place.Fact("score"));
        if (shares.Count == 0 || place.Library.Spell(place, call.SpanStart, "Claim", out bool needsUsing) is not { } claim)
            return null;
        var changes = shares.SelectMany(s => s.Slot.Replace($"{claim}.Accuracy({s.Slot.Number}, {s.Rows}, earlierLooks: {looks}{Metric(place, s.Slot.Number)})")).ToArray();
        return IsVerdict(place, call.SpanStart, shares[0], looks) ? new Edit(changes) { NeedsUsing = needsUsing } : null;
    }

    /// <summary>How many candidates these rows have been shown to: the expression that counts them, or the number.</summary>
    private static string? LooksAt(Place place, SyntaxNode call) =>
        CountExpression.ValidAt(place, call, place.Fact("count"), place.Labelled("family"))?.ToString()
        ?? (long.TryParse(place.Fact("k"), out long k) && k > 0 ? place.Fact("k") : null);

    /// <summary>The rows counted are those that the score which won was computed from.</summary>
    private static bool IsAmong(Place place, string count) =>
        place.Fact("rows") is not { } names || names.Split(',').Contains(count.Substring(0, count.LastIndexOf('.')));

    /// <summary>The claim says "accuracy" unless names say otherwise; a low share that wins is no accuracy.</summary>
    private static string Metric(Place place, ExpressionSyntax number)
    {
        var words = Vocabulary.Words(NameOf(number) ?? "").Concat(Vocabulary.Words(place.Fact("score") ?? "")).ToList();
        if (words.Any(w => w is "accuracy" or "acc" or "accuracies"))
            return "";
        if (words.Contains("hit"))
            return ", metric: \"hit rate\"";
        if (place.Fact("direction") != "lower")
            return "";
        return words.Any(w => w is "error" or "errors" or "err" or "wrong" or "miss" or "lowest" or "least" or "min")
            ? ", metric: \"error rate\""
            : ", metric: \"share\"";
    }

    private static string? NameOf(ExpressionSyntax expression) => expression switch
    {
        IdentifierNameSyntax name => name.Identifier.ValueText,
        MemberAccessExpressionSyntax member => member.Name.Identifier.ValueText,
        ElementAccessExpressionSyntax element => NameOf(element.Expression),
        InvocationExpressionSyntax invocation => NameOf(invocation.Expression),
        _ => null,
    };

    /// <summary>The overload exists in the version that is referenced.</summary>
    private static bool IsVerdict(Place place, int position, (Slot Slot, string Rows) share, string looks)
    {
        var call = SyntaxFactory.ParseExpression($"global::Tare.Claim.Accuracy({share.Slot.Number}, {share.Rows}, earlierLooks: {looks})");
        return place.TypeAt(position, call) is { Name: "Verdict" };
    }
}
