using System.Text.Json;
using LabWatch.Records.Audit;

namespace LabWatch.Service.Backup;

/// <summary>What a backup contains, with the digest of every file; itself the file <see cref="FileName"/> of the backup.</summary>
/// <param name="Format">Always <see cref="CurrentFormat"/>.</param>
/// <param name="Program">Version of LabWatch that made the backup.</param>
/// <param name="At">When it was begun, RFC 3339.</param>
/// <param name="Heads">Ends of the audit chains as noted before the copy, by site.</param>
/// <param name="Files">The files.</param>
/// <param name="NotContained">What the installation has and the backup has not, in words.</param>
internal sealed record BackupManifest(
    string Format, string Program, string At, IReadOnlyDictionary<string, AuditHead> Heads, IReadOnlyList<BackupFile> Files, IReadOnlyList<string> NotContained)
{
    /// <summary>Name of the manifest in a backup.</summary>
    public const string FileName = "manifest.json";

    /// <summary>The format that this program writes and reads.</summary>
    public const string CurrentFormat = "labwatch backup 1";

    private static readonly JsonSerializerOptions Json = new(JsonSerializerDefaults.Web) { WriteIndented = true, RespectNullableAnnotations = true, RespectRequiredConstructorParameters = true };

    /// <summary>The bytes of the file.</summary>
    public byte[] ToBytes() => JsonSerializer.SerializeToUtf8Bytes(this, Json);

    /// <summary>Reads the file; null where it is no manifest of this format, or names a path outside the data directory.</summary>
    public static BackupManifest? Read(ReadOnlySpan<byte> bytes)
    {
        try
        {
            return JsonSerializer.Deserialize<BackupManifest>(bytes, Json) is { Format: CurrentFormat } manifest
                && manifest.Files.All(file => IsInside(file.Path)) && manifest.Files.Select(file => file.Path).Distinct(StringComparer.OrdinalIgnoreCase).Count() == manifest.Files.Count
                ? manifest
                : null;
        }
        catch (JsonException)
        {
            return null;
        }
    }

    /// <summary>Whether a path stays inside the directory that it is put in, on every system.</summary>
    public static bool IsInside(string path) =>
        path.Length is > 0 and < 1024 && !path.Contains('\\', StringComparison.Ordinal) && !path.Contains(':', StringComparison.Ordinal)
        && path.Split('/').All(part => part.Length > 0 && part is not ("." or ".."));
}
