using System.Buffers.Binary;
using System.Security.Cryptography;
using System.Text;

namespace LabWatch.Alerts.Push;

/// <summary>
/// Encrypts a message for a Web Push subscription: RFC 8291 (key agreement on P-256, HKDF with SHA-256) with the content coding
/// <c>aes128gcm</c> of RFC 8188 in a single record.
/// </summary>
internal static class PushEncryption
{
    /// <summary>Bytes of an uncompressed point on P-256.</summary>
    public const int PointLength = 65;

    /// <summary>Bytes of the authentication secret of a subscription.</summary>
    public const int SecretLength = 16;

    /// <summary>Largest plaintext in bytes: a push service need take no more than 4096 bytes of body (RFC 8291, section 4).</summary>
    public const int LargestPlaintext = 4096 - HeaderLength - 1 - TagLength;

    private const int SaltLength = 16;
    private const int TagLength = 16;
    private const int HeaderLength = SaltLength + 4 + 1 + PointLength;
    private const int RecordSize = 4096;

    /// <summary>The body of a push message.</summary>
    /// <param name="plaintext">What the page's worker gets, at most <see cref="LargestPlaintext"/> bytes.</param>
    /// <param name="receiver">Public key of the subscription, an uncompressed point.</param>
    /// <param name="secret">Authentication secret of the subscription, 16 bytes.</param>
    public static byte[] Encrypt(ReadOnlySpan<byte> plaintext, ReadOnlySpan<byte> receiver, ReadOnlySpan<byte> secret)
    {
        using ECDiffieHellman sender = ECDiffieHellman.Create(ECCurve.NamedCurves.nistP256);
        return Encrypt(plaintext, receiver, secret, sender, RandomNumberGenerator.GetBytes(SaltLength));
    }

    /// <summary>The same with a given sender's key and salt, for checking against published examples. Each key and salt is used once only.</summary>
    public static byte[] Encrypt(ReadOnlySpan<byte> plaintext, ReadOnlySpan<byte> receiver, ReadOnlySpan<byte> secret, ECDiffieHellman sender, ReadOnlySpan<byte> salt)
    {
        ArgumentOutOfRangeException.ThrowIfGreaterThan(plaintext.Length, LargestPlaintext);
        using ECDiffieHellman peer = ECDiffieHellman.Create(Point(receiver));
        byte[] own = Point(sender.ExportParameters(includePrivateParameters: false));
        byte[] shared = sender.DeriveRawSecretAgreement(peer.PublicKey);

        // RFC 8291, section 3.4: the authentication secret and both public keys go into the key material.
        byte[] info = [.. "WebPush: info\0"u8, .. receiver, .. own];
        byte[] material = HKDF.DeriveKey(HashAlgorithmName.SHA256, shared, 32, secret.ToArray(), info);
        byte[] key = HKDF.DeriveKey(HashAlgorithmName.SHA256, material, 16, salt.ToArray(), Encoding.ASCII.GetBytes("Content-Encoding: aes128gcm\0"));
        byte[] nonce = HKDF.DeriveKey(HashAlgorithmName.SHA256, material, 12, salt.ToArray(), Encoding.ASCII.GetBytes("Content-Encoding: nonce\0"));
        CryptographicOperations.ZeroMemory(shared);

        byte[] body = new byte[HeaderLength + plaintext.Length + 1 + TagLength];
        salt.CopyTo(body);
        BinaryPrimitives.WriteUInt32BigEndian(body.AsSpan(SaltLength), RecordSize);
        body[SaltLength + 4] = PointLength;
        own.CopyTo(body, SaltLength + 5);

        // The last (and only) record ends with the delimiter 2 (RFC 8188, section 2).
        byte[] record = [.. plaintext, 2];
        using AesGcm cipher = new(key, TagLength);
        cipher.Encrypt(nonce, record, body.AsSpan(HeaderLength, record.Length), body.AsSpan(HeaderLength + record.Length));
        return body;
    }

    /// <summary>Whether bytes are a point on P-256 that a key can be agreed with.</summary>
    public static bool IsPoint(ReadOnlySpan<byte> point)
    {
        if (point.Length != PointLength || point[0] != 4)
        {
            return false;
        }

        try
        {
            using ECDiffieHellman key = ECDiffieHellman.Create(Point(point));
            return true;
        }
        catch (CryptographicException)
        {
            return false;
        }
    }

    /// <summary>The uncompressed form of a public key.</summary>
    public static byte[] Point(ECParameters key) => [4, .. key.Q.X!, .. key.Q.Y!];

    private static ECParameters Point(ReadOnlySpan<byte> point) => new()
    {
        Curve = ECCurve.NamedCurves.nistP256,
        Q = new ECPoint { X = point[1..33].ToArray(), Y = point[33..].ToArray() },
    };
}
