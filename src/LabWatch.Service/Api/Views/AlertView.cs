using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>One occurrence of an alert, in the life cycle of IEC 62682.</summary>
internal sealed record AlertView(
    [property: Description("Id of this occurrence.")] Guid Id,
    [property: Description("Key of the source, site.source.")] string Source,
    [property: Description("Name of the source for people.")] string SourceName,
    [property: Description("Code of the hazard, or of the criterion that is out of tolerance.")] string Code,
    [property: Description("Id of the channel or scope that it is about; empty for the source as a whole.")] string Subject,
    [property: Description("Name of the subject for people.")] string SubjectName,
    [property: Description("low, medium or high.")] string Priority,
    [property: Description("raised-unacknowledged, raised-acknowledged, returned-unacknowledged or normal.")] string State,
    [property: Description("Whether it is a hazard.")] bool IsHazard,
    [property: Description("When it was raised.")] Instant RaisedAt,
    [property: Description("When the condition went away; null while it stands.")] Instant? ReturnedAt,
    [property: Description("When somebody acknowledged it; null before.")] Instant? AcknowledgedAt,
    [property: Description("Who acknowledged it.")] string? AcknowledgedBy,
    [property: Description("What that person wrote.")] string? AcknowledgeNote,
    [property: Description("What and where, with value and limit.")] string Headline,
    [property: Description("The same at length: since when, what to do, what not to do, cautions.")] string Detail,
    [property: Description("The value that raised it, latest while it stands, in unit.")] double? Value,
    [property: Description("The limit that was crossed, in unit.")] double? Limit,
    [property: Description("Unit of value and limit.")] string Unit,
    [property: Description("When the sensor of a hot surface is expected to fall below its limit, with an interval, in words; null where that cannot be told. An estimate about one sensor: treat as hot until measured.")] string? Outlook,
    [property: Description("Why nobody is told of it for a while: shelved, or out of service; null where people are told.")] AlertShelfView? Shelf);
