using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Desk;

/// <summary>
/// Runs the desk on a thread of its own, so that a busy thread pool holds no hazard up. Stopping finishes the work that is queued.
/// </summary>
internal sealed class DeskThread : IDisposable
{
    private readonly CancellationTokenSource _stopping = new();
    private readonly Thread _thread;

    public DeskThread(DeskQueue queue, AlertDesk desk, ILogger<DeskThread> logger)
    {
        _thread = new Thread(() => Run(queue, desk, logger)) { IsBackground = true, Name = "labwatch alert desk", Priority = ThreadPriority.AboveNormal };
        _thread.Start();
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _stopping.Cancel();
        _thread.Join(TimeSpan.FromSeconds(10));
        _stopping.Dispose();
    }

    private void Run(DeskQueue queue, AlertDesk desk, ILogger logger)
    {
        while (queue.Wait(_stopping.Token))
        {
            try
            {
                desk.Pump();
            }
            catch (Exception exception)
            {
                // The last guard of the desk: whatever a listener did wrong, the next batch is worked on.
                Log.WorkFailed(logger, exception);
            }
        }
    }
}
