namespace Tare.Analyzers.Tests.Infrastructure;

/// <summary>Tests that capture the console, which all tests of a process share: they run after the parallel ones, one at a time.</summary>
[CollectionDefinition(Name, DisableParallelization = true)]
public sealed class ConsoleCollection
{
    public const string Name = "console";
}
