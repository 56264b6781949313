using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Readings.Retention;

/// <summary>A sealed part of which readings are older than they must be kept.</summary>
/// <param name="Seal">Number of the seal.</param>
/// <param name="Source">The source.</param>
/// <param name="Hour">Start of the hour.</param>
/// <param name="Part">Number of the part.</param>
/// <param name="Channels">Channels to remove.</param>
/// <param name="Readings">Readings of them.</param>
/// <param name="Digest">SHA-256 of the part as it was sealed.</param>
/// <param name="DigestAfter">SHA-256 of what will be left.</param>
/// <param name="Left">What will be left; empty where nothing is.</param>
public sealed record RemovablePart(
    long Seal, SourceKey Source, Instant Hour, int Part, IReadOnlyList<string> Channels, long Readings,
    ReadOnlyMemory<byte> Digest, ReadOnlyMemory<byte> DigestAfter, ReadOnlyMemory<byte> Left);
