using System.Net;
using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;

namespace LabWatch.SystemTests.Service;

/// <summary>A certificate for localhost that a process trusts whose <c>SSL_CERT_FILE</c> names it.</summary>
internal static class TestCertificate
{
    /// <summary>Makes one, and writes its public half to a file.</summary>
    public static X509Certificate2 Make(string pemFile)
    {
        using RSA key = RSA.Create(2048);
        CertificateRequest request = new("CN=localhost", key, HashAlgorithmName.SHA256, RSASignaturePadding.Pkcs1);
        SubjectAlternativeNameBuilder names = new();
        names.AddDnsName("localhost");
        names.AddIpAddress(IPAddress.Loopback);
        request.CertificateExtensions.Add(names.Build());
        request.CertificateExtensions.Add(new X509BasicConstraintsExtension(certificateAuthority: true, false, 0, critical: true));
        DateTimeOffset now = TimeProvider.System.GetUtcNow();
        using X509Certificate2 made = request.CreateSelfSigned(now.AddDays(-1), now.AddDays(2));
        File.WriteAllText(pemFile, made.ExportCertificatePem());
        return X509CertificateLoader.LoadPkcs12(made.Export(X509ContentType.Pkcs12), null);
    }
}
