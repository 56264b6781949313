using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using System.Text.RegularExpressions;
using Konscious.Security.Cryptography;

namespace LabWatch.Records.Accounts.Passwords;

/// <summary>
/// Makes and checks salted, slow hashes of passwords (Argon2id, RFC 9106). A hash names its parameters, so that they can grow. Only a few
/// run at once and few wait: a flood of sign-ins takes neither the processor nor the memory of the service.
/// </summary>
/// <param name="cost">What a new hash costs.</param>
public sealed partial class PasswordHasher(PasswordCost cost) : IDisposable
{
    private const int SaltBytes = 16;
    private const int HashBytes = 32;
    private const int MostMemoryKibibytes = 1 << 20;
    private const int MostPasses = 64;

    /// <summary>Sign-ins that wait for their turn at most.</summary>
    public const int LongestQueue = 32;

    private readonly SemaphoreSlim _running = new(AtOnce);
    private int _waiting;

    /// <summary>Hashes that run at once: half of the processors, at least one, at most four.</summary>
    public static int AtOnce => Math.Clamp(Environment.ProcessorCount / 2, 1, 4);

    /// <summary>The hash of a password; null where too many wait already.</summary>
    public async ValueTask<PasswordHash?> HashAsync(string password, CancellationToken cancellationToken)
    {
        byte[] salt = RandomNumberGenerator.GetBytes(SaltBytes);
        byte[]? hash = await DeriveAsync(password, salt, cost, cancellationToken);
        return hash is null
            ? null
            : new PasswordHash(string.Create(CultureInfo.InvariantCulture, $"$argon2id$v=19$m={cost.MemoryKibibytes},t={cost.Passes},p=1${Base64(salt)}${Base64(hash)}"));
    }

    /// <summary>
    /// Whether a password is that of a hash; null where too many wait already. Without a hash it takes as long, and is not.
    /// </summary>
    public async ValueTask<bool?> IsAsync(string password, PasswordHash? stored, CancellationToken cancellationToken)
    {
        if (stored is null || Parse(stored) is not { } known)
        {
            return await DeriveAsync(password, new byte[SaltBytes], cost, cancellationToken) is null ? null : false;
        }

        byte[]? hash = await DeriveAsync(password, known.Salt, known.Cost, cancellationToken);
        return hash is null ? null : CryptographicOperations.FixedTimeEquals(hash, known.Hash);
    }

    /// <summary>Whether a hash was made at a lower cost than a new one is.</summary>
    public bool IsOutgrown(PasswordHash stored) =>
        Parse(stored) is not { } known || known.Cost.MemoryKibibytes < cost.MemoryKibibytes || known.Cost.Passes < cost.Passes;

    /// <inheritdoc/>
    public void Dispose() => _running.Dispose();

    private async ValueTask<byte[]?> DeriveAsync(string password, byte[] salt, PasswordCost at, CancellationToken cancellationToken)
    {
        if (Interlocked.Increment(ref _waiting) > AtOnce + LongestQueue)
        {
            Interlocked.Decrement(ref _waiting);
            return null;
        }

        try
        {
            await _running.WaitAsync(cancellationToken);
            try
            {
                // The library takes no empty password; no account has one.
                byte[] bytes = Encoding.UTF8.GetBytes(PasswordPolicy.Normalise(password));
                using Argon2id argon = new(bytes.Length > 0 ? bytes : [0])
                {
                    Salt = salt,
                    MemorySize = at.MemoryKibibytes,
                    Iterations = at.Passes,
                    DegreeOfParallelism = 1,
                };
                return await argon.GetBytesAsync(HashBytes);
            }
            finally
            {
                _running.Release();
            }
        }
        finally
        {
            Interlocked.Decrement(ref _waiting);
        }
    }

    private static (PasswordCost Cost, byte[] Salt, byte[] Hash)? Parse(PasswordHash stored)
    {
        Match match = Form().Match(stored.Text);
        if (!match.Success)
        {
            return null;
        }

        PasswordCost at = new(int.Parse(match.Groups["m"].Value, CultureInfo.InvariantCulture), int.Parse(match.Groups["t"].Value, CultureInfo.InvariantCulture));
        return at.MemoryKibibytes is >= 8 and <= MostMemoryKibibytes && at.Passes is >= 1 and <= MostPasses
            ? (at, FromBase64(match.Groups["salt"].Value), FromBase64(match.Groups["hash"].Value))
            : null;
    }

    private static string Base64(byte[] bytes) => Convert.ToBase64String(bytes).TrimEnd('=');

    private static byte[] FromBase64(string text) => Convert.FromBase64String(text.PadRight(text.Length + ((4 - (text.Length % 4)) % 4), '='));

    // 16 bytes of salt and 32 of hash, in base64 without padding.
    [GeneratedRegex(@"^\$argon2id\$v=19\$m=(?<m>[0-9]{1,8}),t=(?<t>[0-9]{1,3}),p=1\$(?<salt>[A-Za-z0-9+/]{22})\$(?<hash>[A-Za-z0-9+/]{43})$", RegexOptions.CultureInvariant | RegexOptions.ExplicitCapture)]
    private static partial Regex Form();
}
