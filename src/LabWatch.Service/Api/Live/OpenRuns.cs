using LabWatch.Lab.Identity;
using LabWatch.Records;
using LabWatch.Records.Runs;

namespace LabWatch.Service.Api.Live;

/// <summary>
/// The runs that last, read again at most every two seconds however many pages ask, and at once after a step was recorded here. While the
/// records do not answer the last known ones stay.
/// </summary>
internal sealed class OpenRuns(IRunLedger ledger, TimeProvider clock) : IDisposable
{
    private static readonly TimeSpan KeepFor = TimeSpan.FromSeconds(2);
    private readonly SemaphoreSlim _gate = new(1, 1);
    private IReadOnlyList<RecordedRun> _known = [];
    private long? _readAt;

    /// <summary>The run that uses a source now; null where none does.</summary>
    public async ValueTask<RecordedRun?> FindAsync(SourceKey source, CancellationToken cancellationToken)
    {
        await _gate.WaitAsync(cancellationToken).ConfigureAwait(false);
        try
        {
            if (_readAt is not { } read || clock.GetElapsedTime(read) >= KeepFor)
            {
                _readAt = clock.GetTimestamp();
                _known = await ledger.OpenAsync(cancellationToken).ConfigureAwait(false);
            }
        }
        catch (RecordsUnavailableException)
        {
            // The last known ones stay.
        }
        finally
        {
            _gate.Release();
        }

        return _known.FirstOrDefault(run => run.Run.Source == source);
    }

    /// <summary>Lets the next look read again.</summary>
    public async ValueTask ForgetAsync()
    {
        await _gate.WaitAsync(CancellationToken.None).ConfigureAwait(false);
        _readAt = null;
        _gate.Release();
    }

    /// <inheritdoc/>
    public void Dispose() => _gate.Dispose();
}
