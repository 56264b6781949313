using System.Net;
using System.Security.Cryptography.X509Certificates;
using MQTTnet.Adapter;
using MQTTnet.Formatter;
using MQTTnet.Packets;

namespace LabWatch.Intake.Brokers.External;

/// <summary>The client's link to the broker, with the bound of <see cref="ReceiveBacklog"/>.</summary>
internal sealed class BoundedChannelAdapter(IMqttChannelAdapter inner, ReceiveBacklog backlog) : IMqttChannelAdapter
{
    /// <inheritdoc/>
    public long BytesReceived => inner.BytesReceived;

    /// <inheritdoc/>
    public long BytesSent => inner.BytesSent;

    /// <inheritdoc/>
    public X509Certificate2? ClientCertificate => inner.ClientCertificate;

    /// <inheritdoc/>
    public EndPoint? RemoteEndPoint => inner.RemoteEndPoint;

    /// <inheritdoc/>
    public EndPoint? LocalEndPoint => inner.LocalEndPoint;

    /// <inheritdoc/>
    public bool IsSecureConnection => inner.IsSecureConnection;

    /// <inheritdoc/>
    public MqttPacketFormatterAdapter PacketFormatterAdapter => inner.PacketFormatterAdapter;

    /// <inheritdoc/>
    public Task ConnectAsync(CancellationToken cancellationToken) => inner.ConnectAsync(cancellationToken);

    /// <inheritdoc/>
    public Task DisconnectAsync(CancellationToken cancellationToken) => inner.DisconnectAsync(cancellationToken);

    /// <inheritdoc/>
    public async Task<MqttPacket> ReceivePacketAsync(CancellationToken cancellationToken)
    {
        MqttPacket packet = await inner.ReceivePacketAsync(cancellationToken);
        if (packet is MqttPublishPacket publish)
        {
            await backlog.AddAsync(publish.Payload.Length, cancellationToken);
        }

        return packet;
    }

    /// <inheritdoc/>
    public void ResetStatistics() => inner.ResetStatistics();

    /// <inheritdoc/>
    public Task SendPacketAsync(MqttPacket packet, CancellationToken cancellationToken) => inner.SendPacketAsync(packet, cancellationToken);

    /// <inheritdoc/>
    public void Dispose() => inner.Dispose();
}
