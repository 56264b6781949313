using LabWatch.Lab.Assessments;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Records.Assessments;

namespace LabWatch.Tests.Records.Contract;

/// <summary>What every engine's assessment ledger does.</summary>
public abstract class AssessmentLedgerContract : IAsyncLifetime
{
    private protected abstract ValueTask<IRecordsUnderTest> OpenAsync();

    private IRecordsUnderTest _records = null!;

    private IAssessmentLedger Ledger => _records.Assessments;

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    public async ValueTask InitializeAsync() => _records = await OpenAsync();

    public async ValueTask DisposeAsync()
    {
        await _records.DisposeAsync();
        GC.SuppressFinalize(this);
    }

    [Fact]
    public async Task An_assessment_comes_back_as_it_was_written()
    {
        Assessment written = Sample.Assessment(Sample.Fir, 0);
        await Ledger.RecordAsync(written, Token);
        AssertSame(written, await Ledger.FindAsync(written.Id, Token));
        AssertSame(written, await Ledger.FindAsync(Sample.Fir, "stability", "", Sample.Window(0), Token));
    }

    [Fact]
    public async Task Values_that_are_not_numbers_come_back()
    {
        Assessment written = Sample.Assessment(Sample.Fir, 0) with
        {
            Value = Estimate.None,
            CoverageFactor = double.NaN,
            Decision = Decision.NotDecided,
            ConformityProbability = null,
            Limit = null,
        };
        await Ledger.RecordAsync(written, Token);
        AssertSame(written, await Ledger.FindAsync(written.Id, Token));
    }

    [Fact]
    public async Task Recording_the_same_id_again_changes_nothing()
    {
        Assessment first = Sample.Assessment(Sample.Fir, 0);
        await Ledger.RecordAsync(first, Token);
        await Ledger.RecordAsync(first with { Explanation = "another" }, Token);
        AssertSame(first, await Ledger.FindAsync(first.Id, Token));
        Assert.Single(await Ledger.QueuedAsync(0, 10, Token));
    }

    [Fact]
    public async Task The_same_id_twice_in_one_call_is_recorded_once()
    {
        Assessment first = Sample.Assessment(Sample.Fir, 0);
        await Ledger.RecordAsync([first, first], Token);
        Assert.Single(await Ledger.QueuedAsync(0, 10, Token));
    }

    [Fact]
    public async Task Recording_moves_the_watermark_forward_and_never_back()
    {
        Assert.Null(await Ledger.WatermarkAsync(Sample.Fir, "stability", Token));
        await Ledger.RecordAsync(Sample.Assessment(Sample.Fir, 3), Token);
        await Ledger.RecordAsync(Sample.Assessment(Sample.Fir, 1), Token);
        Assert.Equal(Sample.Window(3).End, await Ledger.WatermarkAsync(Sample.Fir, "stability", Token));
        Assert.Null(await Ledger.WatermarkAsync(Sample.Yew, "stability", Token));
        Assert.Null(await Ledger.WatermarkAsync(Sample.Fir, "purge", Token));
    }

    [Fact]
    public async Task A_watermark_moves_without_an_assessment_but_only_forward()
    {
        await Ledger.MoveWatermarkAsync(Sample.Fir, "stability", Sample.Window(5).End, Token);
        await Ledger.MoveWatermarkAsync(Sample.Fir, "stability", Sample.Window(2).End, Token);
        Assert.Equal(Sample.Window(5).End, await Ledger.WatermarkAsync(Sample.Fir, "stability", Token));
    }

    [Fact]
    public async Task The_highest_revision_answers_and_the_lower_one_stays()
    {
        Assessment first = Sample.Assessment(Sample.Fir, 0);
        Assessment second = Sample.Assessment(Sample.Fir, 0, revision: 2);
        await Ledger.RecordAsync(first, Token);
        await Ledger.RecordAsync(second, Token);
        AssertSame(second, await Ledger.FindAsync(Sample.Fir, "stability", "", Sample.Window(0), Token));
        AssertSame(first, await Ledger.FindAsync(first.Id, Token));
        AssertSame(second, Assert.Single((await Ledger.ListAsync(new(null, null, null, null, 10), Token)).Items));
        AssertSame(second, Assert.Single(await Ledger.LatestAsync(Token)));
    }

    [Fact]
    public async Task Latest_is_the_newest_window_of_each_source_criterion_and_scope()
    {
        await Ledger.RecordAsync(
            [
                Sample.Assessment(Sample.Fir, 1), Sample.Assessment(Sample.Fir, 0), Sample.Assessment(Sample.Fir, 0, revision: 2),
                Sample.Assessment(Sample.Yew, 0), Sample.Assessment(Sample.Fir, 0, criterion: "purge"), Sample.Assessment(Sample.Fir, 0, scope: "b-8-14"),
            ],
            Token);
        IReadOnlyList<Assessment> latest = await Ledger.LatestAsync(Token);
        Assert.Equal(
            [("fir", "purge", "", 0, 1), ("fir", "stability", "", 1, 1), ("fir", "stability", "b-8-14", 0, 1), ("yew", "stability", "", 0, 1)],
            latest.Select(item => (item.Source.Source, item.Criterion, item.Scope, IndexOf(item), item.Revision)));
    }

    [Fact]
    public async Task Pages_follow_each_other_newest_window_first_without_gap_or_repeat()
    {
        await Ledger.RecordAsync([.. Enumerable.Range(0, 7).Select(index => Sample.Assessment(Sample.Fir, index / 2, scope: $"s{index}"))], Token);
        List<string> scopes = [];
        string? after = null;
        do
        {
            AssessmentPage page = await Ledger.ListAsync(new(Sample.Fir, "stability", null, after, 3), Token);
            scopes.AddRange(page.Items.Select(item => item.Scope));
            after = page.Next;
        }
        while (after is not null);
        Assert.Equal(["s6", "s5", "s4", "s3", "s2", "s1", "s0"], scopes);
    }

    [Fact]
    public async Task A_list_is_narrowed_by_source_criterion_and_end_of_window()
    {
        await Ledger.RecordAsync(
            [
                Sample.Assessment(Sample.Fir, 0), Sample.Assessment(Sample.Fir, 1), Sample.Assessment(Sample.Fir, 2), Sample.Assessment(Sample.Yew, 1),
                Sample.Assessment(Sample.Fir, 1, criterion: "purge"),
            ],
            Token);
        TimeWindow span = new(Sample.Window(1).End, Sample.Window(2).End);
        AssessmentPage page = await Ledger.ListAsync(new(Sample.Fir, "stability", span, null, 10), Token);
        Assert.Equal(Sample.Window(1), Assert.Single(page.Items).Window);
    }

    [Fact]
    public async Task A_cursor_that_is_none_is_refused() =>
        await Assert.ThrowsAsync<ArgumentException>(async () => await Ledger.ListAsync(new(null, null, null, "page 2", 10), Token));

    [Fact]
    public async Task The_queue_gives_every_revision_once_in_the_order_of_recording()
    {
        await Ledger.RecordAsync([Sample.Assessment(Sample.Fir, 1), Sample.Assessment(Sample.Yew, 0)], Token);
        await Ledger.RecordAsync(Sample.Assessment(Sample.Fir, 1, revision: 2), Token);
        IReadOnlyList<(long Sequence, Assessment Assessment)> all = await Ledger.QueuedAsync(0, 10, Token);
        Assert.Equal([1L, 2L, 3L], all.Select(item => item.Sequence));
        Assert.Equal([1, 1, 2], all.Select(item => item.Assessment.Revision));
        Assert.Equal(2L, Assert.Single(await Ledger.QueuedAsync(1, 1, Token)).Sequence);
        Assert.Empty(await Ledger.QueuedAsync(3, 10, Token));
    }

    [Fact]
    public async Task Parallel_writers_lose_nothing_and_number_without_gaps()
    {
        await Parallel.ForAsync(0, 40, Token, async (index, token) => await Ledger.RecordAsync(Sample.Assessment(Sample.Fir, index), token));
        Assert.Equal(Enumerable.Range(1, 40).Select(number => (long)number), (await Ledger.QueuedAsync(0, 100, Token)).Select(item => item.Sequence));
        Assert.Equal(Sample.Window(39).End, await Ledger.WatermarkAsync(Sample.Fir, "stability", Token));
    }

    private static int IndexOf(Assessment assessment) => (int)((assessment.Window.Start - Sample.Noon) / TimeSpan.FromMinutes(30));

    private static void AssertSame(Assessment expected, Assessment? actual)
    {
        Assert.NotNull(actual);
        Assert.Equal(expected.Figures, actual.Figures);
        Assert.Equal(expected.Provenance.Hours, actual.Provenance.Hours);
        Assert.Equal(expected.Provenance.Certificates, actual.Provenance.Certificates);
        Provenance provenance = actual.Provenance with { Hours = expected.Provenance.Hours, Certificates = expected.Provenance.Certificates };
        Assert.Equal(expected, actual with { Figures = expected.Figures, Provenance = provenance });
    }
}
