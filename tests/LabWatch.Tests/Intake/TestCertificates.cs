using System.Net;
using System.Net.Security;
using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;
using LabWatch.Intake.Brokers.Embedded;

namespace LabWatch.Tests.Intake;

/// <summary>An authority of a test's own with a certificate for the server on this machine and one for a client.</summary>
internal sealed class TestCertificates : IBrokerCertificate, IDisposable
{
    private readonly ECDsa _authorityKey = ECDsa.Create(ECCurve.NamedCurves.nistP256);
    private readonly X509Certificate2 _authority;
    private readonly X509Certificate2 _server;

    public TestCertificates()
    {
        CertificateRequest request = new($"CN=Test authority {Guid.NewGuid():N}", _authorityKey, HashAlgorithmName.SHA256);
        request.CertificateExtensions.Add(new X509BasicConstraintsExtension(true, false, 0, true));
        request.CertificateExtensions.Add(new X509KeyUsageExtension(X509KeyUsageFlags.KeyCertSign, true));
        _authority = request.CreateSelfSigned(DateTimeOffset.UnixEpoch.AddYears(50), DateTimeOffset.UnixEpoch.AddYears(75));
        _server = Issue("1.3.6.1.5.5.7.3.1");
        Client = Issue("1.3.6.1.5.5.7.3.2");
        Context = SslStreamCertificateContext.Create(_server, null, offline: true);
    }

    public SslStreamCertificateContext Context { get; }

    public X509Certificate2 Client { get; }

    public X509Certificate2Collection Authorities => [_authority];

    public string AuthorityPem => _authority.ExportCertificatePem();

    public string ServerPem => _server.ExportCertificatePem();

    public string ServerKeyPem => _server.GetECDsaPrivateKey()!.ExportPkcs8PrivateKeyPem();

    public string ClientPem => Client.ExportCertificatePem();

    public string ClientKeyPem => Client.GetECDsaPrivateKey()!.ExportPkcs8PrivateKeyPem();

    public void Dispose()
    {
        Client.Dispose();
        _server.Dispose();
        _authority.Dispose();
        _authorityKey.Dispose();
    }

    private X509Certificate2 Issue(string usage)
    {
        using ECDsa key = ECDsa.Create(ECCurve.NamedCurves.nistP256);
        CertificateRequest request = new("CN=labwatch-test", key, HashAlgorithmName.SHA256);
        request.CertificateExtensions.Add(new X509EnhancedKeyUsageExtension([new Oid(usage)], false));
        SubjectAlternativeNameBuilder names = new();
        names.AddDnsName("localhost");
        names.AddIpAddress(IPAddress.Loopback);
        request.CertificateExtensions.Add(names.Build());
        using X509Certificate2 issued = request.Create(_authority, DateTimeOffset.UnixEpoch.AddYears(50), DateTimeOffset.UnixEpoch.AddYears(75), RandomNumberGenerator.GetBytes(8));
        using X509Certificate2 whole = issued.CopyWithPrivateKey(key);
        return X509CertificateLoader.LoadPkcs12(whole.Export(X509ContentType.Pkcs12), null, X509KeyStorageFlags.Exportable);
    }
}
