using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Readings;

/// <summary>A sealed part of a source-hour: it never changes again, and its digest proves it.</summary>
/// <param name="Seal">Number of the seal in this store, rising in the order of sealing.</param>
/// <param name="Source">The source.</param>
/// <param name="Hour">Start of the hour.</param>
/// <param name="Part">0 for the first sealing of the hour, then one more for each supplement of late readings.</param>
/// <param name="Readings">Readings in it.</param>
/// <param name="Digest">SHA-256 of its bytes, which hold the digest of the part before.</param>
/// <param name="SealedAt">When it was sealed.</param>
/// <param name="LastChange">Number of the last commit with a reading in it.</param>
public sealed record SealedHour(long Seal, SourceKey Source, Instant Hour, int Part, int Readings, ReadOnlyMemory<byte> Digest, Instant SealedAt, long LastChange);
