using System.Collections.Immutable;
using System.Globalization;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using Tare.Analyzers.Flow;

namespace Tare.Analyzers.Knowledge;

/// <summary>
/// What a project sets in `.editorconfig` or `.globalconfig`, and the lines it adds to the catalogue. A value that cannot be
/// read leaves the default in force.
/// </summary>
internal sealed class Settings
{
    private const string CatalogueFile = "tare.catalogue.txt";

    private Settings(Catalogue catalogue, Vocabulary vocabulary, FlowOptions options)
    {
        Catalogue = catalogue;
        Vocabulary = vocabulary;
        Options = options;
    }

    public Catalogue Catalogue { get; }

    public Vocabulary Vocabulary { get; }

    public FlowOptions Options { get; }

    /// <summary>Settings hold for a compilation: those of its first document, or global ones.</summary>
    public static Settings Of(AnalyzerOptions options, Compilation compilation, CancellationToken cancellation)
    {
        var provider = options.AnalyzerConfigOptionsProvider;
        var first = compilation.SyntaxTrees.FirstOrDefault();
        var own = first is null ? provider.GlobalOptions : provider.GetOptions(first);
        string? Read(string key) => own.TryGetValue(key, out string? value) || provider.GlobalOptions.TryGetValue(key, out value) ? value.Trim() : null;

        string[] test = Words(Read("tare.test_words")), validation = Words(Read("tare.validation_words")), training = Words(Read("tare.training_words"));
        var vocabulary = test.Length + validation.Length + training.Length == 0 ? Vocabulary.Default : new Vocabulary(test, validation, training);
        var evidence = Read("tare.evidence")?.ToLowerInvariant() switch
        {
            "declared" => Evidence.Declared,
            "known" => Evidence.Known,
            _ => Evidence.Named,
        };
        double level = double.TryParse(Read("tare.family_level"), NumberStyles.Float, CultureInfo.InvariantCulture, out double given) && given is > 0 and < 1 ? given : FlowOptions.Default.FamilyLevel;
        bool sidak = string.Equals(Read("tare.correction"), "sidak", StringComparison.OrdinalIgnoreCase);
        return new Settings(Added(options.AdditionalFiles, cancellation), vocabulary, new FlowOptions(evidence, level, sidak));
    }

    private static string[] Words(string? list) =>
        list is null ? Array.Empty<string>() : list.Split(new[] { ',', ';', ' ' }, StringSplitOptions.RemoveEmptyEntries);

    private static Catalogue Added(ImmutableArray<AdditionalText> files, CancellationToken cancellation)
    {
        var catalogue = Catalogue.Embedded;
        foreach (var file in files)
        {
            if (string.Equals(Path.GetFileName(file.Path), CatalogueFile, StringComparison.OrdinalIgnoreCase) && file.GetText(cancellation) is { } text)
                catalogue = Catalogue.Over(catalogue, CatalogueReader.Read(text).Entries);
        }

        return catalogue;
    }
}
