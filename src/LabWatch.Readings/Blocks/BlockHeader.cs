using LabWatch.Lab.Identity;

namespace LabWatch.Readings.Blocks;

/// <summary>What a sealed block is about.</summary>
/// <param name="Source">The source.</param>
/// <param name="Hour">Start of the hour, microseconds since 1970 UTC.</param>
/// <param name="Part">0 for the first block of the hour, then one more for each supplement.</param>
/// <param name="PreviousDigest">SHA-256 of the part before; zeros for part 0.</param>
internal sealed record BlockHeader(SourceKey Source, long Hour, int Part, ReadOnlyMemory<byte> PreviousDigest);
