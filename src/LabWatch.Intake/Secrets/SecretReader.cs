using LabWatch.Lab.Identity;

namespace LabWatch.Intake.Secrets;

/// <summary>
/// Reads secrets from, in this order: a folder with one file a secret, the credentials folder of systemd (<c>CREDENTIALS_DIRECTORY</c>),
/// the environment variable <c>LABWATCH_SECRET_</c> and the name in capitals with underscores. One line end after a secret is dropped.
/// </summary>
/// <param name="directory">The folder; null for none.</param>
/// <param name="environment">Gives environment variables by name.</param>
public sealed class SecretReader(string? directory, Func<string, string?> environment) : ISecretReader
{
    private const int LongestSecretBytes = 64 << 10;

    /// <inheritdoc/>
    public string? Read(string name)
    {
        if (!Slug.IsValid(name))
        {
            return null;
        }

        return ReadFile(directory, name)
            ?? ReadFile(environment("CREDENTIALS_DIRECTORY"), name)
            ?? environment("LABWATCH_SECRET_" + name.ToUpperInvariant().Replace('-', '_'));
    }

    private static string? ReadFile(string? folder, string name)
    {
        string? path = string.IsNullOrEmpty(folder) ? null : Path.Combine(folder, name);
        if (path is null || !File.Exists(path))
        {
            return null;
        }

        if (new FileInfo(path).Length > LongestSecretBytes)
        {
            throw new IOException($"The secret {name} is longer than {LongestSecretBytes} bytes.");
        }

        string text = File.ReadAllText(path);
        return text.EndsWith("\r\n", StringComparison.Ordinal) ? text[..^2] : text.EndsWith('\n') ? text[..^1] : text;
    }
}
