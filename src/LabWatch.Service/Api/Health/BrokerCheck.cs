using System.Globalization;
using LabWatch.Intake.Diagnostics;

namespace LabWatch.Service.Api.Health;

/// <summary>Looks at the links to the brokers, and whether readings become durable.</summary>
internal sealed class BrokerCheck(IIntakeState intake) : IDependencyCheck
{
    /// <inheritdoc/>
    public string Part => "broker";

    /// <inheritdoc/>
    public ValueTask<DependencyAnswer> AskAsync(CancellationToken cancellationToken)
    {
        bool isLinked = intake.Link is BrokerLinkState.Connected || (intake.Link is BrokerLinkState.None && intake.EmbeddedPort is not null);
        string link = intake.Link is BrokerLinkState.None ? "no external broker" : "external broker: " + Names.Of(intake.Link);
        string embedded = intake.EmbeddedPort is { } port ? string.Create(CultureInfo.InvariantCulture, $", embedded broker on port {port}") : string.Empty;
        string note = intake.LinkNote is { } said ? " (" + said + ")" : string.Empty;
        string commits = intake.CommitsStopped ? "; nothing can be made durable now" : string.Empty;
        string spool = string.Create(CultureInfo.InvariantCulture, $"; {intake.SpoolLength} messages in the spool.");
        string leaps = string.Concat(intake.Clocks.Where(clock => clock.Value.State is DeviceClockState.LeaptAhead or DeviceClockState.LeaptBack)
            .Select(clock => string.Create(CultureInfo.InvariantCulture, $" The clock of the device of {clock.Key} has leapt by {clock.Value.LeapSeconds:F0} s: its readings go to quarantine.")));
        return new(new DependencyAnswer(isLinked && !intake.CommitsStopped, link + note + embedded + commits + spool + leaps));
    }
}
