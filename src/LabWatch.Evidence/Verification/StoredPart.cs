namespace LabWatch.Evidence.Verification;

/// <summary>A sealed part as its row tells it.</summary>
internal sealed record StoredPart(long Id, long SourceId, long Hour, long Part, long Readings, long LastChange, long SealedAt, byte[] Digest);
