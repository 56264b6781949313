using System.Buffers.Text;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Push;

/// <summary>Keeps the subscriptions in <c>keys/push-subscriptions.json</c> of the data folder: they hold secrets of browsers.</summary>
internal sealed class PushDesk : IPushDesk
{
    /// <summary>What the id of a subscription's notifier begins with.</summary>
    public const string NotifierPrefix = "push-";

    private const int MostOfOne = 20;
    private const int LongestEndpoint = 2000;

    private readonly Lock _gate = new();
    private readonly string _path;
    private readonly AlertsOptions _options;
    private readonly PushKeys _keys;
    private readonly TimeProvider _clock;
    private volatile IReadOnlyList<PushSubscription> _all;
    private volatile IReadOnlyList<Notifier> _notifiers;

    public PushDesk(AlertsOptions options, PushKeys keys, TimeProvider clock, ILogger<PushDesk> logger)
    {
        _options = options;
        _keys = keys;
        _clock = clock;
        _path = Path.Combine(options.DataDirectory, "keys", "push-subscriptions.json");
        _all = Read(_path, logger);
        _notifiers = [.. _all.Select(NotifierOf)];
    }

    /// <inheritdoc/>
    public string PublicKey => _keys.PublicKey;

    /// <summary>The notifiers that the subscriptions are.</summary>
    public IReadOnlyList<Notifier> Notifiers => _notifiers;

    /// <inheritdoc/>
    public IReadOnlyList<PushSubscription> DevicesOf(string account) =>
        [.. _all.Where(one => string.Equals(one.Account, account, StringComparison.Ordinal))];

    /// <summary>The subscription that a notifier is; null where it is gone.</summary>
    public PushSubscription? Find(string notifier) =>
        _all.FirstOrDefault(one => string.Equals(NotifierPrefix + one.Id, notifier, StringComparison.Ordinal));

    /// <inheritdoc/>
    public string? AccountOf(string notifier) => Find(notifier)?.Account;

    /// <inheritdoc/>
    public (PushSubscription? Made, IReadOnlyList<Finding> Findings) Add(string account, string device, string endpoint, string publicKey, string secret)
    {
        List<Finding> findings = [];
        if (!Uri.TryCreate(endpoint, UriKind.Absolute, out Uri? address) || endpoint.Length > LongestEndpoint || !IsPermitted(address))
        {
            findings.Add(new Finding("bad-endpoint", "/endpoint", "This is no https address of a push service.", Finding.Quote(endpoint), "Send what the browser's subscription says."));
        }

        if (!Decode(publicKey, PushEncryption.PointLength, out byte[] point) || !PushEncryption.IsPoint(point))
        {
            findings.Add(new Finding("bad-key", "/keys/p256dh", "This is no public key of a browser.", null, "Send what the browser's subscription says."));
        }

        if (!Decode(secret, PushEncryption.SecretLength, out _))
        {
            findings.Add(new Finding("bad-key", "/keys/auth", "This is no authentication secret of a browser.", null, "Send what the browser's subscription says."));
        }

        if (findings.Count > 0)
        {
            return (null, findings);
        }

        PushSubscription made = new(
            Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(endpoint)).AsSpan(0, 8)), account, device, address!, publicKey, secret, Instant.Now(_clock));
        lock (_gate)
        {
            IReadOnlyList<PushSubscription> others = [.. _all.Where(one => one.Id != made.Id)];
            if (others.Count(one => string.Equals(one.Account, account, StringComparison.Ordinal)) >= MostOfOne)
            {
                return (null, [new Finding("too-many", "/", "This account has twenty devices already.", null, "Take away those that nobody uses.")]);
            }

            Keep([.. others, made]);
        }

        return (made, []);
    }

    /// <inheritdoc/>
    public bool Remove(string account, string id) => Remove(one => one.Id == id && string.Equals(one.Account, account, StringComparison.Ordinal));

    /// <summary>Forgets a subscription that its push service does not know any more.</summary>
    public void Forget(string id) => Remove(one => one.Id == id);

    private bool Remove(Func<PushSubscription, bool> which)
    {
        lock (_gate)
        {
            IReadOnlyList<PushSubscription> left = [.. _all.Where(one => !which(one))];
            bool any = left.Count < _all.Count;
            if (any)
            {
                Keep(left);
            }

            return any;
        }
    }

    private void Keep(IReadOnlyList<PushSubscription> all)
    {
        Directory.CreateDirectory(Path.GetDirectoryName(_path)!);
        PrivateFile.Write(_path, JsonSerializer.SerializeToUtf8Bytes(all, PushJson.Default.IReadOnlyListPushSubscription));
        _all = all;
        _notifiers = [.. all.Select(NotifierOf)];
    }

    // Plain http goes to this machine only, for a push service of one's own.
    private bool IsPermitted(Uri address) =>
        address.Scheme == Uri.UriSchemeHttps || (_options.PushToLoopback && address.Scheme == Uri.UriSchemeHttp && address.IsLoopback);

    private static bool Decode(string text, int length, out byte[] bytes)
    {
        bytes = Base64Url.IsValid(text, out int decoded) && decoded == length ? Base64Url.DecodeFromChars(text) : [];
        return bytes.Length == length;
    }

    private static Notifier NotifierOf(PushSubscription subscription) => new(NotifierPrefix + subscription.Id, NotifierKind.Push, subscription.Endpoint, null);

    private static IReadOnlyList<PushSubscription> Read(string path, ILogger logger)
    {
        try
        {
            return File.Exists(path) ? JsonSerializer.Deserialize(File.ReadAllBytes(path), PushJson.Default.IReadOnlyListPushSubscription) ?? [] : [];
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException or JsonException)
        {
            // Without them nobody gets push messages; everything else goes on, and it is said.
            Log.SubscriptionsUnreadable(logger, path, exception);
            return [];
        }
    }
}
