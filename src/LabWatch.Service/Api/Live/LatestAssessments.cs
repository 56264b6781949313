using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Records;
using LabWatch.Records.Assessments;

namespace LabWatch.Service.Api.Live;

/// <summary>
/// The newest assessments, read again at most every two seconds however many pages ask. While the records do not answer the last known
/// ones stay: each carries its window, so that nobody takes them for the present.
/// </summary>
internal sealed class LatestAssessments(IAssessmentLedger ledger, ILabSnapshotSource lab, TimeProvider clock) : IDisposable
{
    private static readonly TimeSpan KeepFor = TimeSpan.FromSeconds(2);
    private readonly SemaphoreSlim _gate = new(1, 1);
    private IReadOnlyList<Assessment> _known = [];
    private long? _readAt;

    /// <summary>The newest window's highest revision of each source, criterion and scope that the sources in force have: what is about a channel or band that is gone is history.</summary>
    public async ValueTask<IReadOnlyList<Assessment>> ReadAsync(CancellationToken cancellationToken)
    {
        await _gate.WaitAsync(cancellationToken).ConfigureAwait(false);
        try
        {
            if (_readAt is not { } read || clock.GetElapsedTime(read) >= KeepFor)
            {
                _known = await ledger.LatestAsync(cancellationToken).ConfigureAwait(false);
                _readAt = clock.GetTimestamp();
            }
        }
        catch (RecordsUnavailableException)
        {
            _readAt = clock.GetTimestamp();
        }
        finally
        {
            _gate.Release();
        }

        LabSnapshot current = lab.Current;
        return [.. _known.Where(assessment => current.FindSource(assessment.Source)?.HasScope(assessment.Scope) == true)];
    }

    /// <inheritdoc/>
    public void Dispose() => _gate.Dispose();
}
