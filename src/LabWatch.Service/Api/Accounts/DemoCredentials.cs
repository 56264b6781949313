using System.Collections.Frozen;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Records.Accounts.Passwords;

namespace LabWatch.Service.Api.Accounts;

/// <summary>
/// The codes with which a demo's invented people sign in: drawn at the start, held in memory alone, worth nothing once the process has
/// ended. Empty everywhere but in a demo.
/// </summary>
internal sealed class DemoCredentials
{
    private readonly FrozenDictionary<string, byte[]> _digests;

    /// <summary>Nobody has a code.</summary>
    public DemoCredentials()
        : this([])
    {
    }

    private DemoCredentials(IReadOnlyList<(string Name, string Code)> codes)
    {
        Codes = codes;
        _digests = codes.ToFrozenDictionary(code => code.Name, code => Digest(code.Code), StringComparer.Ordinal);
    }

    /// <summary>The codes, to be shown once.</summary>
    public IReadOnlyList<(string Name, string Code)> Codes { get; }

    /// <summary>Draws codes for accounts.</summary>
    public static DemoCredentials For(IEnumerable<string> names) => new([.. names.Select(name => (name, OneTimePassword.Draw()))]);

    /// <summary>Whether a text is the code of an account.</summary>
    public bool Is(string name, string code) =>
        _digests.TryGetValue(name, out byte[]? digest) && CryptographicOperations.FixedTimeEquals(digest, Digest(code.Trim()));

    // 100 random bits: one round of a hash is enough to compare without telling by time.
    private static byte[] Digest(string code) => SHA256.HashData(Encoding.UTF8.GetBytes(code));
}
