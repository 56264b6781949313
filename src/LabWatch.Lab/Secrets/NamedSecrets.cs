using System.Text;

namespace LabWatch.Lab.Secrets;

/// <summary>
/// Finds secrets by name: a file of that name in the folder of secrets, then in the folder of systemd credentials, then the environment
/// variable <c>LABWATCH_SECRET_</c> followed by the name in capitals with underscores. Looked up at each use, so that a secret can be
/// replaced while the service runs. Never logged.
/// </summary>
/// <param name="folder">The folder of secrets; null for none.</param>
/// <param name="environment">Gives environment variables by name.</param>
public sealed class NamedSecrets(string? folder, Func<string, string?> environment)
{
    private const string CredentialsFolder = "CREDENTIALS_DIRECTORY";
    private const int LargestFile = 64 * 1024;

    /// <summary>Name of the environment variable of a secret.</summary>
    public static string VariableOf(string name)
    {
        ArgumentNullException.ThrowIfNull(name);
        return "LABWATCH_SECRET_" + name.Replace('-', '_').Replace('.', '_').ToUpperInvariant();
    }

    /// <summary>
    /// The bytes of a secret, without a line end; null where there is none, where it is empty, where its file cannot be read or is longer
    /// than 64 KiB, or where the name is no plain name.
    /// </summary>
    public byte[]? Find(string name)
    {
        ArgumentNullException.ThrowIfNull(name);
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

    /// <summary>A secret as text (UTF-8); null where <see cref="Find"/> gives none.</summary>
    public string? Read(string name) => Find(name) is { } bytes ? Encoding.UTF8.GetString(bytes) : null;

    // A name may come from the lab file and must not lead out of the folder.
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
            return file.Exists && file.Length <= LargestFile ? File.ReadAllBytes(file.FullName).AsSpan().TrimEnd("\r\n"u8).ToArray() : null;
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            return null;
        }
    }
}
