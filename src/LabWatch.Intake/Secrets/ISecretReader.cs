namespace LabWatch.Intake.Secrets;

/// <summary>Reads secrets by name at the moment of use, so that a changed one counts at the next connection.</summary>
public interface ISecretReader
{
    /// <summary>The secret of a name; null where there is none. Throws <see cref="IOException"/> where a file exists and cannot be read.</summary>
    string? Read(string name);
}
