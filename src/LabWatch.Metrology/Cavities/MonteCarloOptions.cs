namespace LabWatch.Metrology.Cavities;

/// <summary>How a Monte Carlo trace is run.</summary>
/// <param name="RaysPerReplicate">Rays of one randomisation; a power of two is best.</param>
/// <param name="Replicates">Independent randomisations, 16 or more: the standard error comes from their scatter.</param>
/// <param name="Depth">Reflections to follow, 2 or more; later ones go on in the ratio of the last two.</param>
/// <param name="Seed">Seed; the same seed gives the same counts on any number of threads.</param>
/// <param name="Threads">Most threads to use; -1 for all processors.</param>
public sealed record MonteCarloOptions(int RaysPerReplicate = 4096, int Replicates = 16, int Depth = 48, ulong Seed = 1, int Threads = -1);
