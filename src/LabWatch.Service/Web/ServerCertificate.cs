using System.Net.Security;
using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;

namespace LabWatch.Service.Web;

/// <summary>A certificate in use.</summary>
/// <param name="Context">The certificate with its chain, ready for handshakes.</param>
/// <param name="Leaf">The certificate of the server.</param>
/// <param name="ChangedAt">When the file was last changed, as the file system says.</param>
internal sealed record ServerCertificate(SslStreamCertificateContext Context, X509Certificate2 Leaf, DateTime ChangedAt)
{
    /// <summary>SHA-256 of the certificate, for people to compare.</summary>
    public string Fingerprint => string.Join(':', SHA256.HashData(Leaf.RawData).Select(octet => octet.ToString("X2", System.Globalization.CultureInfo.InvariantCulture)));
}
