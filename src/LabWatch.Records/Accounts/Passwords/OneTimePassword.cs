using System.Security.Cryptography;

namespace LabWatch.Records.Accounts.Passwords;

/// <summary>Random passwords and codes that people read and type once: small letters and digits without those that look alike.</summary>
public static class OneTimePassword
{
    // Crockford's base 32: no i, l, o, u.
    private const string Alphabet = "0123456789abcdefghjkmnpqrstvwxyz";

    /// <summary>Draws one of four groups of five: 100 random bits.</summary>
    public static string Draw() => string.Join('-', Enumerable.Range(0, 4).Select(_ => RandomNumberGenerator.GetString(Alphabet, 5)));
}
