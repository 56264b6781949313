using System.Threading.Channels;

namespace LabWatch.Service.Api.Streaming;

/// <summary>One listener with its bounded buffer. One that does not keep up is cut: it comes back and starts with a snapshot.</summary>
internal sealed class StreamClient : IDisposable
{
    /// <summary>Events that wait for one client at most.</summary>
    public const int Buffered = 256;

    private readonly Channel<StreamMessage> _waiting =
        Channel.CreateBounded<StreamMessage>(new BoundedChannelOptions(Buffered) { SingleReader = true });

    private readonly CancellationTokenSource _cut = new();

    /// <summary>Events that wait.</summary>
    public ChannelReader<StreamMessage> Waiting => _waiting.Reader;

    /// <summary>Fires when the client is cut.</summary>
    public CancellationToken Cut => _cut.Token;

    /// <summary>Hands an event over; false where the buffer is full, and the client is then cut.</summary>
    public bool Offer(StreamMessage message)
    {
        bool taken = _waiting.Writer.TryWrite(message);
        if (!taken)
        {
            _waiting.Writer.TryComplete();
            _cut.Cancel();
        }

        return taken;
    }

    /// <summary>Ends the stream in peace: what waits is still written.</summary>
    public void End() => _waiting.Writer.TryComplete();

    /// <inheritdoc/>
    public void Dispose() => _cut.Dispose();
}
