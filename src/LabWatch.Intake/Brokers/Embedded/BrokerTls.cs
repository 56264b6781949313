using System.Net.Security;
using System.Security.Authentication;
using System.Security.Cryptography.X509Certificates;
using LabWatch.Intake.Options;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>The server's side of TLS 1.2 or 1.3 for a device, with a certificate of the device where authorities for it are set.</summary>
internal static class BrokerTls
{
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(10);

    /// <summary>
    /// Does the handshake. Throws <see cref="AuthenticationException"/> where it fails and <see cref="OperationCanceledException"/> where it
    /// takes more than ten seconds.
    /// </summary>
    public static async Task<(Stream Stream, X509Certificate2? Peer)> AcceptAsync(Stream plain, IBrokerCertificate certificate, string? authorities, TimeProvider clock)
    {
        var secure = new SslStream(plain, leaveInnerStreamOpen: false);
        try
        {
            using var patience = new CancellationTokenSource(Patience, clock);
            await secure.AuthenticateAsServerAsync(Options(certificate, authorities), patience.Token);
            return (secure, secure.RemoteCertificate as X509Certificate2);
        }
        catch
        {
            await secure.DisposeAsync();
            throw;
        }
    }

    private static SslServerAuthenticationOptions Options(IBrokerCertificate certificate, string? authorities)
    {
        var options = new SslServerAuthenticationOptions
        {
            ServerCertificateContext = certificate.Context,
            EnabledSslProtocols = SslProtocols.Tls12 | SslProtocols.Tls13,
        };
        if (authorities is not null)
        {
            options.ClientCertificateRequired = true;
            options.CertificateChainPolicy = new X509ChainPolicy { TrustMode = X509ChainTrustMode.CustomRootTrust, RevocationMode = X509RevocationMode.NoCheck };
            options.CertificateChainPolicy.CustomTrustStore.AddRange(PemFile.ReadAuthorities(authorities));
            options.CertificateChainPolicy.ApplicationPolicy.Add(new System.Security.Cryptography.Oid("1.3.6.1.5.5.7.3.2", "Client Authentication"));
            options.RemoteCertificateValidationCallback = static (_, _, _, errors) => errors == SslPolicyErrors.None;
        }

        return options;
    }
}
