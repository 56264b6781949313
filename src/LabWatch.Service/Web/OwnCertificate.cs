using System.Net;
using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;

namespace LabWatch.Service.Web;

/// <summary>The self-signed certificate that the service makes, keeps for its account alone, and renews before it ends.</summary>
internal static class OwnCertificate
{
    private const int Days = 397;
    private static readonly TimeSpan RenewBefore = TimeSpan.FromDays(30);

    /// <summary>Where it is kept.</summary>
    public static string PathIn(string keysDirectory) => Path.Combine(keysDirectory, "web.pfx");

    /// <summary>Makes it where there is none, or where it ends soon.</summary>
    /// <param name="keysDirectory">The folder of own keys.</param>
    /// <param name="hosts">Names and addresses that it shall hold besides this machine's.</param>
    /// <param name="now">The time now.</param>
    public static void Ensure(string keysDirectory, IEnumerable<string> hosts, DateTimeOffset now)
    {
        string path = PathIn(keysDirectory);
        if (!IsGood(path, now))
        {
            Keep(path, Make(hosts, now));
        }
    }

    private static bool IsGood(string path, DateTimeOffset now)
    {
        if (!File.Exists(path))
        {
            return false;
        }

        try
        {
            using X509Certificate2 kept = X509CertificateLoader.LoadPkcs12FromFile(path, null);
            return kept.HasPrivateKey && new DateTimeOffset(kept.NotAfter.ToUniversalTime(), TimeSpan.Zero) - now > RenewBefore;
        }
        catch (CryptographicException)
        {
            return false;
        }
    }

    private static byte[] Make(IEnumerable<string> hosts, DateTimeOffset now)
    {
        using ECDsa key = ECDsa.Create(ECCurve.NamedCurves.nistP256);
        CertificateRequest request = new("CN=LabWatch", key, HashAlgorithmName.SHA256);
        request.CertificateExtensions.Add(new X509BasicConstraintsExtension(certificateAuthority: false, hasPathLengthConstraint: false, pathLengthConstraint: 0, critical: true));
        request.CertificateExtensions.Add(new X509KeyUsageExtension(X509KeyUsageFlags.DigitalSignature, critical: true));
        request.CertificateExtensions.Add(new X509EnhancedKeyUsageExtension([new Oid("1.3.6.1.5.5.7.3.1", "Server Authentication")], critical: false));
        request.CertificateExtensions.Add(Names(hosts));
        using X509Certificate2 made = request.CreateSelfSigned(now - TimeSpan.FromHours(1), now + TimeSpan.FromDays(Days));
        return made.Export(X509ContentType.Pkcs12);
    }

    private static X509Extension Names(IEnumerable<string> hosts)
    {
        SubjectAlternativeNameBuilder names = new();
        foreach (string host in new[] { "localhost", "127.0.0.1", "::1", Dns.GetHostName() }.Concat(hosts).Select(host => host.Trim('[', ']')).Distinct(StringComparer.OrdinalIgnoreCase))
        {
            if (!IPAddress.TryParse(host, out IPAddress? address))
            {
                names.AddDnsName(host);
            }
            else if (!address.Equals(IPAddress.Any) && !address.Equals(IPAddress.IPv6Any))
            {
                names.AddIpAddress(address);
            }
        }

        return names.Build();
    }

    private static void Keep(string path, byte[] pfx)
    {
        string fresh = path + ".new";
        File.Delete(fresh);
        FileStreamOptions options = new() { Mode = FileMode.CreateNew, Access = FileAccess.Write };
        if (!OperatingSystem.IsWindows())
        {
            options.UnixCreateMode = UnixFileMode.UserRead | UnixFileMode.UserWrite;
        }

        using (FileStream stream = new(fresh, options))
        {
            stream.Write(pfx);
            stream.Flush(flushToDisk: true);
        }

        File.Move(fresh, path, overwrite: true);
    }
}
