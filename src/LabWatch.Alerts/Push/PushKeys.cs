using System.Buffers.Text;
using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Push;

/// <summary>
/// The key by which push services know this installation (RFC 8292), made on the first start and kept in <c>keys/push.pem</c> of the data
/// folder, readable by the service alone. A new key makes all subscriptions useless, so it is never replaced by itself.
/// </summary>
internal sealed class PushKeys : IDisposable
{
    private static readonly TimeSpan Life = TimeSpan.FromHours(12);
    private readonly ECDsa _key;

    private PushKeys(ECDsa key)
    {
        _key = key;
        PublicKey = Base64Url.EncodeToString(PushEncryption.Point(key.ExportParameters(includePrivateParameters: false)));
    }

    /// <summary>The public key as the page's subscription needs it: base64url of the uncompressed point.</summary>
    public string PublicKey { get; }

    /// <summary>Reads the key of a data folder, or makes it.</summary>
    public static PushKeys Open(string folder)
    {
        string path = Path.Combine(folder, "keys", "push.pem");
        ECDsa key = ECDsa.Create(ECCurve.NamedCurves.nistP256);
        if (File.Exists(path))
        {
            key.ImportFromPem(File.ReadAllText(path));
            return new PushKeys(key);
        }

        Directory.CreateDirectory(Path.GetDirectoryName(path)!);
        PrivateFile.Write(path, Encoding.ASCII.GetBytes(key.ExportPkcs8PrivateKeyPem() + "\n"));
        return new PushKeys(key);
    }

    /// <summary>
    /// The value of <c>Authorization</c> for a push service: a token signed with ES256 for its origin, at most 24 h ahead (RFC 8292, section 2).
    /// </summary>
    /// <param name="endpoint">Address of the subscription.</param>
    /// <param name="contact">Whom the push service may ask: a mailto or https address.</param>
    /// <param name="now">The time.</param>
    public string Authorization(Uri endpoint, string contact, Instant now)
    {
        long expires = Math.DivRem((now + Life).Microseconds, Instant.MicrosecondsPerSecond).Quotient;
        string origin = endpoint.GetLeftPart(UriPartial.Authority);
        string claims = string.Create(CultureInfo.InvariantCulture, $$"""{"aud":"{{origin}}","exp":{{expires}},"sub":"{{contact}}"}""");
        string signed = Encoded("""{"typ":"JWT","alg":"ES256"}""") + "." + Encoded(claims);
        byte[] signature = _key.SignData(Encoding.ASCII.GetBytes(signed), HashAlgorithmName.SHA256, DSASignatureFormat.IeeeP1363FixedFieldConcatenation);
        return $"vapid t={signed}.{Base64Url.EncodeToString(signature)}, k={PublicKey}";
    }

    /// <inheritdoc/>
    public void Dispose() => _key.Dispose();

    private static string Encoded(string text) => Base64Url.EncodeToString(Encoding.UTF8.GetBytes(text));
}
