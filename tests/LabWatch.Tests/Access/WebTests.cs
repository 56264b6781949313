using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;
using LabWatch.Lab.Secrets;
using LabWatch.Service.Web;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Access;

public sealed class WebTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("labwatch-keys-").FullName;
    private readonly FakeTimeProvider _clock = new(TimeProvider.System.GetUtcNow());

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Theory]
    [InlineData("http://127.0.0.1:5080", "", false, null)]
    [InlineData("http://localhost:5080;http://[::1]:5080", "", false, null)]
    [InlineData("http://0.0.0.0:5080", "", false, "plain-http")]
    [InlineData("http://*:5080", "", false, "plain-http")]
    [InlineData("http://labwatch.example:5080", "", false, "plain-http")]
    [InlineData("http://0.0.0.0:5080", "10.0.0.5", false, null)]
    [InlineData("http://0.0.0.0:5080", "", true, null)]
    [InlineData("https://0.0.0.0:5443", "", false, "certificate-missing")]
    public void Passwords_do_not_cross_a_network_in_the_open(string urls, string proxies, bool allowed, string? code)
    {
        WebOptions options = new() { ReverseProxies = proxies, AllowPlainHttp = allowed };
        Assert.Equal(code is null ? [] : [code], WebAddresses.Check(WebAddresses.Parse(urls), options).Select(finding => finding.Code));
    }

    [Fact]
    public void On_loopback_only_its_names_are_right()
    {
        Assert.Equal(["localhost", "127.0.0.1", "[::1]"], WebAddresses.AllowedHosts(WebAddresses.Parse("http://127.0.0.1:5080"), new WebOptions()));
        Assert.Empty(WebAddresses.AllowedHosts(WebAddresses.Parse("https://0.0.0.0:5443"), new WebOptions()));
        Assert.Contains("labwatch.example", WebAddresses.AllowedHosts(WebAddresses.Parse("https://0.0.0.0:5443"), new WebOptions { Hosts = "labwatch.example" }));
    }

    [Fact]
    public void Every_mistake_in_the_options_is_said() =>
        Assert.Equal(
            ["not-an-address", "not-a-host", "path-not-absolute", "path-not-absolute", "not-a-slug"],
            new WebOptions { ReverseProxies = "10.0.0.5, gateway", Hosts = "http://x", Certificate = "here.pfx", CertificateKey = "key.pem", CertificatePasswordSecret = "My Secret" }.Validate().Select(finding => finding.Code));

    [Fact]
    public void An_own_certificate_is_kept_for_the_service_alone_and_renewed_before_it_ends()
    {
        CertificateKeeper keeper = Keeper(new WebOptions { Certificate = WebOptions.Own });
        Assert.Empty(keeper.Open());
        string first = keeper.Current.Fingerprint;

        Assert.False(keeper.Refresh());
        Assert.Empty(Keeper(new WebOptions { Certificate = WebOptions.Own }).Open());
        Assert.Equal(first, keeper.Current.Fingerprint);
        X509SubjectAlternativeNameExtension names = keeper.Current.Leaf.Extensions.OfType<X509SubjectAlternativeNameExtension>().Single();
        Assert.Contains("localhost", names.EnumerateDnsNames());
        Assert.Contains("bench.example", names.EnumerateDnsNames());
        Assert.Contains(System.Net.IPAddress.Loopback, names.EnumerateIPAddresses());
        if (!OperatingSystem.IsWindows())
        {
            Assert.Equal(UnixFileMode.UserRead | UnixFileMode.UserWrite, File.GetUnixFileMode(OwnCertificate.PathIn(_folder)));
        }

        _clock.Advance(TimeSpan.FromDays(370));
        Assert.True(keeper.Refresh());
        Assert.NotEqual(first, keeper.Current.Fingerprint);
        Assert.Equal(95, keeper.Current.Fingerprint.Length);
    }

    [Theory]
    [InlineData("both.pem", null)]
    [InlineData("apart.pem", "apart.key")]
    [InlineData("apart.pem", "elsewhere.key")]
    [InlineData("store.pfx", null)]
    public void A_certificate_is_read_from_pem_or_pfx_and_again_when_the_file_changes(string name, string? key)
    {
        string path = Path.Combine(_folder, name);
        string? keyPath = key is null ? null : Path.Combine(_folder, key);
        Write(path, keyPath, "one");
        CertificateKeeper keeper = Keeper(new WebOptions { Certificate = path, CertificateKey = key == "elsewhere.key" ? keyPath : null });

        Assert.Empty(keeper.Open());
        Assert.Equal("CN=one", keeper.Current.Leaf.Subject);
        Assert.True(keeper.Current.Leaf.HasPrivateKey);
        Write(path, keyPath, "two");
        File.SetLastWriteTimeUtc(path, keeper.Current.ChangedAt.AddSeconds(2));
        Assert.True(keeper.Refresh());
        Assert.Equal("CN=two", keeper.Current.Leaf.Subject);

        File.WriteAllText(path, "nothing of use");
        File.SetLastWriteTimeUtc(path, keeper.Current.ChangedAt.AddSeconds(2));
        Assert.ThrowsAny<Exception>(() => keeper.Refresh());
        Assert.Equal("CN=two", keeper.Current.Leaf.Subject);
    }

    [Fact]
    public void A_certificate_that_cannot_be_read_or_has_ended_is_a_finding()
    {
        Assert.Equal("certificate-unreadable", Assert.Single(Keeper(new WebOptions { Certificate = Path.Combine(_folder, "missing.pem") }).Open()).Code);
        string path = Path.Combine(_folder, "both.pem");
        Write(path, null, "old");
        _clock.Advance(TimeSpan.FromDays(400));
        Assert.Equal("certificate-ended", Assert.Single(Keeper(new WebOptions { Certificate = path }).Open()).Code);
    }

    private CertificateKeeper Keeper(WebOptions options) => new(options, _folder, ["bench.example", "0.0.0.0"], new NamedSecrets(null, _ => null), _clock);

    private void Write(string path, string? keyPath, string name)
    {
        using ECDsa key = ECDsa.Create(ECCurve.NamedCurves.nistP256);
        CertificateRequest request = new("CN=" + name, key, HashAlgorithmName.SHA256);
        using X509Certificate2 certificate = request.CreateSelfSigned(_clock.GetUtcNow().AddDays(-1), _clock.GetUtcNow().AddDays(90));
        if (path.EndsWith(".pfx", StringComparison.Ordinal))
        {
            File.WriteAllBytes(path, certificate.Export(X509ContentType.Pkcs12));
            return;
        }

        string pem = certificate.ExportCertificatePem();
        File.WriteAllText(path, keyPath is null ? pem + "\n" + key.ExportPkcs8PrivateKeyPem() : pem);
        if (keyPath is not null)
        {
            File.WriteAllText(keyPath, key.ExportPkcs8PrivateKeyPem());
        }
    }
}
