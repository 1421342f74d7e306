using System.Globalization;
using System.Text.RegularExpressions;
using Xunit.Abstractions;

namespace Tare.Samples.Tests;

/// <summary>The demo's promise, over 400 seeds of the hand-written programs.</summary>
public partial class SawmillTests(ITestOutputHelper output)
{
    private const int Seeds = 400;
    private const int TestRows = 200;
    private static readonly SampleProgram Leaky = new("Sawmill.Leaky"), Mended = new("Sawmill.Mended");

    /// <summary>On noise the mended program passes no more often than its level, 5 %, plus three standard errors.</summary>
    [Fact]
    public void Mended_claims_nothing_on_noise()
    {
        string[] lines = Mended.RunAll(Seeds);
        double claims = lines.Count(Passed) / (double)Seeds;
        output.WriteLine($"mended claims on noise: {claims:P1}");
        Assert.All(lines, line => Assert.Contains("compared on these test rows: 1", line));
        Assert.True(claims <= 0.05 + 3 * Math.Sqrt(0.05 * 0.95 / Seeds), $"{claims:P1} of {Seeds} seeds claim");
    }

    /// <summary>On the same noise the leaky program shows better than a coin nearly always, and in most seeds by so much that a plain test at 5 % would pass.</summary>
    [Fact]
    public void Leaky_looks_better_than_a_coin_on_noise()
    {
        double[] accuracies = [.. Leaky.RunAll(Seeds).Select(Accuracy)];
        double better = accuracies.Count(a => a > 0.5) / (double)Seeds;
        double significant = accuracies.Count(a => Claim.Accuracy(a, TestRows, baseline: 0.5).Passed == true) / (double)Seeds;
        output.WriteLine($"leaky above 50 %: {better:P1}, with p <= 0.05: {significant:P1}, mean accuracy {accuracies.Average():F3}");
        Assert.True(better > 0.95, $"{better:P1} above a coin");
        Assert.True(significant > 0.5, $"{significant:P1} with p <= 0.05");
    }

    /// <summary>With signal the mended program finds it as often as the exact test's power says, given how accurate its winners are.</summary>
    [Fact]
    public void Mended_finds_a_signal_at_the_planned_power()
    {
        string[] lines = Mended.RunAll(Seeds, signal: true);
        double claims = lines.Count(Passed) / (double)Seeds;
        double power = PowerOver([.. lines.Select(Accuracy)]);
        output.WriteLine($"mended with signal: claims {claims:P1}, mean accuracy {lines.Average(Accuracy):F3}, planned power {power:P1}");
        Assert.True(power is > 0.7 and < 0.999, $"the sample's signal should be neither hopeless nor trivial: {power:P1}");
        Assert.InRange(claims, power - 3 * Math.Sqrt(power * (1 - power) / Seeds) - 0.01, power + 3 * Math.Sqrt(power * (1 - power) / Seeds) + 0.01);
    }

    [Fact]
    public void Shown_seed_tells_the_story()
    {
        string leaky = Leaky.Run(1), mended = Mended.Run(1), found = Mended.Run(1, signal: true);
        output.WriteLine(leaky + "\n" + mended + "\n" + found);
        Assert.True(Accuracy(leaky) > 0.55);
        Assert.Contains(": not passed: accuracy", mended);
        Assert.Contains(": passed: accuracy", found);
    }

    [Fact]
    public void MicrosoftML_programs_tell_the_same_story()
    {
        string leaky = new SampleProgram("SawmillML.Leaky").Run(1);
        SampleProgram program = new("SawmillML.Mended");
        string mended = program.Run(1), found = program.Run(1, signal: true);
        output.WriteLine(leaky + "\n" + mended + "\n" + found);
        Assert.True(Accuracy(leaky) > 0.53);
        Assert.Contains(": not passed: accuracy", mended);
        Assert.Contains(": passed: accuracy", found);
    }

    private static bool Passed(string line) => line.Contains(": passed: ");

    private static double Accuracy(string line) => double.Parse(AccuracyText().Match(line).Groups[1].Value, CultureInfo.InvariantCulture);

    // Winners differ in how good they truly are: what their scores vary beyond the binomial law is true variation. The power is
    // averaged over it, taken as normal, at 99 equally likely points.
    private static double PowerOver(double[] accuracies)
    {
        double mean = accuracies.Average();
        double variance = accuracies.Sum(a => (a - mean) * (a - mean)) / (accuracies.Length - 1);
        double spread = Math.Sqrt(Math.Max(0, variance - mean * (1 - mean) / TestRows));
        long critical = 0;
        while (BinomialTest.PValue(critical, TestRows, 0.5, Side.Greater) > 0.05)
            critical++;
        return Enumerable.Range(1, 99).Average(i =>
            BinomialTest.PValue(critical, TestRows, Math.Clamp(mean + spread * MathNet.Numerics.Distributions.Normal.InvCDF(0, 1, i / 100.0), 0, 1), Side.Greater));
    }

    [GeneratedRegex(@"accuracy (\d\.?\d*)")]
    private static partial Regex AccuracyText();
}
