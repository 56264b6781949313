using System.Text.Json;
using System.Text.Json.Serialization;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Audit;

/// <summary>
/// The small file beside the database that holds the end of each site's chain as it was a moment ago. It is written after commits, so it
/// can lag behind the database but never be ahead of it: a chain that is shorter, or another one, was cut, written anew, or restored.
/// </summary>
public static class TrailHeadFile
{
    /// <summary>Name of the file in the data directory.</summary>
    public const string FileName = "trail-head.json";

    private const int LongestFile = 1 << 20;

    private static readonly JsonSerializerOptions Json = new(JsonSerializerDefaults.Web)
    {
        WriteIndented = true,
        UnmappedMemberHandling = JsonUnmappedMemberHandling.Disallow,
    };

    /// <summary>Reads the ends by site; empty where there is no file, null where it cannot be read as what it should be.</summary>
    public static IReadOnlyDictionary<string, AuditHead>? Read(string dataDirectory)
    {
        string path = Path.Combine(dataDirectory, FileName);
        try
        {
            return !File.Exists(path) ? new Dictionary<string, AuditHead>(StringComparer.Ordinal)
                : new FileInfo(path).Length > LongestFile ? null
                : Check(JsonSerializer.Deserialize<Content>(File.ReadAllBytes(path), Json));
        }
        catch (Exception exception) when (exception is JsonException or IOException or UnauthorizedAccessException)
        {
            return null;
        }
    }

    /// <summary>Replaces the file, whole or not at all.</summary>
    internal static void Write(string dataDirectory, IReadOnlyDictionary<string, AuditHead> heads, Instant at)
    {
        string path = Path.Combine(dataDirectory, FileName);
        string partial = path + ".part";
        using (FileStream stream = File.Create(partial))
        {
            JsonSerializer.Serialize(stream, new Content(at, new SortedDictionary<string, AuditHead>(heads.ToDictionary(), StringComparer.Ordinal)), Json);
            stream.Flush(flushToDisk: true);
        }

        File.Move(partial, path, overwrite: true);
    }

    /// <summary>Puts the file aside under a name with the time; its name, or null where there was none.</summary>
    internal static string? SetAside(string dataDirectory, Instant at)
    {
        string path = Path.Combine(dataDirectory, FileName);
        if (!File.Exists(path))
        {
            return null;
        }

        string name = FormattableString.Invariant($"trail-head.differs-{at.Microseconds}.json");
        File.Move(path, Path.Combine(dataDirectory, name), overwrite: true);
        return name;
    }

    private static SortedDictionary<string, AuditHead>? Check(Content? content) =>
        content?.Sites is { } sites && sites.Values.All(head => head is { Sequence: > 0, Digest.Length: 64 } && head.Digest.All(char.IsAsciiHexDigitLower))
            ? sites
            : null;

    private sealed record Content(Instant At, SortedDictionary<string, AuditHead> Sites);
}
