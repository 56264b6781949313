namespace LabWatch.Intake.Brokers.External;

/// <summary>
/// Messages that the client has read from the link and not yet handed to us. The client queues them without a bound, and a broker may
/// send far more than Receive Maximum; so reading from the link pauses while the backlog is at its limit, and TCP holds the rest back.
/// </summary>
internal sealed class ReceiveBacklog(int limit)
{
    private readonly Lock _lock = new();
    private TaskCompletionSource? _room;
    private int _count;

    public int Count => Volatile.Read(ref _count);

    /// <summary>Counts one message that was read; the task ends when there is room for another.</summary>
    public Task AddAsync(CancellationToken cancellationToken)
    {
        lock (_lock)
        {
            _count++;
            if (_count < limit)
            {
                return Task.CompletedTask;
            }

            _room ??= new TaskCompletionSource(TaskCreationOptions.RunContinuationsAsynchronously);
            return _room.Task.WaitAsync(cancellationToken);
        }
    }

    /// <summary>Counts one message that was handed over.</summary>
    public void Remove()
    {
        TaskCompletionSource? room = null;
        lock (_lock)
        {
            _count--;
            if (_count <= limit / 2)
            {
                room = _room;
                _room = null;
            }
        }

        room?.SetResult();
    }
}
