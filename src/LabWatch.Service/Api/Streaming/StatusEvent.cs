using LabWatch.Lab.Time;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Streaming;

/// <summary>The status of a source, with the service's clock from which ages are reckoned.</summary>
/// <param name="Now">Time of the service's clock.</param>
/// <param name="Status">The status.</param>
internal sealed record StatusEvent(Instant Now, SourceStatusView Status);
