namespace LabWatch.Intake.Brokers.External;

/// <summary>
/// Messages that the client has read from the link and not yet handed to us. The client queues them without a bound, and a broker may
/// send far more than Receive Maximum; so reading from the link pauses while the backlog is at its limit, and TCP holds the rest back.
/// </summary>
internal sealed class ReceiveBacklog(int limit, long limitBytes)
{
    private readonly Lock _lock = new();
    private TaskCompletionSource? _room;
    private int _count;
    private long _bytes;

    public int Count => Volatile.Read(ref _count);

    /// <summary>Counts one message that was read; the task ends when there is room for another.</summary>
    public Task AddAsync(long bytes, CancellationToken cancellationToken)
    {
        lock (_lock)
        {
            _count++;
            _bytes += bytes;
            if (_count < limit && _bytes < limitBytes)
            {
                return Task.CompletedTask;
            }

            _room ??= new TaskCompletionSource(TaskCreationOptions.RunContinuationsAsynchronously);
            return _room.Task.WaitAsync(cancellationToken);
        }
    }

    /// <summary>Counts one message that was handed over.</summary>
    public void Remove(long bytes)
    {
        TaskCompletionSource? room = null;
        lock (_lock)
        {
            _count--;
            _bytes -= bytes;
            if (_count <= limit / 2 && _bytes <= limitBytes / 2)
            {
                room = _room;
                _room = null;
            }
        }

        room?.SetResult();
    }
}
