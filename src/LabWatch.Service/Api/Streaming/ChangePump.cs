using LabWatch.Lab.Alerts;
using LabWatch.Lab.Sources;
using LabWatch.Records.Alerts;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Streaming;

/// <summary>
/// Looks for changes at a steady pace while somebody listens, and hands them to the hub. Everything it sends replaces what was known of
/// the same id, so a look that fails loses nothing: the next one sends the state then.
/// </summary>
internal sealed class ChangePump(
    StreamHub hub, SiteBoard board, IAlertLedger ledger, StreamOptions options, IHostApplicationLifetime lifetime, ILogger<ChangePump> log) : BackgroundService
{
    private const int LooksBetweenAssessments = 5;
    private readonly Dictionary<string, byte[]> _sent = new(StringComparer.Ordinal);
    private IReadOnlyList<Alert> _open = [];
    private int _turn;
    private int _looks;

    /// <inheritdoc/>
    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        // At the first sign of stopping: the web server waits for open streams, and hosted services are stopped after it.
        using CancellationTokenRegistration ending = lifetime.ApplicationStopping.Register(hub.End);
        using PeriodicTimer pace = new(options.LookEvery, options.Clock);
        try
        {
            while (await pace.WaitForNextTickAsync(stoppingToken).ConfigureAwait(false))
            {
                await LookAsync(stoppingToken).ConfigureAwait(false);
            }
        }
        catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
        {
            hub.End();
        }
    }

    private async ValueTask LookAsync(CancellationToken cancellationToken)
    {
        if (!hub.HasClients)
        {
            _sent.Clear();
            _looks = 0;
            return;
        }

        try
        {
            await SendAlertsAsync(cancellationToken).ConfigureAwait(false);
            await SendSourcesAsync(cancellationToken).ConfigureAwait(false);
            if (unchecked(_looks++) % LooksBetweenAssessments == 0)
            {
                await SendAssessmentsAsync(cancellationToken).ConfigureAwait(false);
            }

            if (board.Progress is { } progress)
            {
                Send("progress", "progress", progress);
            }
            else if (_sent.Remove("progress"))
            {
                hub.Publish("progress", "{\"fraction\":1,\"text\":\"\"}"u8.ToArray());
            }
        }
#pragma warning disable CA1031 // The outermost loop: a store that fails now must not end the stream for good.
        catch (Exception failure) when (failure is not OperationCanceledException)
#pragma warning restore CA1031
        {
            ApiLog.LookFailed(log, failure);
        }
    }

    private async ValueTask SendAlertsAsync(CancellationToken cancellationToken)
    {
        IReadOnlyList<Alert> before = _open;
        _open = board.OpenAlerts();
        HashSet<Guid> still = [.. _open.Select(alert => alert.Id)];
        foreach (Alert alert in _open)
        {
            Send("alert:" + alert.Id, "alert", AlertViews.Of(board.Lab, alert));
        }

        foreach (Alert gone in before.Where(alert => !still.Contains(alert.Id)))
        {
            if (await ledger.FindAsync(gone.Id, cancellationToken).ConfigureAwait(false) is { } ended)
            {
                Send("alert:" + gone.Id, "alert", AlertViews.Of(board.Lab, ended));
            }

            _sent.Remove("alert:" + gone.Id);
        }
    }

    private async ValueTask SendSourcesAsync(CancellationToken cancellationToken)
    {
        IReadOnlyList<ReferenceSource> sources = board.Lab.Sources;
        int turns = Math.Max(1, (sources.Count + options.SourcesAtOnce - 1) / options.SourcesAtOnce);
        _turn = (_turn + 1) % turns;
        for (int i = _turn; i < sources.Count; i += turns)
        {
            SourceStatusView status = await board.StatusAsync(sources[i], _open, cancellationToken).ConfigureAwait(false);
            Send("source:" + status.Id, "source", new StatusEvent(board.Site().Now, status));
        }
    }

    private async ValueTask SendAssessmentsAsync(CancellationToken cancellationToken)
    {
        foreach (AssessmentView assessment in await board.AssessmentsAsync(cancellationToken).ConfigureAwait(false))
        {
            Send("assessment:" + assessment.Source + assessment.Criterion + assessment.Scope, "assessment", assessment);
        }
    }

    private void Send<T>(string key, string name, T value)
    {
        byte[] data = hub.Write(value);
        if (!_sent.TryGetValue(key, out byte[]? before) || !before.AsSpan().SequenceEqual(data))
        {
            _sent[key] = data;
            hub.Publish(name, data);
        }
    }
}
