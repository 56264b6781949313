using System.Collections.Concurrent;
using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.LifeCycle;

namespace LabWatch.Alerts.Desk;

/// <summary>
/// Work for the alert desk. Conditions and acknowledgements go before book-keeping, so that a flood of delivery reports holds up no hazard.
/// Many writers, one reader. What is in it is bounded by the number of channels and messages, not by readings.
/// </summary>
internal sealed class DeskQueue : IConditionSink, IDisposable
{
    private const int LargestUrgentBatch = 2048;
    private const int LargestOtherBatch = 256;

    private readonly ConcurrentQueue<DeskWork> _urgent = new();
    private readonly ConcurrentQueue<DeskWork> _other = new();
    private readonly SemaphoreSlim _signal = new(0);

    /// <summary>Adds work.</summary>
    public void Post(DeskWork work)
    {
        (work is DeskWork.Condition or DeskWork.Asked ? _urgent : _other).Enqueue(work);
        _signal.Release();
    }

    /// <inheritdoc/>
    public void Post(AlertCondition condition) => Post(new DeskWork.Condition(condition));

    /// <summary>Waits until there is work or the token is cancelled; false where it was cancelled and nothing is left.</summary>
    public bool Wait(CancellationToken stopping)
    {
        try
        {
            _signal.Wait(stopping);
            return true;
        }
        catch (OperationCanceledException)
        {
            return !_urgent.IsEmpty || !_other.IsEmpty;
        }
    }

    /// <summary>Takes the next batch; empty where there is no work.</summary>
    public IReadOnlyList<DeskWork> Take()
    {
        List<DeskWork> batch = Take(_urgent, LargestUrgentBatch);
        return batch.Count > 0 ? batch : Take(_other, LargestOtherBatch);
    }

    /// <inheritdoc/>
    public void Dispose() => _signal.Dispose();

    private static List<DeskWork> Take(ConcurrentQueue<DeskWork> queue, int count)
    {
        List<DeskWork> batch = [];
        while (batch.Count < count && queue.TryDequeue(out DeskWork? work))
        {
            batch.Add(work);
        }

        return batch;
    }
}
