using System.Collections.Immutable;

namespace Tare.Analyzers.Knowledge;

/// <summary>What a catalogue's text says: the lines that were understood, and why the others were not.</summary>
internal sealed record CatalogueText(ImmutableArray<CatalogueEntry> Entries, ImmutableArray<CatalogueError> Errors);
