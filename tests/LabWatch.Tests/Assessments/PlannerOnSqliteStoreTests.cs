using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Planning;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Readings;
using LabWatch.Tests.Records;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Assessments;

/// <summary>Planner, criterion, store and ledger as the service joins them, on real files.</summary>
public sealed class PlannerOnSqliteStoreTests
{
    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task Readings_become_assessments_and_late_ones_supersede_also_after_the_hours_were_sealed_and_all_was_restarted()
    {
        Instant start = TestLab.Noon;
        SteppingClock clock = new(start + TimeSpan.FromHours(3) + TimeSpan.FromMinutes(1));
        await using SqliteRecords records = await SqliteRecords.CopyAsync();
        Reading late = new(TestLab.Well, start + TimeSpan.FromMinutes(65), 300.3);
        await using (SqliteReadingStore store = Store(records.Directory, clock))
        {
            await AppendAsync(store, clock, TestLab.Run(start, start + TimeSpan.FromHours(3)).Where(reading => reading.Time != late.Time));
            await RunQuietAsync(store, records, clock);
            await store.SealEverythingAsync(Token);
        }

        IReadOnlyList<Assessment> first = await RecordedAsync(records);
        Assert.Equal(18, first.Count(item => item.Revision == 1));
        Assert.All(first.Where(item => item.Window.Start >= start + TimeSpan.FromMinutes(30) && item.Window.End <= start + TimeSpan.FromHours(3)),
            item => Assert.Equal(Decision.Pass, item.Decision));

        await using (SqliteReadingStore store = Store(records.Directory, clock))
        {
            await AppendAsync(store, clock, [late]);
            await RunQuietAsync(store, records, clock);
        }

        Assessment[] superseding = [.. (await RecordedAsync(records)).Skip(first.Count)];
        Assert.Equal(6, superseding.Length);
        Assert.All(superseding, item => Assert.StartsWith("Readings came in later, in the hour of 2026-12-01T13:00:00Z", item.SupersedeReason, StringComparison.Ordinal));
    }

    private static SqliteReadingStore Store(string directory, SteppingClock clock) =>
        new(new ReadingsOptions { DataDirectory = directory }, clock, NullLogger<SqliteReadingStore>.Instance);

    private static async Task AppendAsync(SqliteReadingStore store, SteppingClock clock, IEnumerable<Reading> readings) =>
        await store.AppendAsync([.. readings.Chunk(500).Select(chunk => new ReadingPack(TestLab.Rowan, Instant.Now(clock), chunk))], Token);

    private static async Task RunQuietAsync(SqliteReadingStore store, SqliteRecords records, SteppingClock clock)
    {
        using Planner planner = new(
            store, records.Assessments, records.Alerts, new FakeSnapshots(TestLab.Snapshot()), [new StabilityCriterion(StabilityCriterion.DefaultSchedule)],
            new AssessmentsOptions { ProgramVersion = "test" }, new PlannerState(clock), clock, NullLogger<Planner>.Instance);
        for (int round = 0; round < 2; round++)
        {
            while (await planner.RunAsync(Token))
            {
            }

            clock.Advance(TimeSpan.FromSeconds(61));
        }
    }

    private static async Task<IReadOnlyList<Assessment>> RecordedAsync(SqliteRecords records) =>
        [.. (await records.Assessments.QueuedAsync(0, 1000, Token)).Select(item => item.Assessment)];
}
