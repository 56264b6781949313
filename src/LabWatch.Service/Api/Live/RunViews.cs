using System.Globalization;
using LabWatch.Lab.Runs;
using LabWatch.Records.Runs;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Live;

/// <summary>Calibration runs as the API shows them.</summary>
internal static class RunViews
{
    /// <summary>A run with its steps.</summary>
    public static RunView Of(RecordedRun recorded) => new(
        recorded.Run.Id,
        recorded.Run.Source.ToString(),
        recorded.Run.JobNumber,
        recorded.Run.Item,
        recorded.Run.SetPointCelsius,
        recorded.Run.Band,
        recorded.Run.Note,
        recorded.Run.StartedAt,
        recorded.Run.StartedBy,
        recorded.Run.EndedAt,
        recorded.Run.EndedBy,
        recorded.Run.OverrideReason,
        recorded.Run.ReadinessAtStart,
        recorded.Run.Cancelled,
        [.. recorded.Steps.Select((step, index) => new RunStepView(
            step.Number, step.At, step.By, step.What, step.Reason, step.What == RunStep.Corrected ? Changes(recorded.Steps[index - 1].After, step.After) : []))]);

    private static IReadOnlyList<RunChangeView> Changes(CalibrationRun before, CalibrationRun after) =>
    [
        .. Changed("jobNumber", before.JobNumber, after.JobNumber),
        .. Changed("item", before.Item, after.Item),
        .. Changed("setPointCelsius", Text(before.SetPointCelsius), Text(after.SetPointCelsius)),
        .. Changed("band", before.Band, after.Band),
        .. Changed("note", before.Note, after.Note),
    ];

    private static IEnumerable<RunChangeView> Changed(string member, string? before, string? after) =>
        string.Equals(before, after, StringComparison.Ordinal) ? [] : [new RunChangeView(member, before, after)];

    private static string Text(double value) => value.ToString("R", CultureInfo.InvariantCulture);
}
