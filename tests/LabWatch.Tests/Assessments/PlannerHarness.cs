using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Planning;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Tests.Records;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Assessments;

/// <summary>A planner on readings in memory, records in an SQLite file, and a clock that the test moves. Starts at 13:00 UTC.</summary>
internal sealed class PlannerHarness : IAsyncDisposable
{
    private readonly SqliteRecords _records;
    private readonly List<Planner> _planners = [];
    private readonly IReadOnlyList<ICriterion> _criteria;

    private PlannerHarness(SqliteRecords records, LabSnapshot? lab, IReadOnlyList<ICriterion>? criteria)
    {
        _records = records;
        _criteria = criteria ?? [new StabilityCriterion(StabilityCriterion.DefaultSchedule)];
        Snapshots = new FakeSnapshots(lab ?? TestLab.Snapshot());
        Ledger = new FaultyLedger(_records.Assessments, _records.Alerts);
        Restart();
    }

    public static async Task<PlannerHarness> NewAsync(LabSnapshot? lab = null, IReadOnlyList<ICriterion>? criteria = null) =>
        new(await SqliteRecords.CopyAsync(), lab, criteria);

    public static Instant Start { get; } = TestLab.Noon + TimeSpan.FromHours(1);

    public SteppingClock Clock { get; } = new(Start);

    public FakeReadingStore Store { get; } = new();

    public FakeSnapshots Snapshots { get; }

    public FaultyLedger Ledger { get; private set; }

    public PlannerState State { get; private set; } = null!;

    public Planner Planner { get; private set; } = null!;

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    /// <summary>Forgets all that is only in memory, as a crash does.</summary>
    public Planner Restart()
    {
        Ledger.At = _ => { };
        Store.Before = _ => { };
        State = new PlannerState(Clock);
        Planner = new Planner(
            Store, Ledger, Ledger, Snapshots, _criteria, new AssessmentsOptions { ProgramVersion = "test" }, State, Clock,
            NullLogger<Planner>.Instance);
        _planners.Add(Planner);
        return Planner;
    }

    public void Add(IEnumerable<Reading> readings) => Store.Add(TestLab.Rowan, readings);

    /// <summary>Runs until there is nothing more to do at once.</summary>
    public async Task RunAsync()
    {
        while (await Planner.RunAsync(Token))
        {
        }
    }

    /// <summary>Lets hours become quiet and runs.</summary>
    public async Task RunQuietAsync()
    {
        await RunAsync();
        Clock.Advance(TimeSpan.FromSeconds(61));
        await RunAsync();
    }

    /// <summary>Everything recorded, all revisions, in the order of recording.</summary>
    public async Task<IReadOnlyList<Assessment>> RecordedAsync() =>
        [.. (await _records.Assessments.QueuedAsync(0, 100_000, Token)).Select(item => item.Assessment)];

    public async ValueTask<Instant?> WatermarkAsync() => await _records.Assessments.WatermarkAsync(TestLab.Rowan, "stability", Token);

    public async ValueTask DisposeAsync()
    {
        _planners.ForEach(planner => planner.Dispose());
        await _records.DisposeAsync();
    }
}
