using System.Text.Json;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Hazards;

/// <summary>
/// Keeps when each hazard channel was last heard, so that the silence before a restart counts. Written every few seconds and at a stop; it is a
/// hint and not flushed: losing it makes the silence count from the start.
/// </summary>
internal sealed class LastHeardFile(string folder, ILogger<LastHeardFile> logger)
{
    /// <summary>Name of the file in the folder of the service's data.</summary>
    public const string FileName = "hazard-heard.json";

    private readonly string _path = Path.Combine(folder, FileName);

    /// <summary>What was kept; empty where nothing readable is there.</summary>
    public IReadOnlyDictionary<ChannelKey, Instant> Read()
    {
        try
        {
            Dictionary<string, Instant>? kept = File.Exists(_path)
                ? JsonSerializer.Deserialize(File.ReadAllBytes(_path), HeardJson.Default.DictionaryStringInstant)
                : null;
            return (kept ?? []).Where(pair => TryKey(pair.Key, out _)).ToDictionary(pair => TryKey(pair.Key, out ChannelKey key) ? key : default, pair => pair.Value);
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException or JsonException)
        {
            return new Dictionary<ChannelKey, Instant>();
        }
    }

    /// <summary>Keeps the times; says so where it cannot.</summary>
    public void Write(IReadOnlyDictionary<ChannelKey, Instant> heard)
    {
        try
        {
            Dictionary<string, Instant> kept = heard.ToDictionary(pair => pair.Key.ToString(), pair => pair.Value);
            File.WriteAllBytes(_path + ".new", JsonSerializer.SerializeToUtf8Bytes(kept, HeardJson.Default.DictionaryStringInstant));
            File.Move(_path + ".new", _path, overwrite: true);
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            Log.HeardNotStored(logger, exception);
        }
    }

    private static bool TryKey(string text, out ChannelKey key)
    {
        int slash = text.IndexOf('/', StringComparison.Ordinal);
        key = default;
        if (slash < 0 || !SourceKey.TryParse(text[..slash], out SourceKey source) || !Slug.IsValid(text[(slash + 1)..]))
        {
            return false;
        }

        key = new ChannelKey(source, text[(slash + 1)..]);
        return true;
    }
}
