using MQTTnet.Exceptions;
using MQTTnet.Packets;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>The short names that a device gives to its topics (MQTT 5.0 section 3.3.2.3.4), a bounded number.</summary>
internal sealed class TopicAliases
{
    /// <summary>Most aliases of a connection, as the broker says when it accepts one.</summary>
    public const ushort Maximum = 64;

    private readonly Dictionary<ushort, string> _topics = [];

    /// <summary>Puts the topic in place of its alias. Throws <see cref="MqttProtocolViolationException"/> for a message without a topic.</summary>
    public void Resolve(MqttPublishPacket packet)
    {
        string? topic = packet.Topic;
        if (packet.TopicAlias > Maximum)
        {
            throw new MqttProtocolViolationException("The topic alias is beyond the number that is permitted.");
        }

        if (packet.TopicAlias > 0 && !string.IsNullOrEmpty(topic))
        {
            _topics[packet.TopicAlias] = topic;
        }
        else if (string.IsNullOrEmpty(topic) && (packet.TopicAlias == 0 || !_topics.TryGetValue(packet.TopicAlias, out topic)))
        {
            throw new MqttProtocolViolationException("The message has no topic.");
        }

        if (topic!.AsSpan().IndexOfAny('#', '+', '\0') >= 0)
        {
            throw new MqttProtocolViolationException("A topic must not have wildcards.");
        }

        packet.Topic = topic;
    }
}
