using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>One step in the life of an alert.</summary>
internal sealed record AlertTransitionView(
    [property: Description("1 for raised, one more for each later step.")] int Sequence,
    [property: Description("When.")] Instant At,
    [property: Description("raised, acknowledged, returned, raised-again, shelved, unshelved, out-of-service, returned-to-service, or summarised (people were told of it with others).")] string Event,
    [property: Description("Who did it; labwatch for the service itself.")] string By,
    [property: Description("What that person wrote.")] string? Note,
    [property: Description("State of the alert after the step.")] string State);
