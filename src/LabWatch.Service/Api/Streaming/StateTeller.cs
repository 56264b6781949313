using LabWatch.Intake.Outgoing;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Sources;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Streaming;

/// <summary>
/// Tells by MQTT what has changed: the state of each source at <c>SITE/SOURCE/state</c> and the open alerts at <c>SITE/alerts</c>, retained.
/// Only what changes seldom stands in them; values are in the readings themselves.
/// </summary>
internal sealed class StateTeller(SiteBoard board, IStateBoard tell, StreamHub json, StreamOptions options, ILogger<StateTeller> log) : BackgroundService
{
    private static readonly TimeSpan Pace = TimeSpan.FromSeconds(2);
    private int _turn;

    /// <inheritdoc/>
    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        using PeriodicTimer pace = new(Pace, options.Clock);
        try
        {
            while (await pace.WaitForNextTickAsync(stoppingToken))
            {
                await LookAsync(stoppingToken);
            }
        }
        catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
        {
            // What was told stays with the brokers; the service says at its own topic that it is gone.
        }
    }

    private async ValueTask LookAsync(CancellationToken cancellationToken)
    {
        try
        {
            IReadOnlyList<Alert> open = board.OpenAlerts();
            string site = board.Lab.Site.Id;
            tell.Tell($"{site}/alerts", json.Write(AlertViews.Sorted(board.Lab, open).Select(alert => new { alert.Id, alert.Source, alert.Code, alert.Subject, alert.Priority, alert.State, alert.IsHazard, alert.RaisedAt })));
            IReadOnlyList<ReferenceSource> sources = board.Lab.Sources;
            int turns = Math.Max(1, (sources.Count + options.SourcesAtOnce - 1) / options.SourcesAtOnce);
            _turn = (_turn + 1) % turns;
            for (int i = _turn; i < sources.Count; i += turns)
            {
                SourceStatusView status = await board.StatusAsync(sources[i], open, cancellationToken);
                tell.Tell($"{site}/{sources[i].Key.Source}/state", json.Write(new
                {
                    State = status.Readiness.State,
                    Reasons = status.Readiness.Reasons.Select(reason => reason.Code).Distinct(),
                    status.IsSilent,
                    Alerts = status.OpenAlerts.Select(alert => alert.Code).Distinct(),
                    Run = status.Run?.Id,
                }));
            }
        }
#pragma warning disable CA1031 // The outermost loop: a store that fails now must not end the telling for good.
        catch (Exception failure) when (failure is not OperationCanceledException)
#pragma warning restore CA1031
        {
            ApiLog.LookFailed(log, failure);
        }
    }
}
