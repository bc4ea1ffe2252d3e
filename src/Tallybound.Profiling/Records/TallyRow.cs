namespace Tallybound.Profiling.Records;

/// <summary>One count of a kept tally.</summary>
/// <param name="Source">Name of the source.</param>
/// <param name="View">Name of the view.</param>
/// <param name="Order">Symbols of context; 0: none.</param>
/// <param name="Context">The context's symbols packed with the earliest one most significant; 0 for order 0.</param>
/// <param name="Symbol">The symbol.</param>
/// <param name="Count">How often it stands after the context, at least 1.</param>
public readonly record struct TallyRow(string Source, string View, int Order, long Context, int Symbol, long Count);
