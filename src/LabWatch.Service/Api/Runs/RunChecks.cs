using System.Globalization;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Runs;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Records.Runs;
using LabWatch.Service.Api.Requests;

namespace LabWatch.Service.Api.Runs;

/// <summary>Turns requests about runs into what is recorded, or into findings.</summary>
internal static class RunChecks
{
    private const int LongestJobNumber = 60;
    private const int LongestItem = 200;
    private const int LongestNote = 1_000;
    private const int LongestReason = 500;
    private const int LongestKey = 200;

    /// <summary>The run of a start; its readiness is not known yet. Null where there are findings.</summary>
    public static CalibrationRun? Start(StartRunRequest request, LabSnapshot lab, string by, Instant now, BodyChecks checks)
    {
        ReferenceSource? source = SourceKey.TryParse(request.Source, out SourceKey key) ? lab.FindSource(key) : null;
        if (source is null)
        {
            checks.Add("unknown-reference", "source", "This source does not exist.", request.Source, "Give its key, site.source; GET /api/v1/sources lists them.");
        }

        if (request.SetPointCelsius is null)
        {
            checks.Add("missing", "setPointCelsius", "The set point is missing.", null, "Give it in degree Celsius.");
        }

        CalibrationRun run = new(
            request.Id ?? Guid.CreateVersion7(now.ToDateTimeOffset()),
            key,
            checks.Line("jobNumber", request.JobNumber, LongestJobNumber),
            checks.Line("item", request.Item, LongestItem),
            SetPoint(request.SetPointCelsius, source, checks) ?? double.NaN,
            now,
            by,
            "unknown")
        {
            Band = Band(request.Band, source, checks),
            Note = checks.OptionalText("note", request.Note, LongestNote),
            OverrideReason = checks.OptionalLine("overrideReason", request.OverrideReason, LongestReason),
        };
        return checks.Findings.Count == 0 ? run : null;
    }

    /// <summary>The correction of a run; null where there are findings.</summary>
    public static RunCorrection? Correct(CorrectRunRequest request, CalibrationRun run, LabSnapshot lab, BodyChecks checks)
    {
        ReferenceSource? source = lab.SourceInForce(run.Source, run.StartedAt);
        RunCorrection correction = new(checks.Line("reason", request.Reason, LongestReason))
        {
            JobNumber = checks.OptionalLine("jobNumber", request.JobNumber, LongestJobNumber),
            Item = checks.OptionalLine("item", request.Item, LongestItem),
            SetPointCelsius = SetPoint(request.SetPointCelsius, source, checks),
            Band = Band(request.Band, source, checks),
            Note = checks.OptionalText("note", request.Note, LongestNote),
            Cancelled = request.Cancelled ?? false,
        };
        if (checks.Findings.Count == 0 && correction == new RunCorrection(correction.Reason))
        {
            checks.Add("nothing-to-correct", string.Empty, "The correction names nothing to correct.", null, "Give the members that were wrong, or \"cancelled\": true.");
        }

        return checks.Findings.Count == 0 ? correction : null;
    }

    /// <summary>The note at the end of a run.</summary>
    public static string? EndNote(EndRunRequest? request, BodyChecks checks) => checks.OptionalText("note", request?.Note, LongestNote);

    /// <summary>What the client named its request by; null where it named none.</summary>
    public static string? Key(HttpRequest http, BodyChecks checks)
    {
        string? key = http.Headers["Idempotency-Key"] is { Count: > 0 } values ? values.ToString() : null;
        if (key is not null && (key.Length is 0 or > LongestKey || key.Any(letter => letter is < '!' or > '~')))
        {
            checks.Add("bad-key", "Idempotency-Key", "The header Idempotency-Key is no key.", key, "Give 1 to 200 printable ASCII characters without spaces, for example a UUID.");
        }

        return key;
    }

    private static double? SetPoint(double? celsius, ReferenceSource? source, BodyChecks checks)
    {
        if (celsius is { } value && source is not null && !(value >= source.MinimumCelsius && value <= source.MaximumCelsius))
        {
            checks.Add(
                "out-of-range", "setPointCelsius", "The source is not used at this set point.", value.ToString("R", CultureInfo.InvariantCulture),
                string.Create(CultureInfo.InvariantCulture, $"Give {source.MinimumCelsius} to {source.MaximumCelsius} degC."));
        }

        return celsius;
    }

    private static string? Band(string? band, ReferenceSource? source, BodyChecks checks)
    {
        string? id = string.IsNullOrWhiteSpace(band) ? null : band.Trim();
        if (id is not null && source is not null && !source.Bands.Any(known => string.Equals(known.Id, id, StringComparison.Ordinal)))
        {
            checks.Add("unknown-reference", "band", "The source has no such working band.", id, "Use one of: " + string.Join(", ", source.Bands.Select(known => known.Id)) + ".");
        }

        return id;
    }
}
