using System.Buffers.Text;
using System.Security.Cryptography;
using System.Text;

namespace LabWatch.Records.Accounts;

/// <summary>
/// Secrets of sessions and tokens: 256 random bits. With that many, one round of SHA-256 is enough to keep the stored digest useless to a
/// thief. A token ends in a checksum, so that a mistyped one, or one found in a text, is known without a database.
/// </summary>
public static class Secret
{
    /// <summary>What every token begins with.</summary>
    public const string TokenPrefix = "lw_";

    private const int Bytes = 32;
    private const int Check = 4;
    private const int TokenLength = 48;

    /// <summary>Draws the secret of a session.</summary>
    public static string DrawSession() => Base64Url.EncodeToString(RandomNumberGenerator.GetBytes(Bytes));

    /// <summary>Draws a token.</summary>
    public static string DrawToken()
    {
        byte[] bytes = new byte[Bytes + Check];
        RandomNumberGenerator.Fill(bytes.AsSpan(0, Bytes));
        SHA256.HashData(bytes.AsSpan(0, Bytes)).AsSpan(0, Check).CopyTo(bytes.AsSpan(Bytes));
        return TokenPrefix + Base64Url.EncodeToString(bytes);
    }

    /// <summary>Whether a text has the form of a token and the right checksum.</summary>
    public static bool IsToken(string text)
    {
        ArgumentNullException.ThrowIfNull(text);
        Span<byte> bytes = stackalloc byte[Bytes + Check];
        return text.Length == TokenPrefix.Length + TokenLength
            && text.StartsWith(TokenPrefix, StringComparison.Ordinal)
            && Base64Url.IsValid(text.AsSpan(TokenPrefix.Length))
            && Base64Url.TryDecodeFromChars(text.AsSpan(TokenPrefix.Length), bytes, out int written)
            && written == bytes.Length
            && SHA256.HashData(bytes[..Bytes]).AsSpan(0, Check).SequenceEqual(bytes[Bytes..]);
    }

    /// <summary>What is stored of a secret.</summary>
    public static string DigestOf(string secret) => Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(secret)));
}
