namespace LabWatch.Readings.Blocks;

/// <summary>Where one channel lies in a sealed block.</summary>
internal readonly record struct SealedChannel(string Name, int TimeColumn, int Group, int Offset);
