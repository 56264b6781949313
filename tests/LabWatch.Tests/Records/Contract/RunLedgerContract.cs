using LabWatch.Lab.Identity;
using LabWatch.Lab.Runs;
using LabWatch.Records.Audit;
using LabWatch.Records.Runs;

namespace LabWatch.Tests.Records.Contract;

/// <summary>What every engine's ledger of calibration runs does.</summary>
public abstract class RunLedgerContract : IAsyncLifetime
{
    private static readonly TimeSpan Hour = TimeSpan.FromHours(1);

    private protected abstract ValueTask<IRecordsUnderTest> OpenAsync();

    private IRecordsUnderTest _records = null!;

    private IRunLedger Ledger => _records.Runs;

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    public async ValueTask InitializeAsync() => _records = await OpenAsync();

    public async ValueTask DisposeAsync()
    {
        await _records.DisposeAsync();
        GC.SuppressFinalize(this);
    }

    [Fact]
    public async Task A_run_is_what_its_steps_come_to_and_every_step_stays()
    {
        CalibrationRun run = Run(Sample.Fir);
        Assert.True((await Ledger.StartAsync(run, null, Token)).IsNew);
        await Ledger.CorrectAsync(run.Id, Sample.Noon + Hour, "kim", new RunCorrection("Wrong label") { JobNumber = "J-2", SetPointCelsius = 50 }, Token);
        RunOutcome ended = await Ledger.EndAsync(run.Id, Sample.Noon + Hour + Hour, "lee", "Done", Token);
        RecordedRun read = (await Ledger.FindAsync(run.Id, Token))!;
        Assert.Equal(ended.Run!.Run, read.Run);
        Assert.Equal(run with { JobNumber = "J-2", SetPointCelsius = 50, EndedAt = Sample.Noon + Hour + Hour, EndedBy = "lee", Note = "Done" }, read.Run);
        Assert.Equal(["1 kim started Check only", "2 kim corrected Wrong label", "3 lee ended"], read.Steps.Select(step => $"{step.Number} {step.By} {step.What} {step.Reason}".Trim()));
        Assert.Equal(run, read.Steps[0].After);
        Assert.Empty(await Ledger.OpenAsync(Token));
    }

    [Fact]
    public async Task One_run_is_open_on_a_source_at_a_time()
    {
        CalibrationRun first = Run(Sample.Fir);
        await Ledger.StartAsync(first, null, Token);
        RunOutcome second = await Ledger.StartAsync(Run(Sample.Fir, "J-9"), null, Token);
        Assert.Equal((RunProblem.SourceInUse, first.Id), (second.Problem, second.Run!.Run.Id));
        Assert.True((await Ledger.StartAsync(Run(Sample.Fir with { Source = "yew" }), null, Token)).IsNew);
        Assert.Equal(2, (await Ledger.OpenAsync(Token)).Count);
        await Ledger.EndAsync(first.Id, Sample.Noon + Hour, "kim", null, Token);
        Assert.True((await Ledger.StartAsync(Run(Sample.Fir, "J-9"), null, Token)).IsNew);
    }

    [Fact]
    public async Task The_same_start_again_adds_nothing_by_its_id_or_its_key()
    {
        CalibrationRun run = Run(Sample.Fir);
        await Ledger.StartAsync(run, "key-1", Token);
        RunOutcome byId = await Ledger.StartAsync(run with { StartedAt = Sample.Noon + Hour }, null, Token);
        RunOutcome byKey = await Ledger.StartAsync(run with { Id = Guid.CreateVersion7() }, "key-1", Token);
        Assert.Equal([(RunProblem.None, run.Id, false), (RunProblem.None, run.Id, false)], new[] { byId, byKey }.Select(outcome => (outcome.Problem, outcome.Run!.Run.Id, outcome.IsNew)));
        Assert.Equal(RunProblem.KeyReused, (await Ledger.StartAsync(Run(Sample.Fir, "J-9"), "key-1", Token)).Problem);
        Assert.Equal(run.Id, (await Ledger.AnsweredAsync(run, "key-1", Token))!.Run!.Run.Id);
        Assert.Null(await Ledger.AnsweredAsync(Run(Sample.Fir), "key-2", Token));
        Assert.Single((await Ledger.FindAsync(run.Id, Token))!.Steps);
        Assert.Equal(RunProblem.SourceInUse, (await Ledger.StartAsync(Run(Sample.Fir) with { StartedBy = "lee" }, "key-1", Token)).Problem);
    }

    [Fact]
    public async Task A_run_ends_once_and_a_cancelled_one_takes_no_more_steps()
    {
        CalibrationRun run = Run(Sample.Fir);
        await Ledger.StartAsync(run, null, Token);
        await Ledger.EndAsync(run.Id, Sample.Noon + Hour, "kim", null, Token);
        Assert.Equal((RunProblem.None, false), Short(await Ledger.EndAsync(run.Id, Sample.Noon + Hour, "kim", null, Token)));
        Assert.Equal((RunProblem.EndedAlready, false), Short(await Ledger.EndAsync(run.Id, Sample.Noon + Hour, "lee", null, Token)));
        Assert.Equal((RunProblem.None, true), Short(await Ledger.CorrectAsync(run.Id, Sample.Noon + Hour, "lee", new RunCorrection("Other job") { Cancelled = true }, Token)));
        Assert.Equal((RunProblem.None, false), Short(await Ledger.CorrectAsync(run.Id, Sample.Noon + Hour, "lee", new RunCorrection("Other job") { Cancelled = true }, Token)));
        Assert.Equal((RunProblem.Cancelled, false), Short(await Ledger.CorrectAsync(run.Id, Sample.Noon + Hour, "lee", new RunCorrection("More") { Item = "x" }, Token)));
        Assert.Equal((RunProblem.Cancelled, false), Short(await Ledger.EndAsync(run.Id, Sample.Noon + Hour, "kim", null, Token)));
        Assert.Equal((RunProblem.Missing, false), Short(await Ledger.EndAsync(Guid.CreateVersion7(), Sample.Noon, "kim", null, Token)));
        Assert.Equal(3, (await Ledger.FindAsync(run.Id, Token))!.Steps.Count);
    }

    [Fact]
    public async Task A_cancelled_run_frees_its_source()
    {
        CalibrationRun run = Run(Sample.Fir);
        await Ledger.StartAsync(run, null, Token);
        await Ledger.CorrectAsync(run.Id, Sample.Noon, "kim", new RunCorrection("Wrong source") { Cancelled = true }, Token);
        Assert.Empty(await Ledger.OpenAsync(Token));
        Assert.True((await Ledger.StartAsync(Run(Sample.Fir), null, Token)).IsNew);
    }

    [Fact]
    public async Task Pages_are_total_and_latest_start_first()
    {
        List<Guid> ids = [];
        for (int i = 0; i < 5; i++)
        {
            // Two and two begin in the same microsecond.
            CalibrationRun run = Run(Sample.Fir, $"J-{i}") with { StartedAt = Sample.Noon + TimeSpan.FromMinutes(i / 2) };
            await Ledger.StartAsync(run, null, Token);
            await Ledger.EndAsync(run.Id, Sample.Noon + Hour, "kim", null, Token);
            ids.Insert(0, run.Id);
        }

        List<Guid> read = [];
        string? after = null;
        do
        {
            RunPage page = await Ledger.ListAsync(new RunQuery(Sample.Fir, false, after, 2), Token);
            read.AddRange(page.Items.Select(item => item.Run.Id));
            after = page.Next;
        }
        while (after is not null);

        Assert.Equal(ids, read);
        Assert.Empty((await Ledger.ListAsync(new RunQuery(null, true, null, 10), Token)).Items);
        Assert.Empty((await Ledger.ListAsync(new RunQuery(Sample.Fir with { Source = "yew" }, false, null, 10), Token)).Items);
    }

    [Fact]
    public async Task Every_step_has_its_entry_in_the_trail()
    {
        CalibrationRun run = Run(Sample.Fir);
        await Ledger.StartAsync(run, null, Token);
        await Ledger.CorrectAsync(run.Id, Sample.Noon, "kim", new RunCorrection("Label") { Item = "x" }, Token);
        await Ledger.EndAsync(run.Id, Sample.Noon, "kim", null, Token);
        Assert.Equal(
            [$"run-started run/{run.Id}/1", $"run-corrected run/{run.Id}/2", $"run-ended run/{run.Id}/3"],
            (await _records.Audit.ListAsync(new AuditQuery(run.Source.Site, 10), Token)).Items.OrderBy(entry => entry.Sequence).Select(entry => $"{entry.Action} {entry.Subject}"));
    }

    private static (RunProblem Problem, bool IsNew) Short(RunOutcome outcome) => (outcome.Problem, outcome.IsNew);

    private static CalibrationRun Run(SourceKey source, string job = "J-1") =>
        new(Guid.CreateVersion7(), source, job, "Pyrometer 123", 37.1, Sample.Noon, "kim", "ready") { Band = "lw", OverrideReason = "Check only" };
}
