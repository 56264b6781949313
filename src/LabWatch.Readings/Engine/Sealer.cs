using LabWatch.Lab.Time;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Head;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings.Engine;

/// <summary>
/// Seals hours: freezes them between two commits, encodes them while commits go on, and writes them in transactions of bounded size that
/// also drop the journal rows nobody needs any more.
/// </summary>
internal sealed class Sealer(
    StoreSession session, SemaphoreSlim writing, HeadState head, StoreIncidents incidents, ReadingsOptions options, TimeProvider clock, ILogger log)
    : IAsyncDisposable
{
    private const int BatchBytes = 1 << 20;

    /// <summary>Each is one short transaction, so that commits come in between.</summary>
    private const int ReleasesPerPass = 16;

    private const int RollUpsPerPass = 64;

    private readonly SemaphoreSlim _passing = new(1, 1);
    private readonly PartSealer _sealer = new();

    /// <summary>Seals what the policy chooses, or everything that is unsealed; gives the number of parts sealed.</summary>
    public async Task<int> PassAsync(bool everything, CancellationToken cancellationToken)
    {
        await _passing.WaitAsync(cancellationToken);
        try
        {
            IReadOnlyList<SealCandidate> chosen = await WriteAsync(writer => Freeze(writer, everything), cancellationToken);
            List<SealedPart> batch = [];
            int bytes = 0;
            for (int i = 0; i < chosen.Count; i++)
            {
                HeadHour hour = chosen[i].Hour;
                HeadPart part = hour.Frozen!;
                byte[] previous = part.Part == 0 ? [] : await WriteAsync(writer => PreviousDigest(writer, hour, part, batch), cancellationToken);
                batch.Add(_sealer.Seal(hour, part, previous));
                bytes += batch[^1].Block.Length;
                if (bytes >= BatchBytes || i == chosen.Count - 1)
                {
                    await WriteAsync(writer => Write(writer, batch), cancellationToken);
                    batch.Clear();
                    bytes = 0;
                }
            }

            while (chosen.Count > 0 && await WriteAsync(Drop, cancellationToken))
            {
                cancellationToken.ThrowIfCancellationRequested();
            }

            for (int turn = 0; turn < RollUpsPerPass && await WriteAsync(writer => new HourlyRollUp(writer, head, incidents).Run(), cancellationToken); turn++)
            {
                cancellationToken.ThrowIfCancellationRequested();
            }

            for (int turn = 0; turn < ReleasesPerPass && await WriteAsync(writer => writer.ReleaseSpace(), cancellationToken); turn++)
            {
                cancellationToken.ThrowIfCancellationRequested();
            }

            return chosen.Count;
        }
        finally
        {
            _passing.Release();
        }
    }

    public async ValueTask DisposeAsync()
    {
        await _passing.WaitAsync();
        _passing.Dispose();
    }

    private async Task<T> WriteAsync<T>(Func<StoreWriter, T> action, CancellationToken cancellationToken)
    {
        await writing.WaitAsync(cancellationToken);
        try
        {
            return session.Use(action);
        }
        finally
        {
            writing.Release();
        }
    }

    private IReadOnlyList<SealCandidate> Freeze(StoreWriter writer, bool everything)
    {
        session.Probe(writer);
        incidents.Persist(writer.Connection);
        List<SealCandidate> candidates = Candidates();
        long floor = writer.Connection.Number(null, StoreDialect.Floor);
        IReadOnlyList<SealCandidate> chosen = everything
            ? [.. candidates.OrderBy(one => one.Hour.Hour)]
            : SealPolicy.Choose(candidates, options, session.JournalBytes, floor, head.Change);
        lock (head.Sync)
        {
            foreach (SealCandidate one in chosen)
            {
                _ = one.Hour.Frozen ?? one.Hour.Freeze();
            }
        }

        return chosen;
    }

    private List<SealCandidate> Candidates()
    {
        long now = Instant.Now(clock).Microseconds;
        long timestamp = clock.GetTimestamp();
        List<SealCandidate> candidates = [];
        foreach (HeadHour hour in head.Sources.SelectMany(source => source.Hours.Values))
        {
            if ((hour.Frozen ?? hour.Open) is { Readings: > 0 } part)
            {
                bool over = now >= hour.Hour + Instant.MicrosecondsPerHour;
                TimeSpan quiet = hour.Frozen is null ? clock.GetElapsedTime(part.Touched, timestamp) : TimeSpan.MaxValue;
                candidates.Add(new SealCandidate(hour, over || hour.Frozen is not null, quiet, part.Readings, part.FirstChange, part.Part));
            }
        }

        return candidates;
    }

    private static byte[] PreviousDigest(StoreWriter writer, HeadHour hour, HeadPart part, List<SealedPart> batch)
    {
        SealedPart? here = batch.Find(one => ReferenceEquals(one.Hour, hour));
        return here?.Digest ?? writer.Digest(hour.Source.Id, hour.Hour, part.Part - 1) ?? new byte[BlockFormat.DigestBytes];
    }

    private int Write(StoreWriter writer, List<SealedPart> batch)
    {
        writer.Seal(batch, Floor(batch), Instant.Now(clock).Microseconds);
        lock (head.Sync)
        {
            foreach (SealedPart part in batch)
            {
                part.Hour.OnSealed();
                head.OnIdle(part.Hour);
            }

            head.ForgetIdle();
        }

        long readings = batch.Sum(one => (long)one.Part.Readings);
        head.Unsealed -= readings;
        ReadingsMetrics.OnSealed(batch.Count, readings);
        ReadingsLog.Sealed(log, batch.Count, readings, batch.Sum(one => (long)one.Block.Length));
        return batch.Count;
    }

    private bool Drop(StoreWriter writer)
    {
        bool more = writer.DropJournal(Floor([]));
        if (!more)
        {
            session.MeasureJournal(writer);
        }

        return more;
    }

    /// <summary>The last commit that nothing unsealed needs, apart from the parts given.</summary>
    private long Floor(List<SealedPart> sealing)
    {
        HashSet<HeadPart> leaving = [.. sealing.Select(one => one.Part)];
        long floor = head.Change;
        foreach (HeadHour hour in head.Sources.SelectMany(source => source.Hours.Values))
        {
            foreach (HeadPart? part in (HeadPart?[])[hour.Frozen, hour.Open])
            {
                if (part is { Readings: > 0 } && !leaving.Contains(part))
                {
                    floor = Math.Min(floor, part.FirstChange - 1);
                }
            }
        }

        return floor;
    }
}
