using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Streaming;

/// <summary>The service's clock, where nothing else has happened.</summary>
/// <param name="Now">Time of the service's clock.</param>
internal sealed record ClockEvent(Instant Now);
