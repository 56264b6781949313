namespace LabWatch.Records.Storage;

/// <summary>A provenance as stored.</summary>
internal sealed record StoredProvenance(
    string ReadingsDigest, StoredHour[] Hours, string[] Certificates, string? Limit, string ProgramVersion, string? Source = null);
