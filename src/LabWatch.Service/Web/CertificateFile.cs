using System.Net.Security;
using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;

namespace LabWatch.Service.Web;

/// <summary>Reads certificates with their keys, from PFX or PEM files.</summary>
internal static class CertificateFile
{
    /// <summary>Reads a certificate.</summary>
    /// <exception cref="CryptographicException">The file holds no certificate with a key that can be read.</exception>
    /// <exception cref="IOException">The file cannot be read.</exception>
    public static ServerCertificate Read(string path, string? keyPath, string? password)
    {
        DateTime changed = LastChange(path, keyPath);
        bool isPem = File.ReadAllText(path).Contains("-----BEGIN ", StringComparison.Ordinal);
        X509Certificate2Collection all = isPem ? ReadPem(path, keyPath ?? KeyBeside(path), password) : X509CertificateLoader.LoadPkcs12CollectionFromFile(path, password);
        X509Certificate2 leaf = all.FirstOrDefault(certificate => certificate.HasPrivateKey) ?? throw new CryptographicException("the file holds no certificate with its key");
        X509Certificate2Collection others = [.. all.Where(certificate => !ReferenceEquals(certificate, leaf))];
        return new ServerCertificate(SslStreamCertificateContext.Create(leaf, others, offline: true), leaf, changed);
    }

    /// <summary>When certificate or key were last changed.</summary>
    public static DateTime LastChange(string path, string? keyPath)
    {
        DateTime certificate = File.GetLastWriteTimeUtc(path);
        DateTime key = File.GetLastWriteTimeUtc(keyPath ?? KeyBeside(path) ?? path);
        return key > certificate ? key : certificate;
    }

    private static string? KeyBeside(string path) => File.Exists(Path.ChangeExtension(path, ".key")) ? Path.ChangeExtension(path, ".key") : null;

    private static X509Certificate2Collection ReadPem(string path, string? keyPath, string? password)
    {
        using X509Certificate2 read = string.IsNullOrEmpty(password)
            ? X509Certificate2.CreateFromPemFile(path, keyPath)
            : X509Certificate2.CreateFromEncryptedPemFile(path, password, keyPath);
        X509Certificate2Collection all = [];
        all.ImportFromPemFile(path);

        // Windows handshakes only with keys that came through a PFX.
        X509Certificate2 leaf = X509CertificateLoader.LoadPkcs12(read.Export(X509ContentType.Pkcs12), null);
        return [leaf, .. all.Where(certificate => certificate.Thumbprint != leaf.Thumbprint)];
    }
}
