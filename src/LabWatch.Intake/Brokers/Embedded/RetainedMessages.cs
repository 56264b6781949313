using System.Buffers;
using System.Text.Json;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Spool;
using Microsoft.Extensions.Logging;
using MQTTnet;
using MQTTnet.Protocol;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>
/// The retained messages of the embedded broker, kept in a file over restarts and bounded in number and bytes. The file is written within
/// a second of a change and when the broker stops; a crash may lose the last second of them, never a reading.
/// </summary>
internal sealed class RetainedMessages(string path, ILogger logger)
{
    /// <summary>Most topics with a retained message.</summary>
    public const int MaximumMessages = 10_000;

    /// <summary>Most bytes of retained payloads.</summary>
    public const long MaximumBytes = 64L << 20;

    private readonly Lock _lock = new();
    private readonly Dictionary<string, long> _lengths = new(StringComparer.Ordinal);
    private long _bytes;
    private List<MqttApplicationMessage>? _unsaved;

    /// <summary>Counts a message to be retained (an empty one takes its topic's away); false where there is no room for it.</summary>
    public bool TryKeep(string topic, long length)
    {
        lock (_lock)
        {
            bool isNew = !_lengths.TryGetValue(topic, out long former);
            if (length == 0)
            {
                _lengths.Remove(topic);
                _bytes -= former;
                return true;
            }

            if ((isNew && _lengths.Count >= MaximumMessages) || _bytes - former + length > MaximumBytes)
            {
                IntakeLog.NotRetained(logger, MaximumMessages, MaximumBytes);
                return false;
            }

            _lengths[topic] = length;
            _bytes += length - former;
            return true;
        }
    }

    /// <summary>Notes what is retained now, to be saved.</summary>
    public void Changed(List<MqttApplicationMessage> all)
    {
        lock (_lock)
        {
            _unsaved = all;
        }
    }

    /// <summary>What an earlier run kept. A file that cannot be read is reported and passed over: readings do not depend on it.</summary>
    public IReadOnlyList<MqttApplicationMessage> Load()
    {
        try
        {
            if (!File.Exists(path))
            {
                return [];
            }

            Kept[] kept = JsonSerializer.Deserialize<Kept[]>(File.ReadAllBytes(path)) ?? [];
            return [.. kept.Where(message => TryKeep(message.Topic, message.Payload.Length)).Select(message => new MqttApplicationMessage
            {
                Topic = message.Topic,
                Payload = new ReadOnlySequence<byte>(message.Payload),
                QualityOfServiceLevel = (MqttQualityOfServiceLevel)Math.Clamp(message.Quality, 0, 2),
                Retain = true,
            })];
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException or JsonException)
        {
            IntakeLog.RetainedFailed(logger, exception.Message);
            return [];
        }
    }

    /// <summary>Writes the file where something has changed.</summary>
    public void Save()
    {
        List<MqttApplicationMessage>? all;
        lock (_lock)
        {
            (all, _unsaved) = (_unsaved, null);
        }

        if (all is null)
        {
            return;
        }

        try
        {
            byte[] json = JsonSerializer.SerializeToUtf8Bytes(all.Select(message => new Kept(message.Topic, (int)message.QualityOfServiceLevel, message.Payload.ToArray())));
            string fresh = path + ".new";
            using (FileStream stream = new(fresh, FileMode.Create, FileAccess.Write))
            {
                stream.Write(json);
                stream.Flush(flushToDisk: true);
            }

            File.Move(fresh, path, overwrite: true);
            DirectoryFlush.Flush(Path.GetDirectoryName(path)!);
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            IntakeLog.RetainedFailed(logger, exception.Message);
            lock (_lock)
            {
                _unsaved ??= all;
            }
        }
    }

    private sealed record Kept(string Topic, int Quality, byte[] Payload);
}
