namespace LabWatch.Records.Accounts.Passwords;

/// <summary>
/// What one hash of a password costs, with Argon2id (RFC 9106). No option sets it, so that no installation is weak by accident; only a test
/// registers a smaller one.
/// </summary>
/// <param name="MemoryKibibytes">Memory, KiB.</param>
/// <param name="Passes">Passes over the memory.</param>
public sealed record PasswordCost(int MemoryKibibytes, int Passes)
{
    /// <summary>19 MiB and two passes in one lane: the least that the OWASP Password Storage Cheat Sheet names for Argon2id (from memory).</summary>
    public static PasswordCost Standard { get; } = new(19_456, 2);
}
