using System.Buffers.Binary;
using System.Buffers.Text;
using System.Security.Cryptography;
using LabWatch.Alerts.Push;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Links;

/// <summary>Makes and reads links: alert id, end, and HMAC-SHA256 (cut to 16 bytes) under a key of this installation, <c>keys/links.key</c>.</summary>
internal sealed class AlertLinks : IAlertLinks
{
    private const int IdLength = 16;
    private const int TimeLength = 8;
    private const int MacLength = 16;

    private readonly AlertsOptions _options;
    private readonly Lazy<byte[]> _key;

    public AlertLinks(AlertsOptions options)
    {
        _options = options;
        _key = new Lazy<byte[]>(() => Key(Path.Combine(options.DataDirectory, "keys", "links.key")));
    }

    /// <summary>The link to an alert; null where no public address is configured.</summary>
    public string? For(Guid alert, Instant now) => _options.PublicAddress is { } address
        ? $"{address.TrimEnd('/')}/?acknowledge={TokenOf(alert, now + _options.LinkLife)}"
        : null;

    /// <inheritdoc/>
    public Guid? Read(string token, Instant now)
    {
        if (!Base64Url.IsValid(token, out int length) || length != IdLength + TimeLength + MacLength)
        {
            return null;
        }

        byte[] bytes = Base64Url.DecodeFromChars(token);
        ReadOnlySpan<byte> content = bytes.AsSpan(0, IdLength + TimeLength);
        bool isOurs = CryptographicOperations.FixedTimeEquals(Mac(content), bytes.AsSpan(IdLength + TimeLength));
        return isOurs && BinaryPrimitives.ReadInt64BigEndian(content[IdLength..]) > now.Microseconds ? new Guid(content[..IdLength], bigEndian: true) : null;
    }

    private string TokenOf(Guid alert, Instant end)
    {
        byte[] bytes = new byte[IdLength + TimeLength + MacLength];
        alert.TryWriteBytes(bytes, bigEndian: true, out _);
        BinaryPrimitives.WriteInt64BigEndian(bytes.AsSpan(IdLength), end.Microseconds);
        Mac(bytes.AsSpan(0, IdLength + TimeLength)).CopyTo(bytes, IdLength + TimeLength);
        return Base64Url.EncodeToString(bytes);
    }

    private byte[] Mac(ReadOnlySpan<byte> content) => HMACSHA256.HashData(_key.Value, content)[..MacLength];

    private static byte[] Key(string path)
    {
        if (File.Exists(path) && File.ReadAllBytes(path) is { Length: >= 32 } known)
        {
            return known;
        }

        byte[] drawn = RandomNumberGenerator.GetBytes(32);
        Directory.CreateDirectory(Path.GetDirectoryName(path)!);
        PrivateFile.Write(path, drawn);
        return drawn;
    }
}
