using LabWatch.Intake.Pipeline;
using MQTTnet;

namespace LabWatch.Intake.Brokers.External;

/// <summary>
/// The way back to the broker for one message of one connection. It belongs to that connection: after a reconnect the same packet id
/// stands for another message, so an acknowledgement of a former connection is dropped.
/// </summary>
internal sealed class BrokerDelivery(AcknowledgementLane lane, MqttApplicationMessageReceivedEventArgs message) : IDelivery
{
    /// <inheritdoc/>
    public void Complete(DeliveryOutcome outcome)
    {
        if (outcome == DeliveryOutcome.Durable)
        {
            lane.Acknowledge(message.AcknowledgeAsync);
        }
    }
}
