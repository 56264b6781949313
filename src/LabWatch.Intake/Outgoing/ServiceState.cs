using System.Text.Json;
using LabWatch.Intake.Options;
using LabWatch.Lab;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Outgoing;

/// <summary>
/// What the service says about itself at <c>lab-out/SITE/service/INSTALLATION</c>: <c>online</c> or <c>watching-only</c> at each connection,
/// <c>stopped</c> when it leaves, and <c>lost</c> by the broker (the last will) when it is gone without a word.
/// </summary>
internal sealed class ServiceState(IntakeOptions options, ILabSnapshotSource lab, TimeProvider clock)
{
    public const string Online = "online";
    public const string WatchingOnly = "watching-only";
    public const string Stopped = "stopped";
    public const string Lost = "lost";

    /// <summary>The topic in full.</summary>
    public string Topic => $"{options.OutRoot}/{lab.Current.Site.Id}/service/{options.InstallationId}";

    /// <summary>The message of a state, from now on.</summary>
    public byte[] Message(string state) => JsonSerializer.SerializeToUtf8Bytes(new Dictionary<string, string>
    {
        ["state"] = state,
        ["since"] = Instant.Now(clock).ToString(),
    });

    /// <summary>The last will: the broker sends it at a time that is not known beforehand, so it says since when the connection was up.</summary>
    public byte[] Will() => JsonSerializer.SerializeToUtf8Bytes(new Dictionary<string, string>
    {
        ["state"] = Lost,
        ["connectedAt"] = Instant.Now(clock).ToString(),
    });
}
