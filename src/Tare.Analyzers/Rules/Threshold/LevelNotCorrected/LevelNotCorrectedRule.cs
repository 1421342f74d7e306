using Microsoft.CodeAnalysis;
using Tare.Analyzers.Flow;

namespace Tare.Analyzers.Rules.Threshold;

/// <summary>TARE201: p-values of a family are each compared with one uncorrected level.</summary>
internal sealed class LevelNotCorrected : IRule
{
    public const string Id = "TARE201";

    public static readonly DiagnosticDescriptor Rule = Rules.Rule.Describe(
        Id,
        "Significance level not corrected for the family",
        "{0}",
        "Each of K p-values is compared with one uncorrected level, so the chance of at least one false finding grows with K.");

    public IEnumerable<Finding> Find(Reading reading)
    {
        foreach (var test in reading.Facts.LevelTests)
        {
            if (test.Conjunction || test.Family.IsEmpty)
                continue;
            double? k = reading.Product(test.Family);
            if (k is <= 1)
                continue;
            double level = test.Level.Number ?? 0.05;
            string given = test.Level.Number is { } n ? Numbers.Plain(n) : $"'{test.LevelName}'";
            string what = test.PName is { } name ? $"'{name}'" : "The p-value";
            string family = k is { } size ? $"each of {Numbers.Plain(size)} tests" : reading.GridName(test.Family) is { } grid ? $"each test in '{grid}'" : "each test of the family";
            string odds = k is { } count
                ? $"with no effect anywhere, at least one passes with probability {Numbers.Percent(Numbers.FamilyWise(level, count))} when the tests are independent. Require p <= {Numbers.Level(Numbers.Corrected(level, count, reading.Options.Sidak))} of each, or adjust the p-values."
                : $"with no effect anywhere, at least one passes with probability 1 - (1 - {Numbers.Plain(level)})^K when the tests are independent ({Numbers.Percent(Numbers.FamilyWise(level, 10))} for K = 10). Require p <= {Numbers.Plain(level)} / K of each, or adjust the p-values.";
            var finding = new Finding(Rule, test.Place, $"{what} is held against {given} for {family}: {odds}")
                .With("k", k is { } value ? Numbers.Plain(value) : null)
                .With("count", reading.CountText(test.Family))
                .With("level", k is { } v ? Numbers.Level(Numbers.Corrected(level, v, reading.Options.Sidak)) : null)
                .With("correction", reading.Options.Sidak ? "sidak" : null)
                .With("score", test.PName);
            yield return finding.Beside("family", reading.FamilyPlace(test.Family));
        }
    }
}
