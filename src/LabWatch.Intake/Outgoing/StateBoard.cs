using LabWatch.Intake.Options;

namespace LabWatch.Intake.Outgoing;

/// <summary>Holds the newest message of each topic; brokers follow by version. Bounded: there is one a source, and nothing is queued.</summary>
internal sealed class StateBoard(IntakeOptions options) : IStateBoard
{
    private readonly Lock _lock = new();
    private readonly Dictionary<string, StateMessage> _messages = new(StringComparer.Ordinal);
    private TaskCompletionSource _changed = NewSource();
    private long _version;

    /// <summary>Ends at the next change. Take it before <see cref="After"/>.</summary>
    public Task Changed
    {
        get
        {
            lock (_lock)
            {
                return _changed.Task;
            }
        }
    }

    /// <inheritdoc/>
    public void Tell(string path, byte[] payload)
    {
        ArgumentException.ThrowIfNullOrEmpty(path);
        ArgumentNullException.ThrowIfNull(payload);
        string topic = $"{options.OutRoot}/{path}";
        TaskCompletionSource changed;
        lock (_lock)
        {
            if (_messages.TryGetValue(topic, out StateMessage? known) && known.Payload.AsSpan().SequenceEqual(payload))
            {
                return;
            }

            _messages[topic] = new StateMessage(topic, payload, ++_version);
            changed = _changed;
            _changed = NewSource();
        }

        changed.SetResult();
    }

    /// <summary>The messages set after a version, oldest first.</summary>
    public IReadOnlyList<StateMessage> After(long version)
    {
        lock (_lock)
        {
            return [.. _messages.Values.Where(message => message.Version > version).OrderBy(message => message.Version)];
        }
    }

    private static TaskCompletionSource NewSource() => new(TaskCreationOptions.RunContinuationsAsynchronously);
}
