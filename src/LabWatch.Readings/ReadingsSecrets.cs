using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;

namespace LabWatch.Readings;

/// <summary>
/// Reads the password or token of a database by its name from, in this order: the folder of secrets (one file a secret), the credentials
/// folder of systemd (<c>CREDENTIALS_DIRECTORY</c>), the environment variable <c>LABWATCH_SECRET_</c> and the name in capitals with underscores.
/// </summary>
internal sealed class ReadingsSecrets(string? folder, Func<string, string?> environment)
{
    /// <summary>The secret; null where no name is given. Throws <see cref="StoreUnavailableException"/> where the name leads nowhere.</summary>
    public string? Read(string? name) => name is null ? null : Find(name) ?? throw new StoreUnavailableException(
        $"The secret {Finding.Quote(name)} for the readings was not found. Put it in the folder of secrets or in the environment.");

    private string? Find(string name) => !Slug.IsValid(name)
        ? null
        : File(folder, name) ?? File(environment("CREDENTIALS_DIRECTORY"), name) ?? environment("LABWATCH_SECRET_" + name.ToUpperInvariant().Replace('-', '_'));

    private static string? File(string? folder, string name)
    {
        string? path = string.IsNullOrEmpty(folder) ? null : Path.Combine(folder, name);
        return path is not null && System.IO.File.Exists(path) ? System.IO.File.ReadAllText(path).TrimEnd('\r', '\n') : null;
    }
}
