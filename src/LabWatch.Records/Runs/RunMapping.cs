using System.Text;
using System.Text.Json.Nodes;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Runs;
using LabWatch.Lab.Time;
using LabWatch.Records.Audit;
using LabWatch.Records.Storage.Rows;

namespace LabWatch.Records.Runs;

/// <summary>Runs and their steps as rows and back. The JSON belongs to the stored format: members are added, never renamed.</summary>
internal static class RunMapping
{
    public static RunStep ToStep(RunStepRow row) => new(row.Number, new Instant(row.At), row.By, row.What, row.Reason, ReadRun(row.RunId, row.Content));

    public static RunStepRow ToRow(RunStep step, string? requestKey) => new()
    {
        RunId = step.After.Id,
        Number = step.Number,
        Site = step.After.Source.Site,
        At = step.At.Microseconds,
        By = step.By,
        What = step.What,
        Reason = step.Reason,
        Content = Encoding.UTF8.GetString(CanonicalJson.Write(Write(step.After))),
        RequestKey = requestKey,
    };

    /// <summary>Brings the derived row to what a step left.</summary>
    public static void Apply(RunStep step, RunRow row)
    {
        CalibrationRun run = step.After;
        (row.JobNumber, row.Item, row.SetPointCelsius, row.Band, row.Note) = (run.JobNumber, run.Item, run.SetPointCelsius, run.Band, run.Note);
        (row.EndedAt, row.EndedBy) = (run.EndedAt?.Microseconds, run.EndedBy);
        row.CancelledAt = run.Cancelled ? row.CancelledAt ?? step.At.Microseconds : null;
        row.Step = step.Number;
    }

    public static RunRow NewRow(CalibrationRun run, long number) => new()
    {
        Id = run.Id,
        Site = run.Source.Site,
        Source = run.Source.Source,
        Number = number,
        JobNumber = run.JobNumber,
        Item = run.Item,
        StartedAt = run.StartedAt.Microseconds,
        StartedBy = run.StartedBy,
        OverrideReason = run.OverrideReason,
        ReadinessAtStart = run.ReadinessAtStart,
    };

    private static JsonObject Write(CalibrationRun run)
    {
        JsonObject content = new()
        {
            ["source"] = run.Source.ToString(),
            ["jobNumber"] = run.JobNumber,
            ["item"] = run.Item,
            ["setPointCelsius"] = run.SetPointCelsius,
            ["startedAt"] = run.StartedAt.ToString(),
            ["startedBy"] = run.StartedBy,
            ["readinessAtStart"] = run.ReadinessAtStart,
            ["cancelled"] = run.Cancelled,
        };
        Add(content, "band", run.Band);
        Add(content, "note", run.Note);
        Add(content, "endedAt", run.EndedAt?.ToString());
        Add(content, "endedBy", run.EndedBy);
        Add(content, "overrideReason", run.OverrideReason);
        return content;
    }

    private static CalibrationRun ReadRun(Guid id, string json)
    {
        JsonNode content = JsonNode.Parse(json)!;
        return new CalibrationRun(
            id,
            SourceKey.TryParse(Text(content, "source"), out SourceKey source) ? source : throw new InvalidDataException("A step of a run names no source."),
            Text(content, "jobNumber")!,
            Text(content, "item")!,
            content["setPointCelsius"]!.GetValue<double>(),
            Time(content, "startedAt") ?? default,
            Text(content, "startedBy")!,
            Text(content, "readinessAtStart")!)
        {
            Band = Text(content, "band"),
            Note = Text(content, "note"),
            EndedAt = Time(content, "endedAt"),
            EndedBy = Text(content, "endedBy"),
            OverrideReason = Text(content, "overrideReason"),
            Cancelled = content["cancelled"]!.GetValue<bool>(),
        };
    }

    private static void Add(JsonObject content, string name, string? value)
    {
        if (value is not null)
        {
            content[name] = value;
        }
    }

    private static string? Text(JsonNode content, string name) => content[name]?.GetValue<string>();

    private static Instant? Time(JsonNode content, string name) => Instant.TryParse(Text(content, name), out Instant instant) ? instant : null;
}
