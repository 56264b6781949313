using System.Text.Json.Nodes;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Audit;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Assessments;

/// <summary>What belongs to recording assessments, inside the caller's transaction.</summary>
internal static class AssessmentWriting
{
    /// <summary>Adds those that are not there yet, in order, with their queue numbers; moves heads and watermarks. The number added.</summary>
    public static async Task<int> AddAsync(RecordsContext context, IReadOnlyList<Assessment> assessments, CancellationToken cancellationToken)
    {
        string[] ids = [.. assessments.Select(assessment => assessment.Id)];
        HashSet<string> seen = [.. await context.Assessments.Where(row => ids.Contains(row.Id)).Select(row => row.Id).ToListAsync(cancellationToken)];
        long sequence = await context.Assessments.MaxAsync(row => (long?)row.Sequence, cancellationToken) ?? 0;
        await LoadSeriesAsync(context, assessments, cancellationToken);
        int added = 0;
        foreach (Assessment assessment in assessments)
        {
            if (seen.Add(assessment.Id))
            {
                added++;
                AssessmentRow row = AssessmentMapping.ToRow(assessment, sequence + added);
                context.Assessments.Add(row);
                await AuditChain.CoverAsync(context, row, NoteOf(row), cancellationToken);
                await MoveHeadAsync(context, row, cancellationToken);
                await MoveWatermarkAsync(context, assessment.Source, assessment.Criterion, assessment.Window.End, cancellationToken);
            }
        }

        return added;
    }

    /// <summary>Moves a watermark forward, never back.</summary>
    public static async Task MoveWatermarkAsync(
        RecordsContext context, SourceKey source, string criterion, Instant end, CancellationToken cancellationToken)
    {
        WatermarkRow? row = await context.Watermarks.FindAsync([source.Site, source.Source, criterion], cancellationToken);
        if (row is null)
        {
            context.Watermarks.Add(
                new WatermarkRow { Site = source.Site, Source = source.Source, Criterion = criterion, WindowEnd = end.Microseconds });
        }
        else if (row.WindowEnd < end.Microseconds)
        {
            row.WindowEnd = end.Microseconds;
        }
    }

    /// <summary>Reads heads and watermarks of the sources at once, so that moving them finds them in the context.</summary>
    private static async Task LoadSeriesAsync(RecordsContext context, IReadOnlyList<Assessment> assessments, CancellationToken cancellationToken)
    {
        foreach (SourceKey source in assessments.Select(assessment => assessment.Source).Distinct())
        {
            await context.AssessmentHeads.Where(row => row.Site == source.Site && row.Source == source.Source).LoadAsync(cancellationToken);
            await context.Watermarks.Where(row => row.Site == source.Site && row.Source == source.Source).LoadAsync(cancellationToken);
        }
    }

    private static AuditNote NoteOf(AssessmentRow row) => new(
        row.Site,
        new Instant(row.ComputedAt),
        AuditActor.Service,
        AuditActions.AssessmentRecorded,
        string.Empty,
        new JsonObject
        {
            ["source"] = row.Source,
            ["criterion"] = row.Criterion,
            ["scope"] = row.Scope,
            ["windowStart"] = new Instant(row.WindowStart).ToString(),
            ["windowEnd"] = new Instant(row.WindowEnd).ToString(),
            ["revision"] = row.Revision,
            ["decision"] = row.Decision,
        },
        null);

    private static async Task MoveHeadAsync(RecordsContext context, AssessmentRow row, CancellationToken cancellationToken)
    {
        AssessmentHeadRow? head = await context.AssessmentHeads.FindAsync([row.Site, row.Source, row.Criterion, row.Scope], cancellationToken);
        if (head is null)
        {
            head = new AssessmentHeadRow
            {
                Site = row.Site,
                Source = row.Source,
                Criterion = row.Criterion,
                Scope = row.Scope,
                AssessmentId = row.Id,
                WindowEnd = long.MinValue,
            };
            context.AssessmentHeads.Add(head);
        }

        if ((row.WindowEnd, row.Revision).CompareTo((head.WindowEnd, head.Revision)) >= 0)
        {
            (head.WindowEnd, head.Revision, head.AssessmentId) = (row.WindowEnd, row.Revision, row.Id);
        }
    }
}
