using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;

namespace LabWatch.Service.Api.Ports;

/// <summary>The alerts that are open now, and their acknowledgement; it answers whether the records do or not.</summary>
internal interface IAlertPort
{
    /// <summary>Open alerts.</summary>
    IReadOnlyList<Alert> Open();

    /// <summary>Acknowledges an alert and returns when that is durable: the alert as it is then, null where there is none of that id.</summary>
    ValueTask<(Alert? Alert, IReadOnlyList<Finding> Findings)> AcknowledgeAsync(Guid id, string by, string? note, CancellationToken cancellationToken);
}
