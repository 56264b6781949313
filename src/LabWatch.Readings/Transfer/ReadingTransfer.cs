using System.Data.Common;
using System.Security.Cryptography;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Engine;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Readings.Transfer;

/// <summary>
/// Copies readings from one store to another, hour by hour. An hour that is the same on both sides is passed over, so a transfer that
/// was interrupted is simply started again. Nothing in the target is ever changed: another value there stays, and is reported.
/// </summary>
public static class ReadingTransfer
{
    private const int ReadingsInCommit = 20_000;
    private const int ReadingsBeforeSealing = 1_000_000;

    /// <summary>
    /// Copies the sealed hours and the journal as they are, where both engines keep them so and the target is empty or has a beginning of
    /// the same: the trail's digests then hold there too. Throws <see cref="StoreUnavailableException"/> where a side does not answer.
    /// </summary>
    /// <param name="from">Where readings come from; nobody else may use it.</param>
    /// <param name="to">Where they go.</param>
    /// <param name="progress">Told of sealed parts done and parts in all.</param>
    /// <param name="cancellationToken">Ends the copy after the transaction that is running.</param>
    /// <returns>Sealed parts copied; null where readings have to be copied hour by hour.</returns>
    public static long? CopyBlocks(ReadingsOptions from, ReadingsOptions to, Action<long, long>? progress, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(from);
        ArgumentNullException.ThrowIfNull(to);
        (StoreDialect? source, StoreDialect? target) = (ReadingEngine.Dialect(from), ReadingEngine.Dialect(to));
        try
        {
            return source is null || target is null ? null : new BlockCopy(source, target).Run(progress, cancellationToken);
        }
        catch (Exception error) when (error is DbException or TimeoutException)
        {
            throw new StoreUnavailableException($"The readings cannot be copied: {error.Message}", error);
        }
        finally
        {
            source?.Close();
            target?.Close();
        }
    }

    /// <summary>Copies all hours. Throws <see cref="StoreUnavailableException"/> where a side does not answer: start it again then.</summary>
    /// <param name="from">Where readings come from.</param>
    /// <param name="to">Where they go.</param>
    /// <param name="progress">Told of hours done and hours in all.</param>
    /// <param name="cancellationToken">Ends the copy after the commit that is running.</param>
    public static async Task<TransferCopy> CopyAsync(ReadingEngine from, ReadingEngine to, Action<long, long>? progress, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(from);
        ArgumentNullException.ThrowIfNull(to);
        await to.Health.OpenAsync(cancellationToken);
        IReadOnlyList<(SourceKey Source, Instant Hour)> hours = (await from.Store.ChangesAsync(0, cancellationToken)).Hours;
        TransferCopy copy = new() { Hours = hours.Count };
        long done = 0, unsealed = 0;
        foreach ((SourceKey source, Instant hour) in hours)
        {
            ReadingWindow window = await from.Store.ReadAsync(source, null, HourAt(hour), cancellationToken);
            if (await IsThereAsync(window, to.Store, cancellationToken))
            {
                copy.HoursThereAlready++;
            }
            else
            {
                unsealed += await CopyAsync(window, to.Store, copy, cancellationToken);
            }

            if (unsealed >= ReadingsBeforeSealing)
            {
                await to.Sealer.SealEverythingAsync(cancellationToken);
                unsealed = 0;
            }

            progress?.Invoke(++done, hours.Count);
        }

        await to.Sealer.SealEverythingAsync(cancellationToken);
        return copy;
    }

    /// <summary>Copies what was refused, oldest first, and only what is not there yet; gives how many messages.</summary>
    public static async Task<int> CopyQuarantineAsync(IQuarantine from, IQuarantine to, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(from);
        ArgumentNullException.ThrowIfNull(to);
        HashSet<string> known = [.. (await to.NewestAsync(int.MaxValue, cancellationToken)).Select(Identity)];
        QuarantinedMessage[] missing = [.. (await from.NewestAsync(int.MaxValue, cancellationToken)).Reverse().Where(one => !known.Contains(Identity(one)))];
        foreach (QuarantinedMessage[] some in missing.Chunk(200))
        {
            await to.AddAsync(some, cancellationToken);
        }

        return missing.Length;
    }

    /// <summary>
    /// Compares both sides hour by hour by the digest of the canonical readings. Open both sides anew before, so that what lies in the
    /// databases is compared and not what is in memory.
    /// </summary>
    /// <param name="from">Where readings came from.</param>
    /// <param name="to">Where they went.</param>
    /// <param name="progress">Told of hours done and hours in all.</param>
    /// <param name="cancellationToken">Cancels.</param>
    public static async Task<TransferCheck> VerifyAsync(IReadingStore from, IReadingStore to, Action<long, long>? progress, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(from);
        ArgumentNullException.ThrowIfNull(to);
        IReadOnlyList<(SourceKey Source, Instant Hour)> hours = (await from.ChangesAsync(0, cancellationToken)).Hours;
        HashSet<(SourceKey Source, Instant Hour)> others = [.. (await to.ChangesAsync(0, cancellationToken)).Hours];
        List<(SourceKey, Instant)> different = [];
        long readings = 0, done = 0;
        foreach ((SourceKey source, Instant hour) in hours)
        {
            others.Remove((source, hour));
            ReadingWindow window = await from.ReadAsync(source, null, HourAt(hour), cancellationToken);
            readings += window.Series.Sum(one => (long)one.Count);
            if (!await IsThereAsync(window, to, cancellationToken))
            {
                different.Add((source, hour));
            }

            progress?.Invoke(++done, hours.Count);
        }

        return new TransferCheck(hours.Count, readings, different, others.Count);
    }

    private static TimeWindow HourAt(Instant hour) => new(hour, hour + TimeSpan.FromHours(1));

    private static async Task<bool> IsThereAsync(ReadingWindow window, IReadingStore to, CancellationToken cancellationToken)
    {
        ReadingWindow other = await to.ReadAsync(window.Source, null, window.Window, cancellationToken);
        return Digest(window).AsSpan().SequenceEqual(Digest(other));
    }

    private static byte[] Digest(ReadingWindow window)
    {
        using IncrementalHash hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        CanonicalReadings.AppendTo(hash, window.Source, window.Series);
        return hash.GetHashAndReset();
    }

    private static async Task<long> CopyAsync(ReadingWindow window, IReadingStore to, TransferCopy copy, CancellationToken cancellationToken)
    {
        long accepted = 0;
        foreach (Reading[] readings in window.Series.SelectMany(Readings).Chunk(ReadingsInCommit))
        {
            AppendResult result = await to.AppendAsync([new ReadingPack(window.Source, window.Window.Start, readings)], cancellationToken);
            accepted += result.Accepted;
            copy.Conflicts.AddRange(result.Conflicts);
        }

        copy.Readings += accepted;
        return accepted;
    }

    private static IEnumerable<Reading> Readings(ReadingSeries series)
    {
        for (int i = 0; i < series.Count; i++)
        {
            yield return new Reading(series.Channel, new Instant(series.TimeMicroseconds.Span[i]), series.Values.Span[i], series.Qualities.Span[i]);
        }
    }

    private static string Identity(QuarantinedMessage message) =>
        $"{message.Topic}\n{string.Join(',', message.Findings.Select(one => one.Code))}\n{Convert.ToHexString(SHA256.HashData(message.Payload.Span))}";
}
