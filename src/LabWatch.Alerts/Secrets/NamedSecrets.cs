using System.Text;

namespace LabWatch.Alerts.Secrets;

/// <summary>
/// Finds secrets by name: a file of that name in the folder of secrets, then in the folder of systemd credentials, then the environment
/// variable <c>LABWATCH_SECRET_</c> followed by the name in capitals with underscores. Looked up at each use, so that a secret can be
/// replaced while the service runs. Never logged.
/// </summary>
internal sealed class NamedSecrets(string? folder, Func<string, string?> environment)
{
    private const string CredentialsFolder = "CREDENTIALS_DIRECTORY";
    private const int LargestFile = 64 * 1024;

    /// <summary>Name of the environment variable of a secret.</summary>
    public static string VariableOf(string name) => "LABWATCH_SECRET_" + name.Replace('-', '_').Replace('.', '_').ToUpperInvariant();

    /// <summary>The bytes of a secret, without a line end; null where there is none, where it is empty, or where the name is no plain name.</summary>
    public byte[]? Find(string name)
    {
        if (!IsPlain(name))
        {
            return null;
        }

        byte[]? found = FromFolder(folder, name) ?? FromFolder(environment(CredentialsFolder), name);
        if (found is null && environment(VariableOf(name)) is { Length: > 0 } text)
        {
            found = Encoding.UTF8.GetBytes(text);
        }

        return found is { Length: > 0 } ? found : null;
    }

    // A name comes from the lab file and must not lead out of the folder.
    private static bool IsPlain(string name) =>
        name.Length is > 0 and <= 100 && name.All(letter => char.IsAsciiLetterOrDigit(letter) || letter is '-' or '_' or '.') && name.Trim('.').Length > 0;

    private static byte[]? FromFolder(string? folder, string name)
    {
        if (string.IsNullOrEmpty(folder))
        {
            return null;
        }

        try
        {
            FileInfo file = new(Path.Combine(folder, name));
            return file.Exists && file.Length <= LargestFile ? WithoutLineEnd(File.ReadAllBytes(file.FullName)) : null;
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            return null;
        }
    }

    private static byte[] WithoutLineEnd(byte[] bytes) => bytes.AsSpan().TrimEnd("\r\n"u8).ToArray();
}
