using System.Security.Cryptography;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Tests.Records.Contract;

namespace LabWatch.Tests.Evidence;

/// <summary>A store that has seals and nothing else.</summary>
internal sealed class SealsOnly : IReadingStore
{
    private readonly List<SealedHour> _seals = [];

    public IReadOnlyList<SealedHour> Seals => _seals;

    public void Seal(SourceKey source, int hour, int part)
    {
        Instant start = Sample.Noon + TimeSpan.FromHours(hour);
        byte[] digest = SHA256.HashData(BitConverter.GetBytes(_seals.Count + (1000L * hour)));
        _seals.Add(new SealedHour(_seals.Count + 1, source, start, part, 60, digest, start + TimeSpan.FromMinutes(62), 10 + _seals.Count));
    }

    public ValueTask<IReadOnlyList<SealedHour>> SealedHoursAsync(long afterSeal, int count, CancellationToken cancellationToken) =>
        ValueTask.FromResult<IReadOnlyList<SealedHour>>([.. _seals.Where(seal => seal.Seal > afterSeal).Take(count)]);

    public ValueTask<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken) =>
        throw new NotSupportedException();

    public ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken) =>
        throw new NotSupportedException();

    public ValueTask<IReadOnlyList<Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<ChangedHours> ChangesAsync(long afterChange, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask DisposeAsync() => ValueTask.CompletedTask;
}
