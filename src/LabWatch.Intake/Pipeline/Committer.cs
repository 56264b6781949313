using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Spool;
using Microsoft.Extensions.Logging;

namespace LabWatch.Intake.Pipeline;

/// <summary>
/// Makes messages durable in order of acceptance and completes their deliveries in that order. Each commit takes what arrived during the
/// last one; there is no timer. What the store does not take in time goes to the spool; where that fails too, it keeps trying and
/// <see cref="CommitSignal"/> says so.
/// </summary>
internal sealed class Committer(
    IntakeQueue queue,
    StoreLane lane,
    IntakeSpool spool,
    SpoolDrain drain,
    CommitSignal signal,
    IntakeCounters counters,
    CommitterOptions options,
    TimeProvider clock,
    ILogger<Committer> logger)
{
    /// <summary>Commits until the queue is closed and empty, or the token is cancelled; what is left then is abandoned.</summary>
    public async Task RunAsync(CancellationToken stop)
    {
        try
        {
            while (await queue.WaitAsync(stop))
            {
                List<IntakeItem> batch = queue.Take(options.BatchMessages, options.BatchReadings);
                await CommitAsync(batch, stop);
            }
        }
        catch (OperationCanceledException) when (stop.IsCancellationRequested)
        {
            // The budget for stopping is used up. The senders keep what was not acknowledged.
        }

        Complete(queue.Take(int.MaxValue, int.MaxValue), DeliveryOutcome.Abandoned);
    }

    private async Task CommitAsync(List<IntakeItem> batch, CancellationToken stop)
    {
        SpoolEntry[] entries = [.. batch.Select(item => item.Entry).Where(entry => entry.Pack is not null || entry.Refused is not null)];
        try
        {
            if (entries.Length > 0 && !await TryStoreAsync(entries))
            {
                await SpoolAsync(entries, stop);
            }

            Complete(batch, DeliveryOutcome.Durable);
        }
        catch (OperationCanceledException) when (stop.IsCancellationRequested)
        {
            Complete(batch, DeliveryOutcome.Abandoned);
            throw;
        }
        catch (Exception exception)
        {
            // A defect: the batch is not acknowledged, so its senders still have it, and the next batch is tried.
            IntakeLog.CommitterFailed(logger, exception);
            Complete(batch, DeliveryOutcome.Abandoned);
        }
    }

    private async Task<bool> TryStoreAsync(SpoolEntry[] entries)
    {
        if (!lane.TryEnter())
        {
            return false;
        }

        if (!spool.IsEmpty)
        {
            lane.Leave();
            return false;
        }

        // No token: a commit that began must be allowed to end, or a slow engine would never finish one.
        Task append = lane.AppendAndLeaveAsync(entries, CancellationToken.None);
        try
        {
            await append.WaitAsync(options.StoreDeadline, clock, CancellationToken.None);
            return true;
        }
        catch (TimeoutException) when (!append.IsCompleted)
        {
            IntakeLog.StoreSlow(logger, options.StoreDeadline.TotalSeconds, entries.Length);
            _ = append.ContinueWith(
                static (late, state) => IntakeLog.LateAppendFailed((ILogger)state!, late.Exception!.GetBaseException()),
                logger,
                CancellationToken.None,
                TaskContinuationOptions.OnlyOnFaulted | TaskContinuationOptions.ExecuteSynchronously,
                TaskScheduler.Default);
            return false;
        }
        catch (Exception exception)
        {
            // Whatever the engine threw, the spool keeps the entries and the drain tries them again one by one.
            IntakeLog.StoreFailed(logger, exception, entries.Length);
            return false;
        }
    }

    private async Task SpoolAsync(SpoolEntry[] entries, CancellationToken stop)
    {
        var backoff = new Backoff(options.RetryFirst, options.RetryLongest, Random.Shared);
        bool stored = false;
        while (!stored && !await TrySpoolAsync(entries, stop))
        {
            SetStopped(true);
            await Task.Delay(backoff.Next(), clock, stop);

            // The spool may have emptied meanwhile, or be too small for these entries ever.
            stored = await TryStoreAsync(entries);
        }

        SetStopped(false);
        if (!stored)
        {
            counters.Spooled(entries.Length);
            drain.Wake();
        }
    }

    private async Task<bool> TrySpoolAsync(SpoolEntry[] entries, CancellationToken stop)
    {
        Task<bool> write = Task.Run(() => spool.TryAppend(entries), CancellationToken.None);
        try
        {
            return await write.WaitAsync(options.StoreDeadline, clock, stop);
        }
        catch (TimeoutException) when (!write.IsCompleted)
        {
            // The disk hangs in a write that may still succeed: say that nothing can be committed now, and wait for its outcome.
            SetStopped(true);
            return await write.WaitAsync(stop);
        }
        catch (Exception exception) when (!stop.IsCancellationRequested)
        {
            // Whatever it was: nothing is durable, so nothing may be acknowledged, and the committer must live to try again.
            IntakeLog.SpoolFailed(logger, exception);
            return false;
        }
    }

    private void SetStopped(bool stopped)
    {
        if (!signal.Set(stopped))
        {
            return;
        }

        if (stopped)
        {
            IntakeLog.CommitsStopped(logger, spool.Bytes);
        }
        else
        {
            IntakeLog.CommitsResumed(logger);
        }
    }

    private static void Complete(List<IntakeItem> batch, DeliveryOutcome outcome)
    {
        foreach (IntakeItem item in batch)
        {
            item.Delivery.Complete(outcome);
        }
    }
}
