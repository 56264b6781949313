using System.Net;
using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Options;

/// <summary>The broker inside this process, for devices that publish straight to it.</summary>
public sealed record EmbeddedBrokerOptions
{
    /// <summary>Address to listen on. Default 127.0.0.1: only this machine.</summary>
    public string Address { get; init; } = "127.0.0.1";

    /// <summary>Port to listen on, 0 to 65535; 0 takes a free one. Default 1883.</summary>
    public int Port { get; init; } = 1883;

    /// <summary>Whether to speak TLS, with the certificate of the pages. Default false.</summary>
    public bool Tls { get; init; }

    /// <summary>
    /// File (PEM) of the authorities whose client certificates are taken; a device without one is turned away. Null where none is asked for.
    /// </summary>
    public string? ClientAuthorities { get; init; }

    /// <summary>Whether every device must have an account. Default false; an account that is given is checked in any case.</summary>
    public bool RequireAccounts { get; init; }

    /// <summary>Whether to listen beyond this machine without TLS or without accounts. Default false.</summary>
    public bool AllowOpen { get; init; }

    /// <summary>Largest MQTT packet taken from a client, bytes, 1 KiB to 64 MiB. Default 2 MiB.</summary>
    public int MaximumPacketBytes { get; init; } = 2 << 20;

    /// <summary>Most clients at once, 1 to 100000. Default 1000.</summary>
    public int MaximumConnections { get; init; } = 1_000;

    /// <summary>Most sessions, those of clients that are away included, 1 to 1000000. Default 10000.</summary>
    public int MaximumSessions { get; init; } = 10_000;

    /// <summary>Most messages waiting for one subscriber; the oldest go first. 1 to 100000. Default 1000.</summary>
    public int MaximumPendingMessages { get; init; } = 1_000;

    /// <summary>Most messages of one device that wait for their commit; then its connection is read no further. 1 to 65535. Default 500.</summary>
    public int MaximumUnderWay { get; init; } = 500;

    /// <summary>Most messages of one connection in a second, bursts of two seconds' worth permitted; what is more is refused. 1 to 1000000. Default 5000.</summary>
    public int MaximumMessagesPerSecond { get; init; } = 5_000;

    /// <summary>Longest wait for a commit before a message is refused; half of the client's keep-alive where that is shorter. 100 ms to 30 s. Default 2 s.</summary>
    public TimeSpan CommitWait { get; init; } = TimeSpan.FromSeconds(2);

    /// <summary>Everything wrong with these options.</summary>
    /// <param name="where">Name of the option that holds them.</param>
    public IEnumerable<Finding> Validate(string where) =>
    [
        .. OptionCheck.Must(IPAddress.TryParse(Address, out _), $"{where}.{nameof(Address)}", "This is no IP address.", Address, "Set 127.0.0.1 or the address of one network card."),
        .. OptionCheck.Range($"{where}.{nameof(Port)}", Port, 0, 65_535),
        .. OptionCheck.Must(
            AllowOpen || (Tls && RequireAccounts) || !IPAddress.TryParse(Address, out IPAddress? address) || IPAddress.IsLoopback(address), $"{where}.{nameof(Address)}", "Beyond this machine anybody could publish readings, and read passwords on the way.", Address, $"Set {nameof(Tls)} and {nameof(RequireAccounts)}, or {nameof(AllowOpen)} on a network of its own."),
        .. OptionCheck.Must(ClientAuthorities is null || Tls, $"{where}.{nameof(ClientAuthorities)}", "Client certificates need TLS.", ClientAuthorities, $"Set {nameof(Tls)}."),
        .. ClientAuthorities is { } authorities ? PemFile.Check($"{where}.{nameof(ClientAuthorities)}", authorities) : [],
        .. OptionCheck.Range($"{where}.{nameof(MaximumPacketBytes)}", MaximumPacketBytes, 1 << 10, 64 << 20),
        .. OptionCheck.Range($"{where}.{nameof(MaximumConnections)}", MaximumConnections, 1, 100_000),
        .. OptionCheck.Range($"{where}.{nameof(MaximumSessions)}", MaximumSessions, 1, 1_000_000),
        .. OptionCheck.Range($"{where}.{nameof(MaximumPendingMessages)}", MaximumPendingMessages, 1, 100_000),
        .. OptionCheck.Range($"{where}.{nameof(MaximumUnderWay)}", MaximumUnderWay, 1, 65_535),
        .. OptionCheck.Range($"{where}.{nameof(MaximumMessagesPerSecond)}", MaximumMessagesPerSecond, 1, 1_000_000),
        .. OptionCheck.Range($"{where}.{nameof(CommitWait)}", CommitWait, TimeSpan.FromMilliseconds(100), TimeSpan.FromSeconds(30)),
    ];
}
