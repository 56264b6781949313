using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Alerts;

/// <summary>One message about an alert: who was told what, when, and whether it arrived.</summary>
internal sealed record AlertMessageView(
    [property: Description("Id of the message.")] string Id,
    [property: Description("Id of the notifier; devices begin with push-.")] string Notifier,
    [property: Description("Whose device it is; null for the notifiers of the lab file and for devices that are gone.")] string? Account,
    [property: Description("What it says in short.")] string Headline,
    [property: Description("When it was queued.")] Instant QueuedAt,
    [property: Description("When the receiver took it; null before.")] Instant? SentAt,
    [property: Description("When it was given up; null while it may still be sent.")] Instant? GivenUpAt,
    [property: Description("Attempts made.")] int Attempts,
    [property: Description("What the last attempt failed with.")] string? LastError);
