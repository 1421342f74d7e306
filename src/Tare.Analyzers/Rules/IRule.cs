using Tare.Analyzers.Flow;

namespace Tare.Analyzers.Rules;

/// <summary>A rule reads the facts of a walk and says what it found; it never walks itself.</summary>
internal interface IRule
{
    IEnumerable<Finding> Find(Reading reading);
}
