using System.Net.Security;
using LabWatch.Intake.Brokers.Embedded;

namespace LabWatch.Service.Web;

/// <summary>Gives the embedded broker the certificate of the pages.</summary>
internal sealed class BrokerCertificate(CertificateKeeper keeper) : IBrokerCertificate
{
    /// <inheritdoc/>
    public SslStreamCertificateContext Context => keeper.Current.Context;
}
