using System.Buffers;
using System.Net;
using System.Security.Cryptography.X509Certificates;
using MQTTnet.Channel;

namespace LabWatch.Intake.Brokers;

/// <summary>
/// A link that reads ahead and writes together: what arrived is taken from the network at once, and packets written while another write
/// is on its way leave in one piece. A small packet then costs a copy instead of a call into the system, several a packet otherwise.
/// </summary>
/// <remarks>One reader; any number of writers. A failed write shows at the next one, and at the reader.</remarks>
internal sealed class BatchedChannel(IMqttChannel inner) : IMqttChannel
{
    private const int ReadAheadBytes = 16 << 10;

    /// <summary>Bytes on their way above which a writer waits: a receiver that does not read must not fill the memory.</summary>
    private const int WriteLimitBytes = 64 << 10;

    private readonly Lock _lock = new();
    private byte[]? _ahead;
    private int _from;
    private int _to;
    private ArrayBufferWriter<byte> _gathering = new();
    private ArrayBufferWriter<byte> _leaving = new();
    private Task _writing = Task.CompletedTask;
    private bool _isWriting;
    private Exception? _failure;

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

    /// <summary>Sends what was written, then disconnects.</summary>
    public async Task DisconnectAsync(CancellationToken cancellationToken)
    {
        try
        {
            await FlushAsync().WaitAsync(cancellationToken);
        }
        finally
        {
            await inner.DisconnectAsync(cancellationToken);
        }
    }

    /// <inheritdoc/>
    public ValueTask<int> ReadAheadAsync(byte[] buffer, int offset, int count, CancellationToken cancellationToken)
    {
        if (_from < _to)
        {
            int taken = Math.Min(count, _to - _from);
            _ahead.AsSpan(_from, taken).CopyTo(buffer.AsSpan(offset));
            _from += taken;
            return new(taken);
        }

        return new(count >= ReadAheadBytes ? inner.ReadAsync(buffer, offset, count, cancellationToken) : FillAsync(buffer, offset, count, cancellationToken));
    }

    /// <inheritdoc/>
    public Task<int> ReadAsync(byte[] buffer, int offset, int count, CancellationToken cancellationToken) =>
        ReadAheadAsync(buffer, offset, count, cancellationToken).AsTask();

    /// <summary>Takes a packet to be sent; waits only while too much is on its way.</summary>
    public Task WriteAsync(ReadOnlySequence<byte> buffer, bool isEndOfPacket, CancellationToken cancellationToken)
    {
        lock (_lock)
        {
            if (_failure is { } failure)
            {
                throw new IOException("The link has failed.", failure);
            }

            foreach (ReadOnlyMemory<byte> part in buffer)
            {
                _gathering.Write(part.Span);
            }

            if (!_isWriting)
            {
                _isWriting = true;
                _writing = Task.Run(WriteOutAsync, CancellationToken.None);
            }

            return _gathering.WrittenCount > WriteLimitBytes ? _writing.WaitAsync(cancellationToken) : Task.CompletedTask;
        }
    }

    /// <summary>Ends when what was written has been sent, or the link has failed.</summary>
    public Task FlushAsync()
    {
        lock (_lock)
        {
            return _writing;
        }
    }

    /// <inheritdoc/>
    public void Dispose() => inner.Dispose();

    private async Task<int> FillAsync(byte[] buffer, int offset, int count, CancellationToken cancellationToken)
    {
        _ahead ??= new byte[ReadAheadBytes];
        _from = 0;
        _to = 0;
        _to = await inner.ReadAsync(_ahead, 0, ReadAheadBytes, cancellationToken);
        if (_to <= 0)
        {
            return _to;
        }

        return await ReadAheadAsync(buffer, offset, count, cancellationToken);
    }

    private async Task WriteOutAsync()
    {
        try
        {
            while (true)
            {
                lock (_lock)
                {
                    if (_gathering.WrittenCount == 0)
                    {
                        _isWriting = false;
                        return;
                    }

                    (_gathering, _leaving) = (_leaving, _gathering);
                }

                await inner.WriteAsync(new ReadOnlySequence<byte>(_leaving.WrittenMemory), isEndOfPacket: true, CancellationToken.None);
                _leaving.ResetWrittenCount();
            }
        }
        catch (Exception exception)
        {
            // The link is of no use any more: the next writer is told, and the reader finds its end.
            lock (_lock)
            {
                _failure = exception;
                _isWriting = false;
            }
        }
    }
}
