namespace Tallybound.Coding;

/// <summary>A statement about a source beyond what was counted of it.</summary>
/// <param name="Value">The figure of the sample itself, in the unit of the figure that it estimates.</param>
/// <param name="Low">Lower end of its 95 % interval, same unit.</param>
/// <param name="High">Upper end; at least <paramref name="Low"/>. The value need not lie in the middle, and on biased figures may lie outside.</param>
public readonly record struct Estimate(double Value, double Low, double High);
