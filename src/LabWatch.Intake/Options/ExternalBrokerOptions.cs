using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Options;

/// <summary>A broker outside this process.</summary>
public sealed record ExternalBrokerOptions
{
    /// <summary>Name or address of the broker.</summary>
    public required string Host { get; init; }

    /// <summary>Its port, 1 to 65535. Default 1883.</summary>
    public int Port { get; init; } = 1883;

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
        .. Secrets.SecretName.Validate($"{where}.{nameof(UserSecret)}", UserSecret),
        .. Secrets.SecretName.Validate($"{where}.{nameof(PasswordSecret)}", PasswordSecret),
    ];
}
