namespace LabWatch.Service.Backup;

/// <summary>One file of a backup.</summary>
/// <param name="Path">Its path in the data directory, with slashes.</param>
/// <param name="Bytes">Its length.</param>
/// <param name="Sha256">SHA-256 (FIPS 180-4) of its content, lower-case hexadecimal.</param>
internal sealed record BackupFile(string Path, long Bytes, string Sha256);
