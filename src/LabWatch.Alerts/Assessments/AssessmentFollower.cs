using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Journal;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Alerts.Messages;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Assessments;

/// <summary>
/// Follows the assessments by position and hands what they mean to the desk. Position and newest windows go into the journal together with the
/// alerts, so that a crash repeats nothing; the position also goes into the ledger, for the day the journal is lost.
/// </summary>
internal sealed class AssessmentFollower(
    IAssessmentLedger assessments, IAlertLedger ledger, ILabSnapshotSource lab, DeskQueue desk, AlertDesk alerts, AlertsOptions options, TimeProvider clock, ILogger<AssessmentFollower> logger)
{
    /// <summary>Name under which the ledger keeps the position.</summary>
    public const string Reader = "alerts";

    private const int BatchSize = 500;
    private static readonly TimeSpan LongestWait = TimeSpan.FromSeconds(60);
    private static readonly TimeSpan CallTime = TimeSpan.FromSeconds(30);

    private readonly Dictionary<(SourceKey, string, string), DecidedWindow> _decided = [];
    private long _position;
    private long _recorded;
    private bool _positioned;

    /// <summary>Takes over what the journal holds.</summary>
    public void Restore(JournalState state)
    {
        _position = state.FollowedSequence;
        foreach (DecidedWindow window in state.Decided)
        {
            _decided[Key(window)] = window;
        }
    }

    /// <summary>Follows until the token is cancelled.</summary>
    public async Task RunAsync(CancellationToken stopping)
    {
        TimeSpan wait = options.AssessmentPoll;
        while (true)
        {
            try
            {
                bool more = await StepAsync(stopping);
                wait = more ? TimeSpan.Zero : options.AssessmentPoll;
            }
            catch (Exception exception) when (!stopping.IsCancellationRequested)
            {
                // Nothing is lost: what was not handed to the desk is asked for again, and the journal keeps the rest. Hazards do not come this way.
                wait = TimeSpan.FromSeconds(Math.Clamp(wait.TotalSeconds * 2, 1, LongestWait.TotalSeconds));
                Log.FollowFailed(logger, wait, exception);
            }

            await Task.Delay(wait, clock, stopping);
        }
    }

    /// <summary>Looks at one batch; whether there may be more.</summary>
    public async Task<bool> StepAsync(CancellationToken stopping)
    {
        using CancellationTokenSource timeout = new(CallTime, clock);
        using CancellationTokenSource both = CancellationTokenSource.CreateLinkedTokenSource(timeout.Token, stopping);
        if (!_positioned)
        {
            _recorded = await ledger.PositionAsync(Reader, both.Token);
            _position = Math.Max(_position, _recorded);
            _positioned = true;
        }

        await RecordPositionAsync(both.Token);
        EndWhatIsNotJudged();

        IReadOnlyList<(long Sequence, Assessment Assessment)> batch = await assessments.QueuedAsync(_position, BatchSize, both.Token);
        if (batch.Count == 0)
        {
            return false;
        }

        _position = batch[^1].Sequence;
        Hand(batch);
        await RecordPositionAsync(both.Token);
        return batch.Count == BatchSize;
    }

    private void Hand(IReadOnlyList<(long Sequence, Assessment Assessment)> batch)
    {
        Instant now = Instant.Now(clock);
        LabSnapshot snapshot = lab.Current;
        ToleranceTexts texts = new(new SiteTime(snapshot.Site));
        List<AlertCondition> found = [];
        List<DecidedWindow> changed = [];
        foreach (Assessment assessment in AssessmentVerdict.Newest(batch.Select(item => item.Assessment), window => _decided.GetValueOrDefault(Key(window))))
        {
            DecidedWindow window = DecidedWindow.Of(assessment);
            _decided[Key(window)] = window;
            changed.Add(window);
            if (AssessmentVerdict.Present(assessment, now, options.OldestAssessmentWindows) is { } present)
            {
                AlertCondition condition = texts.Describe(assessment, snapshot.FindSource(assessment.Source), present, now);
                if (!present || Judged.WhyNot(snapshot, condition.Key, now) is null)
                {
                    found.Add(condition);
                }
            }
        }

        desk.Post(new DeskWork.Follow(found, new FollowedPosition(_position, changed)));
    }

    private void EndWhatIsNotJudged()
    {
        Instant now = Instant.Now(clock);
        LabSnapshot snapshot = lab.Current;
        ToleranceTexts texts = new(new SiteTime(snapshot.Site));
        foreach (Alert alert in alerts.View.Open.Where(alert => !alert.IsHazard && !ServiceAlertCode.IsService(alert.Code) && alert.ReturnedAt is null))
        {
            if (Judged.WhyNot(snapshot, AlertKey.Of(alert), now) is { } why)
            {
                desk.Post(new DeskWork.Condition(texts.NotJudged(alert, snapshot.FindSource(alert.Source), why, now)));
            }
        }
    }

    // Made up for at the next look where a call before it failed.
    private async Task RecordPositionAsync(CancellationToken cancellationToken)
    {
        if (_recorded < _position)
        {
            await DoneAsync(cancellationToken);
            await ledger.SetPositionAsync(Reader, _position, cancellationToken);
            _recorded = _position;
        }
    }

    // The position in the ledger must not run ahead of the journal.
    private async Task DoneAsync(CancellationToken cancellationToken)
    {
        TaskCompletionSource answer = new(TaskCreationOptions.RunContinuationsAsynchronously);
        desk.Post(new DeskWork.Barrier(answer));
        await answer.Task.WaitAsync(cancellationToken);
    }

    private static (SourceKey, string, string) Key(DecidedWindow window) => (window.Source, window.Criterion, window.Scope);
}
