using System.Text.Json.Serialization;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Lab.Alerts;

/// <summary>
/// One occurrence of an alert, from raised to normal. There is at most one that is not <see cref="AlertState.Normal"/> for each
/// (source, code, subject).
/// </summary>
/// <param name="Id">UUID version 7 made when it was raised.</param>
/// <param name="Source">The source it is about.</param>
/// <param name="Code">A <see cref="HazardCode"/> or the code of the criterion that is out of tolerance.</param>
/// <param name="Subject">Id of the channel, or scope of the assessment, that it is about; empty for the source as a whole.</param>
/// <param name="Priority">How soon to act.</param>
/// <param name="State">Where it is in its life.</param>
/// <param name="RaisedAt">When it was raised.</param>
/// <param name="Headline">What and where with value and limit, at most 160 characters.</param>
/// <param name="Detail">The same at length: since when, what to do, what not to do, cautions.</param>
/// <param name="Value">The value that raised it, latest while it stands; null where there is none.</param>
/// <param name="Limit">The limit that was crossed; null where there is none.</param>
/// <param name="Unit">Unit of value and limit; empty where there is none.</param>
public sealed record Alert(
    Guid Id,
    SourceKey Source,
    string Code,
    string Subject,
    AlertPriority Priority,
    AlertState State,
    Instant RaisedAt,
    string Headline,
    string Detail,
    double? Value,
    double? Limit,
    string Unit)
{
    /// <summary>When the condition went away; null while it stands.</summary>
    public Instant? ReturnedAt { get; init; }

    /// <summary>When somebody acknowledged it; null before.</summary>
    public Instant? AcknowledgedAt { get; init; }

    /// <summary>Who acknowledged it; null before.</summary>
    public string? AcknowledgedBy { get; init; }

    /// <summary>What the acknowledging person wrote; null where nothing.</summary>
    public string? AcknowledgeNote { get; init; }

    /// <summary>Why nobody is told of it for a while; null where people are told. It stays open until that has ended.</summary>
    public AlertShelf? Shelf { get; init; }

    /// <summary>
    /// When the sensor of a standing alert is expected to fall below its limit, in words; null where that cannot be told. Never stored:
    /// it belongs to the moment it was asked for.
    /// </summary>
    [JsonIgnore]
    public string? Outlook { get; init; }

    /// <summary>Whether it is a hazard.</summary>
    public bool IsHazard => HazardCode.IsHazard(Code);
}
