using System.Buffers.Text;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using LabWatch.Intake.Spool;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Accounts;

/// <summary>
/// Accounts of devices in a file that the service's account alone may read, so that devices can connect while no database answers. Of a
/// password, 256 random bits, the SHA-256 is stored: with that many bits one round is enough.
/// </summary>
internal sealed class DeviceAccountFile : IDeviceAccounts
{
    private const int PasswordBytes = 32;
    private readonly Lock _lock = new();
    private readonly string _path;
    private Dictionary<string, Kept> _accounts;

    /// <summary>Reads the file. Throws <see cref="IOException"/>, <see cref="UnauthorizedAccessException"/> or <see cref="JsonException"/> where it is there and cannot be read.</summary>
    public DeviceAccountFile(string path)
    {
        _path = path;
        Kept[] kept = File.Exists(path) ? JsonSerializer.Deserialize<Kept[]>(File.ReadAllBytes(path)) ?? [] : [];
        _accounts = kept.ToDictionary(account => account.Name, StringComparer.Ordinal);
    }

    /// <summary>Gets the name of an account that was taken back.</summary>
    public event Action<string>? Revoked;

    /// <inheritdoc/>
    public IReadOnlyList<DeviceAccount> List()
    {
        lock (_lock)
        {
            return [.. _accounts.Values.OrderBy(account => account.Name, StringComparer.Ordinal).Select(account => account.Shown)];
        }
    }

    /// <inheritdoc/>
    public string? Add(string name, SourceKey source, string by, Instant at)
    {
        if (!Slug.IsValid(name))
        {
            throw new ArgumentException("The name of an account is a slug.", nameof(name));
        }

        string password = Base64Url.EncodeToString(RandomNumberGenerator.GetBytes(PasswordBytes));
        lock (_lock)
        {
            if (_accounts.ContainsKey(name))
            {
                return null;
            }

            Write(new Dictionary<string, Kept>(_accounts, StringComparer.Ordinal)
            {
                [name] = new Kept(name, source.ToString(), at.Microseconds, by, null, DigestOf(password)),
            });
        }

        return password;
    }

    /// <inheritdoc/>
    public bool Revoke(string name, Instant at)
    {
        lock (_lock)
        {
            if (!_accounts.TryGetValue(name, out Kept? account) || account.RevokedAt is not null)
            {
                return false;
            }

            Write(new Dictionary<string, Kept>(_accounts, StringComparer.Ordinal) { [name] = account with { RevokedAt = at.Microseconds } });
        }

        Revoked?.Invoke(name);
        return true;
    }

    /// <summary>The account of a name and password; null where they do not belong together or it was taken back.</summary>
    public DeviceAccount? Find(string name, ReadOnlySpan<byte> password)
    {
        Kept? account;
        lock (_lock)
        {
            account = _accounts.GetValueOrDefault(name);
        }

        Span<byte> digest = stackalloc byte[SHA256.HashSizeInBytes];
        SHA256.HashData(password, digest);
        return account is { RevokedAt: null } && CryptographicOperations.FixedTimeEquals(digest, Convert.FromHexString(account.Digest)) ? account.Shown : null;
    }

    private static string DigestOf(string password) => Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(password)));

    private void Write(Dictionary<string, Kept> accounts)
    {
        string fresh = _path + ".new";
        File.Delete(fresh);
        FileStreamOptions options = new() { Mode = FileMode.CreateNew, Access = FileAccess.Write };
        if (!OperatingSystem.IsWindows())
        {
            options.UnixCreateMode = UnixFileMode.UserRead | UnixFileMode.UserWrite;
        }

        using (FileStream stream = new(fresh, options))
        {
            JsonSerializer.Serialize(stream, accounts.Values.OrderBy(account => account.Name, StringComparer.Ordinal));
            stream.Flush(flushToDisk: true);
        }

        File.Move(fresh, _path, overwrite: true);
        DirectoryFlush.Flush(Path.GetDirectoryName(_path)!);
        _accounts = accounts;
    }

    private sealed record Kept(string Name, string Source, long CreatedAt, string CreatedBy, long? RevokedAt, string Digest)
    {
        [System.Text.Json.Serialization.JsonIgnore]
        public DeviceAccount Shown => new(Name, Source, new Instant(CreatedAt), CreatedBy, RevokedAt is { } at ? new Instant(at) : null);
    }
}
