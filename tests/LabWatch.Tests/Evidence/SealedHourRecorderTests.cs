using LabWatch.Evidence.Recording;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Audit;
using LabWatch.Tests.Records;
using LabWatch.Tests.Records.Contract;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Evidence;

public sealed class SealedHourRecorderTests
{
    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task Each_sealed_part_is_entered_once_with_the_digest_of_its_bytes_also_over_restarts()
    {
        await using SqliteRecords records = await SqliteRecords.CopyAsync();
        SealsOnly store = new();
        store.Seal(Sample.Fir, 0, 0);
        store.Seal(Sample.Yew, 0, 0);
        Assert.Equal(2, await Recorder(records, store).RecordAsync(Token));
        store.Seal(Sample.Fir, 0, 1);
        SealedHourRecorder second = Recorder(records, store);
        Assert.Equal(1, await second.RecordAsync(Token));
        Assert.Equal(0, await second.RecordAsync(Token));
        Assert.Equal(0, await Recorder(records, store).RecordAsync(Token));

        IReadOnlyList<AuditEntry> entries = [.. (await records.Audit.ListAsync(new AuditQuery("hollin-vale", 10), Token)).Items.Reverse()];
        Assert.Equal(["hour/fir/2026-12-01T12:00:00Z/0", "hour/yew/2026-12-01T12:00:00Z/0", "hour/fir/2026-12-01T12:00:00Z/1"], entries.Select(entry => entry.Subject));
        Assert.Equal(store.Seals.Select(seal => Convert.ToHexStringLower(seal.Digest.Span)), entries.Select(entry => entry.RecordDigest));
        Assert.Equal(3, (long)entries[2].Content["seal"]!);
    }

    [Fact]
    public async Task A_failure_of_the_records_leaves_nothing_out()
    {
        await using SqliteRecords records = await SqliteRecords.CopyAsync();
        SealsOnly store = new();
        for (int hour = 0; hour < 450; hour++)
        {
            store.Seal(Sample.Fir, hour, 0);
        }

        FailingTrail trail = new(records.Audit) { FailAt = 2 };
        SealedHourRecorder recorder = new(store, trail, records.Positions, NullLogger<SealedHourRecorder>.Instance);
        await Assert.ThrowsAsync<RecordsUnavailableException>(() => recorder.RecordAsync(Token));
        await recorder.RecordAsync(Token);
        Assert.Equal(450, (await records.Audit.HeadAsync("hollin-vale", Token))!.Sequence);
    }

    [Fact]
    public async Task A_store_that_was_begun_anew_is_entered_from_its_first_seal()
    {
        await using SqliteRecords records = await SqliteRecords.CopyAsync();
        SealsOnly store = new();
        store.Seal(Sample.Fir, 0, 0);
        store.Seal(Sample.Fir, 1, 0);
        await Recorder(records, store).RecordAsync(Token);
        SealsOnly anew = new();
        anew.Seal(Sample.Fir, 5, 0);
        Assert.Equal(1, await Recorder(records, anew).RecordAsync(Token));
        anew.Seal(Sample.Fir, 6, 0);
        Assert.Equal(1, await Recorder(records, anew).RecordAsync(Token));
    }

    private static SealedHourRecorder Recorder(SqliteRecords records, IReadingStore store) =>
        new(store, records.Audit, records.Positions, NullLogger<SealedHourRecorder>.Instance);

    private sealed class FailingTrail(IAuditLedger inner) : IAuditLedger
    {
        private int _calls;

        public int FailAt { get; init; }

        public async ValueTask AppendAsync(IReadOnlyList<AuditNote> notes, (string Reader, long Position)? reader, CancellationToken cancellationToken)
        {
            await inner.AppendAsync(notes, reader, cancellationToken);
            if (++_calls == FailAt)
            {
                // The answer is lost after the commit: the caller cannot know that it was made.
                throw new RecordsUnavailableException("lost");
            }
        }

        public ValueTask<AuditPage> ListAsync(AuditQuery query, CancellationToken cancellationToken) => inner.ListAsync(query, cancellationToken);

        public ValueTask<AuditHead?> HeadAsync(string site, CancellationToken cancellationToken) => inner.HeadAsync(site, cancellationToken);
    }
}
