using MQTTnet;
using MQTTnet.Adapter;
using MQTTnet.Diagnostics.Logger;
using MQTTnet.Implementations;

namespace LabWatch.Intake.Brokers.External;

/// <summary>Makes the client's link with a bounded backlog.</summary>
internal sealed class BoundedAdapterFactory(ReceiveBacklog backlog) : IMqttClientAdapterFactory
{
    private readonly MqttClientAdapterFactory _factory = new();

    /// <inheritdoc/>
    public IMqttChannelAdapter CreateClientAdapter(MqttClientOptions options, MqttPacketInspector packetInspector, IMqttNetLogger logger) =>
        new BoundedChannelAdapter(_factory.CreateClientAdapter(options, packetInspector, logger), backlog);
}
