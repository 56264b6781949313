using System.Security.Cryptography;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Secrets;

namespace LabWatch.Service.Web;

/// <summary>The certificate in force: read again when its file changes, the own one renewed before it ends. What cannot be read leaves the one in force.</summary>
internal sealed class CertificateKeeper(WebOptions options, string keysDirectory, IReadOnlyList<string> hosts, NamedSecrets secrets, TimeProvider clock)
{
    private ServerCertificate? _current;

    /// <summary>The certificate in force.</summary>
    public ServerCertificate Current => Volatile.Read(ref _current) ?? throw new InvalidOperationException("The certificate has not been read.");

    /// <summary>Whether the service made the certificate itself.</summary>
    public bool IsOwn => options.Certificate == WebOptions.Own;

    private string Source => IsOwn ? OwnCertificate.PathIn(keysDirectory) : options.Certificate!;

    /// <summary>Reads the certificate for the first time.</summary>
    public IReadOnlyList<Finding> Open()
    {
        try
        {
            Read();
            DateTimeOffset end = new(Current.Leaf.NotAfter.ToUniversalTime(), TimeSpan.Zero);
            return end > clock.GetUtcNow() ? [] : [new Finding("certificate-ended", "Web:Certificate", "The certificate has ended.", end.ToString("u"), "Put a valid one in its place.")];
        }
        catch (Exception exception) when (exception is CryptographicException or IOException or UnauthorizedAccessException or ArgumentException)
        {
            return [new Finding("certificate-unreadable", "Web:Certificate", "The certificate cannot be read: " + exception.Message, Source, "Give a PFX, or a PEM file with its key in the same file or beside it (.key), readable by the service's account; its password by Web:CertificatePasswordSecret.")];
        }
    }

    /// <summary>Looks whether there is another certificate by now. Throws what reading it throws.</summary>
    /// <returns>Whether another one is in force.</returns>
    public bool Refresh()
    {
        ServerCertificate before = Current;
        if (IsOwn)
        {
            OwnCertificate.Ensure(keysDirectory, hosts, clock.GetUtcNow());
        }

        if (CertificateFile.LastChange(Source, IsOwn ? null : options.CertificateKey) == before.ChangedAt)
        {
            return false;
        }

        Read();
        return true;
    }

    private void Read()
    {
        if (IsOwn)
        {
            OwnCertificate.Ensure(keysDirectory, hosts, clock.GetUtcNow());
        }

        string? password = options.CertificatePasswordSecret is { } name ? secrets.Read(name) ?? throw new IOException($"there is no secret named {name}") : null;
        Volatile.Write(ref _current, CertificateFile.Read(Source, IsOwn ? null : options.CertificateKey, IsOwn ? null : password));
    }
}
