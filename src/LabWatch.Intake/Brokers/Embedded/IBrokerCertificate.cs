using System.Net.Security;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>The certificate of this machine, for the embedded broker. Asked for each connection, so that a renewed one counts at once.</summary>
public interface IBrokerCertificate
{
    /// <summary>The certificate with its chain.</summary>
    SslStreamCertificateContext Context { get; }
}
