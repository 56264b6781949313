using System.Threading.Channels;
using MQTTnet;
using MQTTnet.Packets;
using MQTTnet.Server;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>
/// Hands messages that are durable to those who subscribed at the embedded broker, in order, on a task of its own, so that no subscriber
/// holds up a device. Bounded: the oldest go first, as in the queue of a slow subscriber.
/// </summary>
internal sealed class SubscriberFeed(MqttServer server, RetainedMessages retained)
{
    private const int Limit = 10_000;

    private readonly Channel<MqttApplicationMessage> _waiting = Channel.CreateBounded<MqttApplicationMessage>(
        new BoundedChannelOptions(Limit) { SingleReader = true, FullMode = BoundedChannelFullMode.DropOldest });

    /// <summary>What marks messages of this feed at the broker; no client can have it.</summary>
    public static object Mark { get; } = new();

    /// <summary>Whether somebody has subscribed.</summary>
    public bool HasSubscribers { get; set; }

    /// <summary>Takes a device's message.</summary>
    public void Add(MqttPublishPacket packet)
    {
        bool keep = packet.Retain && retained.TryKeep(packet.Topic, packet.Payload.Length);
        if (keep || HasSubscribers)
        {
            Add(new MqttApplicationMessage
            {
                Topic = packet.Topic,
                Payload = packet.Payload,
                QualityOfServiceLevel = packet.QualityOfServiceLevel,
                Retain = keep,
                ContentType = packet.ContentType,
            });
        }
    }

    /// <summary>Takes a message of the service.</summary>
    public void Add(MqttApplicationMessage message) => _waiting.Writer.TryWrite(message);

    /// <summary>No more is taken.</summary>
    public void Close() => _waiting.Writer.TryComplete();

    /// <summary>Hands messages on until closed and empty.</summary>
    public async Task RunAsync()
    {
        var items = new Dictionary<object, object> { [Mark] = Mark };
        await foreach (MqttApplicationMessage message in _waiting.Reader.ReadAllAsync())
        {
            try
            {
                await server.InjectApplicationMessage(new InjectedMqttApplicationMessage(message) { CustomSessionItems = items });
            }
            catch (Exception exception) when (exception is InvalidOperationException or ObjectDisposedException or NotSupportedException)
            {
                // The broker stops; subscribers find what is retained after the next start.
                return;
            }
        }
    }
}
