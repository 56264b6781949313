using System.ComponentModel;

namespace LabWatch.Service.Api.Runs;

/// <summary>A calibration begins.</summary>
internal sealed record StartRunRequest(
    [property: Description("Key of the source, site.source.")] string? Source,
    [property: Description("Number of the job, 1 to 60 characters.")] string? JobNumber,
    [property: Description("What is calibrated: kind and serial number, 1 to 200 characters.")] string? Item,
    [property: Description("Set point used, degree Celsius, within the source's range.")] double? SetPointCelsius,
    [property: Description("Id of a working band of the source; may be missing.")] string? Band,
    [property: Description("At most 1,000 characters; may be missing.")] string? Note,
    [property: Description("Why the source is used although it is not ready, at most 500 characters; missing where it is ready.")] string? OverrideReason,
    [property: Description("Id that the client drew (UUID): sending it again adds nothing. A key in the header Idempotency-Key does the same.")] Guid? Id);
