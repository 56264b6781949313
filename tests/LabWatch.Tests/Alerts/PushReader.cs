using System.Buffers.Binary;
using System.Security.Cryptography;
using System.Text;

namespace LabWatch.Tests.Alerts;

/// <summary>
/// The browser's end of a push message: a subscription's keys, and reading by RFC 8291 and RFC 8188 step by step, without the code that is under test.
/// </summary>
internal sealed class PushReader : IDisposable
{
    private readonly ECDiffieHellman _key;
    private readonly byte[] _secret;

    public PushReader(ECDiffieHellman? key = null, byte[]? secret = null)
    {
        _key = key ?? ECDiffieHellman.Create(ECCurve.NamedCurves.nistP256);
        _secret = secret ?? RandomNumberGenerator.GetBytes(16);
        ECPoint point = _key.ExportParameters(false).Q;
        PublicKey = [4, .. point.X!, .. point.Y!];
    }

    public byte[] PublicKey { get; }

    public byte[] Secret => _secret;

    public byte[] Read(byte[] body)
    {
        byte[] salt = body[..16];
        Assert.Equal(4096u, BinaryPrimitives.ReadUInt32BigEndian(body.AsSpan(16)));
        int length = body[20];
        byte[] sender = body[21..(21 + length)];
        byte[] sealed_ = body[(21 + length)..];
        using ECDiffieHellman peer = ECDiffieHellman.Create(new ECParameters { Curve = ECCurve.NamedCurves.nistP256, Q = new ECPoint { X = sender[1..33], Y = sender[33..] } });
        byte[] shared = _key.DeriveRawSecretAgreement(peer.PublicKey);

        // HKDF by its definition (RFC 5869): extract, then one block of expand.
        byte[] prk = HMACSHA256.HashData(_secret, shared);
        byte[] material = HMACSHA256.HashData(prk, (byte[])[.. "WebPush: info\0"u8, .. PublicKey, .. sender, 1]);
        byte[] second = HMACSHA256.HashData(salt, material);
        byte[] key = HMACSHA256.HashData(second, (byte[])[.. Encoding.ASCII.GetBytes("Content-Encoding: aes128gcm\0"), 1])[..16];
        byte[] nonce = HMACSHA256.HashData(second, (byte[])[.. Encoding.ASCII.GetBytes("Content-Encoding: nonce\0"), 1])[..12];
        byte[] plain = new byte[sealed_.Length - 16];
        using AesGcm cipher = new(key, 16);
        cipher.Decrypt(nonce, sealed_.AsSpan(0, plain.Length), sealed_.AsSpan(plain.Length), plain);
        Assert.Equal(2, plain[^1]);
        return plain[..^1];
    }

    public void Dispose() => _key.Dispose();
}
