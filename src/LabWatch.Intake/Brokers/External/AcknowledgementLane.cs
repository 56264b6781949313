using System.Threading.Channels;
using LabWatch.Intake.Diagnostics;
using Microsoft.Extensions.Logging;

namespace LabWatch.Intake.Brokers.External;

/// <summary>
/// Sends the acknowledgements of one connection in the order in which they are handed over, on a task of its own, so that a link that
/// hangs does not hold up the committer. Once closed it sends nothing more, whatever is still handed over.
/// </summary>
internal sealed class AcknowledgementLane(IntakeCounters counters, ILogger logger) : IDisposable
{
    private readonly Channel<Func<CancellationToken, Task>> _pending =
        Channel.CreateUnbounded<Func<CancellationToken, Task>>(new UnboundedChannelOptions { SingleReader = true });

    private readonly CancellationTokenSource _closed = new();
    private bool _disposed;

    /// <summary>Hands over an acknowledgement; dropped where the connection is closed. Bounded by what the connection has delivered.</summary>
    public void Acknowledge(Func<CancellationToken, Task> send) => _pending.Writer.TryWrite(send);

    /// <summary>Sends until closed, flushed or the link fails; false where it failed, so that the connection is of no use any more.</summary>
    public async Task<bool> RunAsync()
    {
        CancellationToken closed = _closed.Token;
        try
        {
            await foreach (Func<CancellationToken, Task> send in _pending.Reader.ReadAllAsync(closed))
            {
                await send(closed);
                counters.Acknowledged(1);
            }
        }
        catch (OperationCanceledException) when (closed.IsCancellationRequested)
        {
            // Closed: the broker delivers again what was not acknowledged.
        }
        catch (Exception exception)
        {
            // The client throws different types here, among them NullReferenceException when the link is gone. The link is made anew.
            IntakeLog.AcknowledgeFailed(logger, exception.Message);
            _pending.Writer.TryComplete();
            return false;
        }

        _pending.Writer.TryComplete();
        return true;
    }

    /// <summary>Takes no more; <see cref="RunAsync"/> ends when what was handed over is sent.</summary>
    public void Finish() => _pending.Writer.TryComplete();

    /// <summary>Drops what was not sent.</summary>
    public void Close()
    {
        _pending.Writer.TryComplete();
        lock (_pending)
        {
            if (!_disposed)
            {
                _closed.Cancel();
            }
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        lock (_pending)
        {
            _disposed = true;
            _closed.Dispose();
        }
    }
}
