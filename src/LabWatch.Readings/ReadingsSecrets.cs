using LabWatch.Lab.Findings;
using LabWatch.Lab.Secrets;

namespace LabWatch.Readings;

/// <summary>Finds the password or token of a database by its name.</summary>
internal sealed class ReadingsSecrets(string? folder)
{
    private readonly NamedSecrets _secrets = new(folder, Environment.GetEnvironmentVariable);

    /// <summary>The secret; null where no name is given. Throws <see cref="StoreUnavailableException"/> where the name leads nowhere.</summary>
    public string? Read(string? name) => name is null ? null : _secrets.Read(name) ?? throw new StoreUnavailableException(
        $"The secret {Finding.Quote(name)} for the readings was not found. Put it in the folder of secrets, or in the environment as {NamedSecrets.VariableOf(name)}.");
}
