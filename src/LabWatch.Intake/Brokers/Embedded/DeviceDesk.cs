using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Intake.Pipeline;
using Microsoft.Extensions.Logging;
using MQTTnet.Packets;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>What all links to devices share: the way into the pipeline, and the limits.</summary>
internal sealed class DeviceDesk(
    EmbeddedBrokerOptions options, MessageIntake intake, IntakeQueue queue, IntakeCounters counters, TimeProvider clock, ILogger logger)
{
    private volatile bool _refusing;

    public EmbeddedBrokerOptions Options => options;

    public IntakeCounters Counters => counters;

    public TimeProvider Clock => clock;

    public ILogger Logger => logger;

    /// <summary>Whether new messages are refused because the service stops.</summary>
    public bool IsRefusing => _refusing;

    /// <summary>Whether so much waits for the commit that each device is slowed down.</summary>
    public bool IsBusy => queue.IsHalfFull;

    /// <summary>Gets messages that are durable, for those who subscribed here.</summary>
    public Action<MqttPublishPacket> Forward { get; set; } = _ => { };

    /// <summary>Refuses every new message from now on, while those under way are finished.</summary>
    public void Refuse() => _refusing = true;

    /// <summary>Hands a message to the pipeline; false where it cannot be taken.</summary>
    public bool TryAccept(MqttPublishPacket packet, IDelivery delivery) =>
        !_refusing && intake.TryAccept(packet.Topic, packet.Payload, retained: false, delivery);

    /// <summary>How long a device waits for a commit: half of its keep-alive where that is shorter.</summary>
    public TimeSpan WaitOf(TimeSpan keepAlive) =>
        keepAlive > TimeSpan.Zero && keepAlive / 2 < options.CommitWait ? keepAlive / 2 : options.CommitWait;
}
