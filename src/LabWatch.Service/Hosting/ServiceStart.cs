using LabWatch.Service.Configuration;
using LabWatch.Service.Web;

namespace LabWatch.Service.Hosting;

/// <summary>Everything that a start has validated before any part of the service runs.</summary>
/// <param name="Data">The data directory, locked.</param>
/// <param name="Lab">The lab in force.</param>
/// <param name="Settings">The options.</param>
/// <param name="Configuration">What the options were read from, for logging levels.</param>
/// <param name="Urls">Where pages and API are served.</param>
/// <param name="Clock">The clock that everything asks.</param>
/// <param name="Certificate">The certificate for https; null where nothing is served by it.</param>
internal sealed record ServiceStart(
    DataDirectory Data, LabSnapshotSource Lab, ServiceSettings Settings, IConfiguration Configuration, string Urls, TimeProvider Clock,
    CertificateKeeper? Certificate);
