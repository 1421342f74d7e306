namespace Tare.Packages.Tests;

/// <summary>Tests that share one packing.</summary>
[CollectionDefinition(Name)]
public sealed class PackagesCollection : ICollectionFixture<PackedFixture>
{
    public const string Name = "packages";
}
