using System.ComponentModel;

namespace LabWatch.Service.Api.Runs;

/// <summary>What was recorded of a calibration was wrong. Members that are missing stay as they are.</summary>
internal sealed record CorrectRunRequest(
    [property: Description("Number of the job, 1 to 60 characters.")] string? JobNumber,
    [property: Description("What is calibrated, 1 to 200 characters.")] string? Item,
    [property: Description("Set point used, degree Celsius, within the source's range.")] double? SetPointCelsius,
    [property: Description("Id of a working band of the source.")] string? Band,
    [property: Description("At most 1,000 characters.")] string? Note,
    [property: Description("`true` calls the run off: it counts as never having used the source. It cannot be taken back.")] bool? Cancelled,
    [property: Description("Why, 1 to 500 characters.")] string? Reason);
