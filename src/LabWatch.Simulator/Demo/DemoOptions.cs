using LabWatch.Lab.Findings;

namespace LabWatch.Simulator.Demo;

/// <summary>Options of the demo.</summary>
/// <param name="Days">Days of history made at the first start, 0 to 400. Has no effect once a data directory holds a demo.</param>
/// <param name="Seed">Draws hidden truth, weather, noise and scheduled faults. Has no effect once a data directory holds a demo.</param>
/// <param name="Host">Host of the broker.</param>
/// <param name="Port">Port of the broker.</param>
/// <param name="DataDirectory">The data directory of the service; the demo keeps its state in its folder <c>demo</c>.</param>
public sealed record DemoOptions(int Days, long Seed, string Host, int Port, string DataDirectory)
{
    /// <summary>Days of history where none are given.</summary>
    public const int DefaultDays = 30;

    /// <summary>Seed where none is given.</summary>
    public const long DefaultSeed = 1;

    /// <summary>Root of the topics that the demo publishes to.</summary>
    public string TopicRoot { get; init; } = "lab";

    /// <summary>All that is wrong with the options; empty where nothing is.</summary>
    public IReadOnlyList<Finding> Validate()
    {
        List<Finding> findings = [];
        if (Days is < 0 or > 400)
        {
            findings.Add(new Finding("out-of-range", "days", "The demo makes 0 to 400 days of history.", FormattableString.Invariant($"{Days}"), "Give a number from 0 to 400."));
        }

        if (string.IsNullOrWhiteSpace(Host))
        {
            findings.Add(new Finding("missing", "host", "The demo needs the broker's host.", Host, "Give a host name or address, for example 127.0.0.1."));
        }

        if (Port is < 1 or > 65535)
        {
            findings.Add(new Finding("out-of-range", "mqtt-port", "A port is 1 to 65535.", FormattableString.Invariant($"{Port}"), "Give the port of the broker."));
        }

        if (string.IsNullOrWhiteSpace(DataDirectory))
        {
            findings.Add(new Finding("missing", "data", "The demo needs a data directory.", DataDirectory, "Give a directory with --data."));
        }

        if (string.IsNullOrEmpty(TopicRoot) || TopicRoot.AsSpan().IndexOfAny("+#\0$") >= 0)
        {
            findings.Add(new Finding("not-a-topic", "topic-root", "The root of the topics has no wildcard and no $.", Finding.Quote(TopicRoot), "Use the root that the intake subscribes to, lab by default."));
        }

        return findings;
    }
}
