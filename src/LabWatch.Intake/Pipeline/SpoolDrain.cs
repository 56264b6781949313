using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Spool;
using LabWatch.Lab.Readings;
using Microsoft.Extensions.Logging;

namespace LabWatch.Intake.Pipeline;

/// <summary>
/// Moves the spool to the store in order. It holds the lane from the first file to the last, retries included, so that nothing newer
/// overtakes what waits there.
/// </summary>
internal sealed class SpoolDrain(IntakeSpool spool, StoreLane lane, CommitterOptions options, TimeProvider clock, ILogger<SpoolDrain> logger)
    : IDisposable
{
    private const int AttemptsPerEntry = 3;
    private const int AttemptsPerFile = 3;
    private readonly SemaphoreSlim _wake = new(0, 1);

    /// <summary>Says that there may be something to move.</summary>
    public void Wake()
    {
        try
        {
            _wake.Release();
        }
        catch (SemaphoreFullException)
        {
            // It is awake already.
        }
    }

    /// <summary>Moves what an earlier run left and whatever comes, until cancelled.</summary>
    public async Task RunAsync(CancellationToken stop)
    {
        try
        {
            while (true)
            {
                if (!spool.IsEmpty)
                {
                    await MoveAllAsync(stop);
                }

                await _wake.WaitAsync(stop);
            }
        }
        catch (OperationCanceledException) when (stop.IsCancellationRequested)
        {
            // What is left is moved after the next start.
        }
    }

    /// <inheritdoc/>
    public void Dispose() => _wake.Dispose();

    private async Task MoveAllAsync(CancellationToken stop)
    {
        await lane.EnterAsync(stop);
        try
        {
            int files = 0;
            while (await ReadOldestAsync(stop) is { } chunk)
            {
                if (chunk.File.Damaged > 0)
                {
                    IntakeLog.SpoolDamaged(logger, chunk.Path, chunk.File.Damaged, chunk.File.Entries.Count);
                }

                bool all = await MoveAsync(chunk.File.Entries, stop);
                await RetryAsync(() => Finish(chunk, all), stop);
                files++;
            }

            IntakeLog.SpoolDrained(logger, files);
        }
        finally
        {
            lane.Leave();
        }
    }

    private async Task<SpoolChunk?> ReadOldestAsync(CancellationToken stop)
    {
        var backoff = new Backoff(options.RetryFirst, options.RetryLongest, Random.Shared);
        for (int attempt = 1; ; attempt++)
        {
            try
            {
                return spool.ReadOldest();
            }
            catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
            {
                IntakeLog.SpoolUnreadable(logger, exception);
                await Task.Delay(backoff.Next(), clock, stop);
                if (attempt % AttemptsPerFile == 0)
                {
                    await RetryAsync(() => spool.SetAsideOldest(), stop);
                }
            }
        }
    }

    /// <summary>A file of which something could be put neither into the store nor into quarantine is set aside, not removed.</summary>
    private void Finish(SpoolChunk chunk, bool all)
    {
        if (all)
        {
            spool.Remove(chunk);
        }
        else
        {
            IntakeLog.SpoolSetAside(logger, spool.SetAsideOldest());
        }
    }

    private async Task<bool> MoveAsync(IReadOnlyList<SpoolEntry> entries, CancellationToken stop)
    {
        int from = 0;
        bool all = true;
        while (from < entries.Count)
        {
            int to = from;
            for (int readings = 0; to < entries.Count && readings < options.BatchReadings && to - from < options.BatchMessages; to++)
            {
                readings += entries[to].Pack?.Readings.Count ?? 0;
            }

            SpoolEntry[] batch = [.. entries.Skip(from).Take(to - from)];
            if (await TryAppendAsync(batch, stop) is not null)
            {
                all &= await MoveSinglyAsync(batch, stop);
            }

            from = to;
        }

        return all;
    }

    private async Task<bool> MoveSinglyAsync(SpoolEntry[] entries, CancellationToken stop)
    {
        bool all = true;
        foreach (SpoolEntry entry in entries)
        {
            Exception? refusal = null;
            for (int attempt = 0; attempt < AttemptsPerEntry; attempt++)
            {
                refusal = await TryAppendAsync([entry], stop);
                if (refusal is null)
                {
                    break;
                }
            }

            if (refusal is not null)
            {
                IntakeLog.EntryRefused(logger, refusal, entry.Pack?.Source.ToString() ?? entry.Refused!.Topic);
                all &= entry.Pack is { } pack && await TrySetAsideAsync(pack, refusal, stop);
            }
        }

        return all;
    }

    /// <summary>Appends, however long it takes while the store is unavailable. Returns what the store threw where waiting does not help.</summary>
    private async Task<Exception?> TryAppendAsync(SpoolEntry[] entries, CancellationToken stop)
    {
        var backoff = new Backoff(options.RetryFirst, options.RetryLongest, Random.Shared);
        while (true)
        {
            try
            {
                await Task.Run(() => lane.AppendAsync(entries, stop), CancellationToken.None);
                return null;
            }
            catch (OperationCanceledException) when (stop.IsCancellationRequested)
            {
                throw;
            }
            catch (Exception exception) when (exception is IOException or TimeoutException or OperationCanceledException or UnauthorizedAccessException)
            {
                IntakeLog.DrainWaits(logger, exception.Message);
            }
            catch (Exception exception)
            {
                // A defect, of the store or of this content: the caller finds out which entry it is.
                return exception;
            }

            await Task.Delay(backoff.Next(), clock, stop);
        }
    }

    private async Task<bool> TrySetAsideAsync(ReadingPack pack, Exception refusal, CancellationToken stop)
    {
        try
        {
            await lane.SetAsideAsync(pack, refusal, stop);
            return true;
        }
        catch (Exception exception) when (exception is not OperationCanceledException)
        {
            // Without a place in quarantine the whole file is set aside, so that nothing of it is lost.
            IntakeLog.DrainWaits(logger, exception.Message);
            return false;
        }
    }

    private async Task RetryAsync(Action action, CancellationToken stop)
    {
        var backoff = new Backoff(options.RetryFirst, options.RetryLongest, Random.Shared);
        while (true)
        {
            try
            {
                action();
                return;
            }
            catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
            {
                IntakeLog.SpoolUnreadable(logger, exception);
                await Task.Delay(backoff.Next(), clock, stop);
            }
        }
    }
}
