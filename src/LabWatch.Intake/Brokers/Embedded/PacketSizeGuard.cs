using System.Buffers;
using System.Net;
using System.Security.Cryptography.X509Certificates;
using MQTTnet.Channel;
using MQTTnet.Exceptions;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>
/// Follows the packet boundaries of an MQTT stream (MQTT 5.0 section 2.1) and ends it at the first packet that announces more bytes than
/// the limit, before memory is set aside for it.
/// </summary>
internal sealed class PacketSizeGuard(IMqttChannel inner, int limit) : IMqttChannel
{
    private const int ContinuationBit = 0x80;
    private const int LengthBits = 7;
    private bool _inLength;
    private int _shift;
    private long _length;
    private long _bodyLeft;

    /// <inheritdoc/>
    public X509Certificate2? ClientCertificate => inner.ClientCertificate;

    /// <inheritdoc/>
    public EndPoint? RemoteEndPoint => inner.RemoteEndPoint;

    /// <inheritdoc/>
    public EndPoint? LocalEndPoint => inner.LocalEndPoint;

    /// <inheritdoc/>
    public bool IsSecureConnection => inner.IsSecureConnection;

    /// <inheritdoc/>
    public Task ConnectAsync(CancellationToken cancellationToken) => inner.ConnectAsync(cancellationToken);

    /// <inheritdoc/>
    public Task DisconnectAsync(CancellationToken cancellationToken) => inner.DisconnectAsync(cancellationToken);

    /// <inheritdoc/>
    public async Task<int> ReadAsync(byte[] buffer, int offset, int count, CancellationToken cancellationToken)
    {
        int read = await inner.ReadAsync(buffer, offset, count, cancellationToken);
        Follow(buffer.AsSpan(offset, Math.Max(read, 0)));
        return read;
    }

    /// <inheritdoc/>
    public Task WriteAsync(ReadOnlySequence<byte> buffer, bool isEndOfPacket, CancellationToken cancellationToken) =>
        inner.WriteAsync(buffer, isEndOfPacket, cancellationToken);

    /// <inheritdoc/>
    public void Dispose() => inner.Dispose();

    private void Follow(ReadOnlySpan<byte> bytes)
    {
        while (!bytes.IsEmpty)
        {
            if (_bodyLeft > 0)
            {
                int body = (int)Math.Min(_bodyLeft, bytes.Length);
                _bodyLeft -= body;
                bytes = bytes[body..];
                continue;
            }

            FollowHeader(bytes[0]);
            bytes = bytes[1..];
        }
    }

    private void FollowHeader(byte value)
    {
        if (!_inLength)
        {
            _inLength = true;
            _length = _shift = 0;
            return;
        }

        _length |= (long)(value & ~ContinuationBit) << _shift;
        _shift += LengthBits;
        if (_length > limit || _shift > 4 * LengthBits)
        {
            throw new MqttProtocolViolationException("The packet is larger than the limit.");
        }

        if ((value & ContinuationBit) == 0)
        {
            _inLength = false;
            _bodyLeft = _length;
        }
    }
}
