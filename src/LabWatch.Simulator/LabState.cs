using LabWatch.Simulator.Sources;

namespace LabWatch.Simulator;

/// <summary>State of a simulated lab at a whole second; with seed, drift epoch, live start and commands it determines all that follows.</summary>
/// <param name="Second">Seconds since 1970 UTC.</param>
/// <param name="Sources">State by source.</param>
internal sealed record LabState(long Second, IReadOnlyDictionary<string, SourceState> Sources);
