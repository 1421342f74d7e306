using System.Xml.Linq;

namespace Tare.Packages.Tests;

/// <summary>What the packages hold and bring along, entry by entry.</summary>
[Collection(PackagesCollection.Name)]
public class PackageContentTests(PackedFixture packed)
{
    [Fact]
    public void AnalyzersHoldTheTwoAssembliesForTheCompilerAndNothingElse()
    {
        Assert.Equal(
            ["LICENSE", "README.md", "Tare.Analyzers.nuspec", "analyzers/dotnet/cs/Tare.Analyzers.dll", "analyzers/dotnet/cs/Tare.CodeFixes.dll"],
            packed.Entries("Tare.Analyzers"));
        var metadata = packed.Metadata("Tare.Analyzers");
        Assert.DoesNotContain(metadata.Descendants(), e => e.Name.LocalName == "dependency");
        Assert.Equal("true", Child(metadata, "developmentDependency"));
    }

    [Theory]
    [InlineData("Tare")]
    [InlineData("Tare.MicrosoftML")]
    public void LibrariesHoldAssemblyAndDocumentationForBothTargets(string package)
    {
        Assert.Equal(
            new[]
            {
                "LICENSE", "README.md", $"{package}.nuspec",
                $"lib/net10.0/{package}.dll", $"lib/net10.0/{package}.xml",
                $"lib/netstandard2.0/{package}.dll", $"lib/netstandard2.0/{package}.xml",
            }.Order(StringComparer.Ordinal),
            packed.Entries(package));
    }

    [Fact]
    public void TareBringsTheAnalyzersAlongAndOnNewTargetsNothingElse()
    {
        Assert.Equal(["Tare.Analyzers"], DependenciesOn("Tare", "net10.0").Select(Id));
        Assert.Equal(["System.Memory", "Tare.Analyzers"], DependenciesOn("Tare", ".NETStandard2.0").Select(Id).Order(StringComparer.Ordinal));
        foreach (string target in new[] { "net10.0", ".NETStandard2.0" })
        {
            var analyzers = DependenciesOn("Tare", target).Single(d => Id(d) == "Tare.Analyzers");
            Assert.Contains("Analyzers", ((string?)analyzers.Attribute("include") ?? "").Split(','));
            Assert.Null(analyzers.Attribute("exclude"));
        }
    }

    [Theory]
    [InlineData("Tare.Analyzers")]
    [InlineData("Tare")]
    [InlineData("Tare.MicrosoftML")]
    public void PackagesSayWhatTheyAre(string package)
    {
        var metadata = packed.Metadata(package);
        Assert.Equal("README.md", Child(metadata, "readme"));
        Assert.Equal("MIT", Child(metadata, "license"));
        Assert.NotEmpty(Child(metadata, "description"));
        Assert.Equal(packed.Version, Child(metadata, "version"));
    }

    private IEnumerable<XElement> DependenciesOn(string package, string target) =>
        packed.Metadata(package).Descendants()
            .Single(e => e.Name.LocalName == "group" && (string?)e.Attribute("targetFramework") == target)
            .Elements();

    private static string Id(XElement dependency) => (string)dependency.Attribute("id")!;

    private static string Child(XElement metadata, string name) => metadata.Elements().Single(e => e.Name.LocalName == name).Value;
}
