using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Outbox;

/// <summary>
/// Signs an HTTP request with a shared secret: HTTP Message Signatures, RFC 9421, algorithm <c>hmac-sha256</c> (section 3.3.3), over the
/// body's digest (RFC 9530).
/// </summary>
internal static class MessageSignature
{
    /// <summary>Value of <c>Content-Digest</c> for a body (RFC 9530, section 2).</summary>
    public static string ContentDigest(ReadOnlySpan<byte> body) => $"sha-256=:{Convert.ToBase64String(SHA256.HashData(body))}:";

    /// <summary>Value of the signature's parameters: the components covered, when, and the name of the key (RFC 9421, section 2.3).</summary>
    public static string Parameters(IEnumerable<string> components, Instant created, string keyName)
    {
        string list = string.Join(' ', components.Select(component => $"\"{component}\""));
        long seconds = Math.DivRem(created.Microseconds, Instant.MicrosecondsPerSecond).Quotient;
        return string.Create(CultureInfo.InvariantCulture, $"({list});created={seconds};keyid=\"{keyName}\";alg=\"hmac-sha256\"");
    }

    /// <summary>The signature base: one line a component, then the parameters, no line feed at the end (RFC 9421, section 2.5).</summary>
    public static string Base(IEnumerable<(string Component, string Value)> components, string parameters) =>
        string.Concat(components.Select(component => $"\"{component.Component}\": {component.Value}\n")) + $"\"@signature-params\": {parameters}";

    /// <summary>The signature of a signature base, base64.</summary>
    public static string Sign(byte[] secret, string signatureBase) => Convert.ToBase64String(HMACSHA256.HashData(secret, Encoding.ASCII.GetBytes(signatureBase)));
}
