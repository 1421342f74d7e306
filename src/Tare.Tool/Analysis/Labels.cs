using System.Collections.Immutable;
using Microsoft.CodeAnalysis;

namespace Tare.Tool.Analysis;

/// <summary>Words for the places of a finding, from what the analyzer says about them.</summary>
internal static class Labels
{
    /// <summary>Comma list of the kinds of the additional locations, in their order.</summary>
    public const string PlacesProperty = "tare.places";

    /// <summary>Role of the rows that chose.</summary>
    public const string RoleProperty = "tare.role";

    /// <summary>What happens at the finding's own place.</summary>
    public static string Own(string id) => id switch
    {
        "TARE101" or "TARE104" or "TARE107" => "chosen here",
        "TARE102" or "TARE108" => "claimed here",
        "TARE103" => "training stops by this",
        "TARE201" => "compared here",
        _ => "",
    };

    /// <summary>One label for each additional location; empty where the analyzer names no kind.</summary>
    public static ImmutableArray<string> OfOthers(Diagnostic diagnostic)
    {
        var kinds = diagnostic.Properties.GetValueOrDefault(PlacesProperty)?.Split(',', StringSplitOptions.TrimEntries) ?? [];
        var role = diagnostic.Properties.GetValueOrDefault(RoleProperty);
        return [.. diagnostic.AdditionalLocations.Select((_, i) => i < kinds.Length ? Word(kinds[i], role) : "")];
    }

    private static string Word(string kind, string? role) => kind switch
    {
        "rows" => role is "validation" or "unsplit" ? $"{role} rows come from here" : "test rows come from here",
        "training" => "training rows come from here",
        "validation" => "validation rows come from here",
        "score" => "scored here",
        "fit" => "fitted here",
        "family" => "candidates vary here",
        "choice" => "chosen here",
        "helper" => "this line in the helper makes it so",
        "claim" => "claimed here",
        _ => kind,
    };
}
