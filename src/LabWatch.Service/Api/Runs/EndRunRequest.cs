using System.ComponentModel;

namespace LabWatch.Service.Api.Runs;

/// <summary>A calibration ends.</summary>
internal sealed record EndRunRequest(
    [property: Description("Replaces the note, at most 1,000 characters; missing to keep it.")] string? Note);
