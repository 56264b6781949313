using LabWatch.Intake.Pipeline;
using MQTTnet.Packets;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>One message of a device on its way to the store. It is settled once: by the commit, or by the wait that ran out.</summary>
internal sealed class DevicePublish(DeviceLink link, MqttPublishPacket packet, long acceptedAt) : IDelivery
{
    private int _settled;

    public MqttPublishPacket Packet => packet;

    /// <summary>Monotonic time of acceptance.</summary>
    public long AcceptedAt => acceptedAt;

    public bool IsSettled => Volatile.Read(ref _settled) == 1;

    /// <summary>Takes the right to answer the device; false where somebody has answered.</summary>
    public bool TrySettle() => Interlocked.Exchange(ref _settled, 1) == 0;

    /// <inheritdoc/>
    public void Complete(DeliveryOutcome outcome) => link.Complete(this, outcome);
}
