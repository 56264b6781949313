using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Assessments;

/// <summary>The assessments in the records database.</summary>
internal sealed class AssessmentLedger(RecordsDatabase database) : IAssessmentLedger
{
    public async ValueTask RecordAsync(IReadOnlyList<Assessment> assessments, CancellationToken cancellationToken) =>
        await database.WriteAsync(context => AssessmentWriting.AddAsync(context, assessments, cancellationToken), cancellationToken);

    public async ValueTask MoveWatermarkAsync(SourceKey source, string criterion, Instant windowEnd, CancellationToken cancellationToken) =>
        await database.WriteAsync(
            async context =>
            {
                await AssessmentWriting.MoveWatermarkAsync(context, source, criterion, windowEnd, cancellationToken);
                return 0;
            },
            cancellationToken);

    public async ValueTask<Instant?> WatermarkAsync(SourceKey source, string criterion, CancellationToken cancellationToken)
    {
        long? end = await database.ReadAsync(
            context => context.Watermarks
                .Where(row => row.Site == source.Site && row.Source == source.Source && row.Criterion == criterion)
                .Select(row => (long?)row.WindowEnd)
                .FirstOrDefaultAsync(cancellationToken),
            cancellationToken);
        return end is { } value ? new Instant(value) : null;
    }

    public ValueTask<Assessment?> FindAsync(
        SourceKey source, string criterion, string scope, TimeWindow window, CancellationToken cancellationToken) =>
        FirstAsync(
            context => context.Assessments
                .Where(row => row.Site == source.Site && row.Source == source.Source && row.Criterion == criterion
                    && row.WindowEnd == window.End.Microseconds && row.WindowStart == window.Start.Microseconds && row.Scope == scope)
                .OrderByDescending(row => row.Revision),
            cancellationToken);

    public ValueTask<Assessment?> FindAsync(string id, CancellationToken cancellationToken) =>
        FirstAsync(context => context.Assessments.Where(row => row.Id == id), cancellationToken);

    public async ValueTask<IReadOnlyList<Assessment>> LatestAsync(CancellationToken cancellationToken)
    {
        List<AssessmentRow> rows = await database.ReadAsync(
            context => context.AssessmentHeads
                .Join(context.Assessments, head => head.AssessmentId, row => row.Id, (head, row) => row)
                .OrderBy(row => row.Site).ThenBy(row => row.Source).ThenBy(row => row.Criterion).ThenBy(row => row.Scope)
                .ToListAsync(cancellationToken),
            cancellationToken);
        return rows.ConvertAll(AssessmentMapping.ToAssessment);
    }

    public async ValueTask<AssessmentPage> ListAsync(AssessmentQuery query, CancellationToken cancellationToken)
    {
        PageCursor? after = PageCursor.Of(query.After);
        List<AssessmentRow> rows = await database.ReadAsync(
            context => Matching(context, query, after).Take(query.Count + 1).ToListAsync(cancellationToken),
            cancellationToken);
        bool more = rows.Count > query.Count;
        AssessmentRow? last = more ? rows[query.Count - 1] : null;
        return new AssessmentPage(
            [.. rows.Take(query.Count).Select(AssessmentMapping.ToAssessment)],
            last is null ? null : new PageCursor(last.WindowEnd, last.Sequence).ToString());
    }

    public async ValueTask<IReadOnlyList<(long Sequence, Assessment Assessment)>> QueuedAsync(
        long afterSequence, int count, CancellationToken cancellationToken)
    {
        List<AssessmentRow> rows = await database.ReadAsync(
            context => context.Assessments.Where(row => row.Sequence > afterSequence).OrderBy(row => row.Sequence).Take(count).ToListAsync(cancellationToken),
            cancellationToken);
        return rows.ConvertAll(row => (row.Sequence, AssessmentMapping.ToAssessment(row)));
    }

    private static IQueryable<AssessmentRow> Matching(RecordsContext context, AssessmentQuery query, PageCursor? after)
    {
        IQueryable<AssessmentRow> rows = context.Assessments.Where(row => !context.Assessments.Any(later =>
            later.Site == row.Site && later.Source == row.Source && later.Criterion == row.Criterion && later.WindowEnd == row.WindowEnd
            && later.WindowStart == row.WindowStart && later.Scope == row.Scope && later.Revision > row.Revision));
        if (query.Source is { } source)
        {
            rows = rows.Where(row => row.Site == source.Site && row.Source == source.Source);
        }

        if (query.Criterion is { } criterion)
        {
            rows = rows.Where(row => row.Criterion == criterion);
        }

        if (query.Window is { } span)
        {
            rows = rows.Where(row => row.WindowEnd >= span.Start.Microseconds && row.WindowEnd < span.End.Microseconds);
        }

        if (after is { } cursor)
        {
            rows = rows.Where(row => row.WindowEnd < cursor.Time || (row.WindowEnd == cursor.Time && row.Sequence < cursor.Number));
        }

        return rows.OrderByDescending(row => row.WindowEnd).ThenByDescending(row => row.Sequence);
    }

    private async ValueTask<Assessment?> FirstAsync(
        Func<RecordsContext, IQueryable<AssessmentRow>> rows, CancellationToken cancellationToken)
    {
        AssessmentRow? row = await database.ReadAsync(context => rows(context).FirstOrDefaultAsync(cancellationToken), cancellationToken);
        return row is null ? null : AssessmentMapping.ToAssessment(row);
    }
}
