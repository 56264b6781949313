using System.Net;
using System.Security.Cryptography.X509Certificates;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Pipeline;
using MQTTnet.Adapter;
using MQTTnet.Formatter;
using MQTTnet.Packets;
using MQTTnet.Protocol;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>
/// The link to one device. It takes the device's messages out of the stream before the broker sees them, so that a device may have many
/// on their way and they share commits; each is acknowledged when it is durable, in the order in which they came. What cannot be taken is
/// refused: by reason code on MQTT 5, by closing the connection on 3.1.1, where an acknowledgement reads as success.
/// </summary>
internal sealed class DeviceLink(IMqttChannelAdapter inner, DeviceDesk desk) : IMqttChannelAdapter
{
    private readonly Queue<DevicePublish> _underWay = new();
    private readonly TopicAliases _aliases = new();
    private readonly DeviceRate _rate = new(desk.Options.MaximumMessagesPerSecond, desk.Clock);
    private readonly RefusalNote _note = new(desk);
    private long _lastPacket = desk.Clock.GetTimestamp();
    private TaskCompletionSource? _room;
    private volatile bool _admitted;

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

    /// <summary>The keep-alive that the device asked for; zero for none.</summary>
    public TimeSpan KeepAlive { get; private set; }

    /// <summary>The device's will, whose topic must be permitted; null for none.</summary>
    public string? WillTopic { get; private set; }

    /// <summary>Id that the device gave itself.</summary>
    public string ClientId { get; private set; } = string.Empty;

    private DeviceRights? Rights { get; set; }

    private bool IsMqtt5 => PacketFormatterAdapter.ProtocolVersion == MqttProtocolVersion.V500;

    /// <summary>Lets the device send from now on.</summary>
    public void Admit(DeviceRights rights)
    {
        Rights = rights;
        _admitted = true;
    }

    /// <summary>Whether the device may subscribe to a filter.</summary>
    public bool MaySubscribe(string filter) => Rights?.MaySubscribe(filter) == true;

    /// <summary>Whether the connection belongs to an account.</summary>
    public bool BelongsTo(string account) => string.Equals(Rights?.Account, account, StringComparison.Ordinal);

    /// <inheritdoc/>
    public Task ConnectAsync(CancellationToken cancellationToken) => inner.ConnectAsync(cancellationToken);

    /// <inheritdoc/>
    public Task DisconnectAsync(CancellationToken cancellationToken) => inner.DisconnectAsync(cancellationToken);

    /// <summary>The next packet that is the broker's business; null at the end of the connection.</summary>
    public async Task<MqttPacket?> ReceivePacketAsync(CancellationToken cancellationToken)
    {
        while (await inner.ReceivePacketAsync(cancellationToken) is { } packet)
        {
            Volatile.Write(ref _lastPacket, desk.Clock.GetTimestamp());
            switch (packet)
            {
                case MqttConnectPacket connect:
                    Note(connect);
                    return packet;
                case MqttPublishPacket publish when _admitted:
                    if (!await TakeAsync(publish))
                    {
                        return null;
                    }

                    break;
                case MqttPubRelPacket release when _admitted:
                    Send(new MqttPubCompPacket { PacketIdentifier = release.PacketIdentifier, ReasonCode = MqttPubCompReasonCode.Success });
                    break;
                default:
                    return packet;
            }
        }

        return null;
    }

    /// <inheritdoc/>
    public Task SendPacketAsync(MqttPacket packet, CancellationToken cancellationToken)
    {
        if (packet is MqttConnAckPacket answer && IsMqtt5)
        {
            answer.TopicAliasMaximum = TopicAliases.Maximum;
            answer.ReceiveMaximum = (ushort)desk.Options.MaximumUnderWay;
            answer.MaximumPacketSize = (uint)desk.Options.MaximumPacketBytes;
        }

        return inner.SendPacketAsync(packet, cancellationToken);
    }

    /// <summary>Tells the device what became of a message. Called by the committer: does not wait.</summary>
    public void Complete(DevicePublish publish, DeliveryOutcome outcome)
    {
        if (publish.TrySettle())
        {
            if (outcome == DeliveryOutcome.Durable)
            {
                desk.Forward(publish.Packet);
                if (publish.Packet.QualityOfServiceLevel != MqttQualityOfServiceLevel.AtMostOnce)
                {
                    desk.Counters.Acknowledged(1);
                    Send(AnswerTo(publish.Packet, MqttPubAckReasonCode.Success, null));
                }
            }
            else
            {
                Refuse(publish.Packet, MqttPubAckReasonCode.QuotaExceeded, "The message could not be made durable.");
            }
        }

        Leave();
    }

    /// <summary>Refuses what has waited too long, and ends a connection that has been silent for too long.</summary>
    public void Sweep()
    {
        while (TryPeek() is { } oldest && desk.Clock.GetElapsedTime(oldest.AcceptedAt) >= desk.WaitOf(KeepAlive))
        {
            if (oldest.TrySettle() && !Refuse(oldest.Packet, MqttPubAckReasonCode.QuotaExceeded, "The message could not be made durable in time."))
            {
                Abort();
            }

            Leave();
        }

        // MQTT 5.0 section 3.1.2.10: one and a half times the keep-alive.
        if (KeepAlive > TimeSpan.Zero && desk.Clock.GetElapsedTime(Volatile.Read(ref _lastPacket)) > KeepAlive * 1.5)
        {
            Abort();
        }
    }

    /// <summary>Cuts the connection.</summary>
    public void Abort() => inner.Dispose();

    /// <inheritdoc/>
    public void ResetStatistics() => inner.ResetStatistics();

    /// <inheritdoc/>
    public void Dispose() => inner.Dispose();

    // The broker's own watch over keep-alives reads the wall clock and sees no publishes any more: ours replaces it.
    private void Note(MqttConnectPacket connect)
    {
        KeepAlive = TimeSpan.FromSeconds(connect.KeepAlivePeriod);
        connect.KeepAlivePeriod = 0;
        WillTopic = connect.WillFlag ? connect.WillTopic : null;
        ClientId = connect.ClientId ?? string.Empty;
    }

    /// <summary>Takes a message in; false where the connection must end.</summary>
    private async ValueTask<bool> TakeAsync(MqttPublishPacket packet)
    {
        _aliases.Resolve(packet);
        if (!Rights!.MayPublish(packet.Topic))
        {
            return Refuse(packet, MqttPubAckReasonCode.NotAuthorized, "The topic is not one that this device may publish to.");
        }

        if (!_rate.TryTake())
        {
            return Refuse(packet, MqttPubAckReasonCode.QuotaExceeded, "The device sends more messages than permitted.");
        }

        await WaitForRoomAsync();
        var publish = new DevicePublish(this, packet, desk.Clock.GetTimestamp());
        lock (_underWay)
        {
            _underWay.Enqueue(publish);
        }

        // The broker keeps a retained message for later subscribers; to us it is a message sent now.
        if (desk.TryAccept(packet, publish))
        {
            return true;
        }

        bool refused = !publish.TrySettle() || Refuse(packet, MqttPubAckReasonCode.QuotaExceeded, "Messages cannot be taken at present.");
        Leave();
        return refused;
    }

    /// <summary>Reads on only while there is room, so that TCP holds the device back. The sweep bounds the wait.</summary>
    private Task WaitForRoomAsync()
    {
        lock (_underWay)
        {
            if (_underWay.Count <= (desk.IsBusy ? 0 : desk.Options.MaximumUnderWay - 1))
            {
                return Task.CompletedTask;
            }

            _room = new TaskCompletionSource(TaskCreationOptions.RunContinuationsAsynchronously);
            return _room.Task;
        }
    }

    private DevicePublish? TryPeek()
    {
        lock (_underWay)
        {
            return _underWay.TryPeek(out DevicePublish? oldest) ? oldest : null;
        }
    }

    private void Leave()
    {
        TaskCompletionSource? room = null;
        lock (_underWay)
        {
            while (_underWay.TryPeek(out DevicePublish? oldest) && oldest.IsSettled)
            {
                _underWay.Dequeue();
            }

            if (_room is not null && _underWay.Count <= (desk.IsBusy ? 0 : desk.Options.MaximumUnderWay / 2))
            {
                (room, _room) = (_room, null);
            }
        }

        room?.SetResult();
    }

    /// <summary>Refuses a message; false where the connection must end instead of an answer.</summary>
    private bool Refuse(MqttPublishPacket packet, MqttPubAckReasonCode code, string reason)
    {
        desk.Counters.Refused();
        _note.Write(ClientId, reason);
        if (packet.QualityOfServiceLevel == MqttQualityOfServiceLevel.AtMostOnce)
        {
            return true;
        }

        if (IsMqtt5)
        {
            Send(AnswerTo(packet, code, reason));
        }
        else
        {
            Abort();
        }

        return IsMqtt5;
    }

    // Table 3-4 and 3-5 of MQTT 5.0 give the same number the same meaning.
    private static MqttPacket AnswerTo(MqttPublishPacket packet, MqttPubAckReasonCode code, string? reason) =>
        packet.QualityOfServiceLevel == MqttQualityOfServiceLevel.AtLeastOnce
            ? new MqttPubAckPacket { PacketIdentifier = packet.PacketIdentifier, ReasonCode = code, ReasonString = reason }
            : new MqttPubRecPacket { PacketIdentifier = packet.PacketIdentifier, ReasonCode = (MqttPubRecReasonCode)code, ReasonString = reason };

    private void Send(MqttPacket packet) => _ = SendQuietlyAsync(packet);

    private async Task SendQuietlyAsync(MqttPacket packet)
    {
        try
        {
            await inner.SendPacketAsync(packet, CancellationToken.None);
        }
        catch (Exception exception)
        {
            // The device is gone; it sends again what it has no acknowledgement of.
            IntakeLog.DeviceGone(desk.Logger, exception.Message);
        }
    }
}
