using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Options;

/// <summary>A broker outside this process.</summary>
public sealed record ExternalBrokerOptions
{
    private readonly int? _port;

    /// <summary>Name or address of the broker.</summary>
    public required string Host { get; init; }

    /// <summary>Its port, 1 to 65535. Default 8883 with <see cref="Tls"/>, else 1883.</summary>
    public int Port { get => _port ?? (Tls ? 8_883 : 1_883); init => _port = value; }

    /// <summary>
    /// Whether to speak TLS (1.2 or 1.3). The broker's certificate must then lead to an authority that is trusted and bear the broker's name;
    /// this check cannot be switched off. Default false.
    /// </summary>
    public bool Tls { get; init; }

    /// <summary>File (PEM) of the authorities that are trusted for the broker, instead of those of the system; null for those of the system.</summary>
    public string? Authorities { get; init; }

    /// <summary>Name that the broker's certificate must bear; null for <see cref="Host"/>.</summary>
    public string? ServerName { get; init; }

    /// <summary>File (PFX, or PEM) of the certificate by which the broker knows this service; null for none. Read at each connection.</summary>
    public string? ClientCertificate { get; init; }

    /// <summary>File (PEM) of its key; null where it is in the same file.</summary>
    public string? ClientCertificateKey { get; init; }

    /// <summary>Name of the secret that opens the key; null for none.</summary>
    public string? ClientCertificatePasswordSecret { get; init; }

    /// <summary>Whether a password may be sent without TLS to another machine. Default false.</summary>
    public bool AllowPlainPassword { get; init; }

    /// <summary>Whether to publish the state of service and sources. Default true; the broker must then permit <c>lab-out/#</c>.</summary>
    public bool PublishState { get; init; } = true;

    /// <summary>Whether to speak MQTT 3.1.1 instead of 5. Default false.</summary>
    public bool UseMqtt311 { get; init; }

    /// <summary>How long the broker shall keep the session while this service is away, 1 minute to 136 years (MQTT 5). Default 7 days.</summary>
    public TimeSpan SessionExpiry { get; init; } = TimeSpan.FromDays(7);

    /// <summary>Most QoS 1 messages that the broker may send unacknowledged, 1 to 65535 (MQTT 5). Default 1000.</summary>
    public int ReceiveMaximum { get; init; } = 1_000;

    /// <summary>Keep-alive of the link, 2 s to 10 minutes. Default 15 s.</summary>
    public TimeSpan KeepAlive { get; init; } = TimeSpan.FromSeconds(15);

    /// <summary>How often the link is tested by a ping of our own, 1 s to 5 minutes. Default 10 s.</summary>
    public TimeSpan PingEvery { get; init; } = TimeSpan.FromSeconds(10);

    /// <summary>How long an answer (to a ping, a connect, a subscribe) may take, 100 ms to 1 minute. Default 5 s.</summary>
    public TimeSpan AnswerWithin { get; init; } = TimeSpan.FromSeconds(5);

    /// <summary>After how long without any message the link is made anew, 10 s to 1 day; null for never. Default 5 minutes.</summary>
    public TimeSpan? QuietLimit { get; init; } = TimeSpan.FromMinutes(5);

    /// <summary>Longest wait between two attempts to connect, 1 s to 10 minutes. Default 30 s.</summary>
    public TimeSpan LongestRetry { get; init; } = TimeSpan.FromSeconds(30);

    /// <summary>How long a session that another client took is left alone, 1 s to 1 day. Default 10 minutes.</summary>
    public TimeSpan TakenOverPause { get; init; } = TimeSpan.FromMinutes(10);

    /// <summary>Name of the secret that holds the user name; null for none.</summary>
    public string? UserSecret { get; init; }

    /// <summary>Name of the secret that holds the password; null for none.</summary>
    public string? PasswordSecret { get; init; }

    /// <summary>Everything wrong with these options.</summary>
    /// <param name="where">Name of the option that holds them.</param>
    public IEnumerable<Finding> Validate(string where) =>
    [
        .. OptionCheck.Must(Uri.CheckHostName(Host) != UriHostNameType.Unknown, $"{where}.{nameof(Host)}", "This is neither a host name nor an address.", Host, "Set the broker's name or address without a scheme."),
        .. OptionCheck.Range($"{where}.{nameof(Port)}", Port, 1, 65_535),
        .. OptionCheck.Range($"{where}.{nameof(SessionExpiry)}", SessionExpiry, TimeSpan.FromMinutes(1), TimeSpan.FromSeconds(uint.MaxValue)),
        .. OptionCheck.Range($"{where}.{nameof(ReceiveMaximum)}", ReceiveMaximum, 1, 65_535),
        .. OptionCheck.Range($"{where}.{nameof(KeepAlive)}", KeepAlive, TimeSpan.FromSeconds(2), TimeSpan.FromMinutes(10)),
        .. OptionCheck.Range($"{where}.{nameof(PingEvery)}", PingEvery, TimeSpan.FromSeconds(1), TimeSpan.FromMinutes(5)),
        .. OptionCheck.Range($"{where}.{nameof(AnswerWithin)}", AnswerWithin, TimeSpan.FromMilliseconds(100), TimeSpan.FromMinutes(1)),
        .. QuietLimit is { } quiet ? OptionCheck.Range($"{where}.{nameof(QuietLimit)}", quiet, TimeSpan.FromSeconds(10), TimeSpan.FromDays(1)) : [],
        .. OptionCheck.Range($"{where}.{nameof(LongestRetry)}", LongestRetry, TimeSpan.FromSeconds(1), TimeSpan.FromMinutes(10)),
        .. OptionCheck.Range($"{where}.{nameof(TakenOverPause)}", TakenOverPause, TimeSpan.FromSeconds(1), TimeSpan.FromDays(1)),
        .. OptionCheck.Must(PasswordSecret is null || UserSecret is not null, $"{where}.{nameof(PasswordSecret)}", "A password needs a user.", PasswordSecret, $"Set {nameof(UserSecret)} too."),
        .. ValidateTls(where),
        .. SecretName.Validate($"{where}.{nameof(UserSecret)}", UserSecret),
        .. SecretName.Validate($"{where}.{nameof(PasswordSecret)}", PasswordSecret),
    ];
    private IEnumerable<Finding> ValidateTls(string where) =>
    [
        .. OptionCheck.Must(Tls || (Authorities ?? ServerName ?? ClientCertificate) is null, $"{where}.{nameof(Tls)}", "Certificates and the server's name need TLS.", null, $"Set {nameof(Tls)}."),
        .. OptionCheck.Must(
            Tls || AllowPlainPassword || PasswordSecret is null || IsThisMachine(Host), $"{where}.{nameof(Tls)}", "The password would go over the network in the open.", null, $"Set {nameof(Tls)}, or {nameof(AllowPlainPassword)} on a network of its own."),
        .. OptionCheck.Must(ServerName is null || Uri.CheckHostName(ServerName) != UriHostNameType.Unknown, $"{where}.{nameof(ServerName)}", "This is neither a host name nor an address.", ServerName, "Set the name in the broker's certificate."),
        .. OptionCheck.Must(ClientCertificate is not null || (ClientCertificateKey ?? ClientCertificatePasswordSecret) is null, $"{where}.{nameof(ClientCertificate)}", "A key needs its certificate.", null, "Set the certificate."),
        .. Authorities is { } authorities ? PemFile.Check($"{where}.{nameof(Authorities)}", authorities) : [],
        .. ClientCertificate is { } certificate ? PemFile.CheckThere($"{where}.{nameof(ClientCertificate)}", certificate) : [],
        .. ClientCertificateKey is { } key ? PemFile.CheckThere($"{where}.{nameof(ClientCertificateKey)}", key) : [],
        .. SecretName.Validate($"{where}.{nameof(ClientCertificatePasswordSecret)}", ClientCertificatePasswordSecret),
    ];

    private static bool IsThisMachine(string host) =>
        host == "localhost" || (System.Net.IPAddress.TryParse(host, out System.Net.IPAddress? address) && System.Net.IPAddress.IsLoopback(address));
}
