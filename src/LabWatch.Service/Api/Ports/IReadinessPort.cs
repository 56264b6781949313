using LabWatch.Lab.Sources;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Ports;

/// <summary>Says whether a source may be calibrated with now.</summary>
internal interface IReadinessPort
{
    /// <summary>The readiness of a source with all its reasons.</summary>
    ValueTask<ReadinessView> OfAsync(ReferenceSource source, CancellationToken cancellationToken);
}
