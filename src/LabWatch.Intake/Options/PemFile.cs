using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;
using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Options;

/// <summary>Certificates in files.</summary>
internal static class PemFile
{
    private const string Mark = "-----BEGIN ";

    /// <summary>What is wrong with a file of authorities.</summary>
    public static IEnumerable<Finding> Check(string where, string path)
    {
        string? problem = null;
        try
        {
            problem = !Path.IsPathFullyQualified(path) ? "The path must be absolute."
                : ReadAuthorities(path).Count == 0 ? "The file holds no certificate."
                : null;
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException or CryptographicException)
        {
            problem = "The file cannot be read: " + exception.Message;
        }

        return OptionCheck.Must(problem is null, where, problem ?? string.Empty, path, "Set the full path of a PEM file with the certificates of the authorities.");
    }

    /// <summary>What is wrong with the path of a file that must be there.</summary>
    public static IEnumerable<Finding> CheckThere(string where, string path) =>
        OptionCheck.Must(Path.IsPathFullyQualified(path) && File.Exists(path), where, "There is no file at this absolute path.", path, "Set the full path of a file that the service's account may read.");

    /// <summary>The certificates of a PEM file.</summary>
    public static X509Certificate2Collection ReadAuthorities(string path)
    {
        var authorities = new X509Certificate2Collection();
        authorities.ImportFromPem(File.ReadAllText(path));
        return authorities;
    }

    /// <summary>A certificate with its key from a PFX, or from PEM with the key in the same file or in another.</summary>
    public static X509Certificate2 ReadWithKey(string path, string? keyPath, string? password)
    {
        byte[] bytes = File.ReadAllBytes(path);
        string text = System.Text.Encoding.Latin1.GetString(bytes);
        if (!text.Contains(Mark, StringComparison.Ordinal))
        {
            return X509CertificateLoader.LoadPkcs12(bytes, password);
        }

        string key = keyPath is null ? text : File.ReadAllText(keyPath);
        using X509Certificate2 pem = password is null ? X509Certificate2.CreateFromPem(text, key) : X509Certificate2.CreateFromEncryptedPem(text, key, password);

        // Some platforms do not use the key of a certificate made from PEM; one that went through PKCS #12 works on all.
        return X509CertificateLoader.LoadPkcs12(pem.Export(X509ContentType.Pkcs12), null);
    }
}
