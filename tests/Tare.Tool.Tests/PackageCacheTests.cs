using Tare.Tool.Loading;

namespace Tare.Tool.Tests;

public class PackageCacheTests
{
    private const string Needs = """
        <package><metadata><dependencies>
          <group targetFramework=".NETStandard2.0"><dependency id="Old" version="1.0.0" /></group>
          <group targetFramework="net8.0"><dependency id="Inner" version="[1.5.0, )" /></group>
        </dependencies></metadata></package>
        """;

    [Fact]
    public void The_newest_target_that_runs_here_is_taken_and_dependencies_follow()
    {
        using var cache = new Folder()
            .With("outer/2.0.0/outer.nuspec", Needs)
            .With("outer/2.0.0/lib/netstandard2.0/Outer.dll", "")
            .With("outer/2.0.0/lib/net8.0/Outer.dll", "")
            .With("outer/2.0.0/lib/net99.0/Outer.dll", "")
            .With("outer/2.0.0/lib/net48/Outer.dll", "")
            .With("inner/1.4.0/lib/net8.0/Inner.dll", "")
            .With("inner/1.6.0/lib/net8.0/Inner.dll", "")
            .With("inner/1.10.0/lib/net8.0/Inner.dll", "")
            .With("old/1.0.0/lib/net8.0/Old.dll", "");

        Assert.Equal(
            [cache["outer/2.0.0/lib/net8.0/Outer.dll"], cache["inner/1.6.0/lib/net8.0/Inner.dll"]],
            PackageCache.Resolve([("Outer", "2.0.0")], cache.Path));
    }

    [Fact]
    public void Without_a_version_the_newest_is_taken()
    {
        using var cache = new Folder().With("a/1.9.0/lib/net8.0/A.dll", "").With("a/1.10.0/lib/net8.0/A.dll", "");

        Assert.Equal([cache["a/1.10.0/lib/net8.0/A.dll"]], PackageCache.Resolve([("A", null)], cache.Path));
        Assert.Equal([cache["a/1.10.0/lib/net8.0/A.dll"]], PackageCache.Resolve([("A", "*")], cache.Path));
    }

    [Fact]
    public void A_package_that_is_not_here_is_left_out()
    {
        using var cache = new Folder().With("a/1.0.0/lib/net8.0/A.dll", "");

        Assert.Empty(PackageCache.Resolve([("B", "1.0.0"), ("A", "2.0.0")], cache.Path));
    }

    [Fact]
    public void Packages_that_depend_on_each_other_come_to_an_end()
    {
        const string Needs = "<package><metadata><dependencies><dependency id=\"{0}\" version=\"1.0.0\" /></dependencies></metadata></package>";
        using var cache = new Folder()
            .With("a/1.0.0/a.nuspec", string.Format(System.Globalization.CultureInfo.InvariantCulture, Needs, "B")).With("a/1.0.0/lib/netstandard2.0/A.dll", "")
            .With("b/1.0.0/b.nuspec", string.Format(System.Globalization.CultureInfo.InvariantCulture, Needs, "A")).With("b/1.0.0/lib/netstandard2.0/B.dll", "");

        Assert.Equal(2, PackageCache.Resolve([("A", "1.0.0")], cache.Path).Count);
    }
}
