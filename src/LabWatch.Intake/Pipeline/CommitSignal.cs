namespace LabWatch.Intake.Pipeline;

/// <summary>Whether nothing can be made durable now, neither in the store nor in the spool; the broker session follows it.</summary>
internal sealed class CommitSignal
{
    private readonly Lock _lock = new();
    private TaskCompletionSource _changed = NewSource();
    private bool _stopped;

    /// <summary>Whether commits have stopped.</summary>
    public bool Stopped => Volatile.Read(ref _stopped);

    /// <summary>Ends at the next change. Take it before reading <see cref="Stopped"/>.</summary>
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

    /// <summary>Sets the state; true where it changed.</summary>
    public bool Set(bool stopped)
    {
        TaskCompletionSource changed;
        lock (_lock)
        {
            if (_stopped == stopped)
            {
                return false;
            }

            _stopped = stopped;
            changed = _changed;
            _changed = NewSource();
        }

        changed.SetResult();
        return true;
    }

    private static TaskCompletionSource NewSource() => new(TaskCreationOptions.RunContinuationsAsynchronously);
}
