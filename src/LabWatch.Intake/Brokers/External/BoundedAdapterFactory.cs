using MQTTnet;
using MQTTnet.Adapter;
using MQTTnet.Diagnostics.Logger;
using MQTTnet.Formatter;
using MQTTnet.Implementations;

namespace LabWatch.Intake.Brokers.External;

/// <summary>Makes the client's link: read ahead and written together, with a bounded backlog.</summary>
internal sealed class BoundedAdapterFactory(ReceiveBacklog backlog) : IMqttClientAdapterFactory
{
    /// <inheritdoc/>
    public IMqttChannelAdapter CreateClientAdapter(MqttClientOptions options, MqttPacketInspector packetInspector, IMqttNetLogger logger)
    {
        var channel = new BatchedChannel(new MqttTcpChannel(options));
        var formatter = new MqttPacketFormatterAdapter(options.ProtocolVersion, new MqttBufferWriter(options.WriterBufferSize, options.WriterBufferSizeMax));
        return new BoundedChannelAdapter(new MqttChannelAdapter(channel, formatter, logger) { PacketInspector = packetInspector }, backlog);
    }
}
