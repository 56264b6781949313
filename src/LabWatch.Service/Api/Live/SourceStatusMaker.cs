using LabWatch.Assessments.Readiness;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Records.Runs;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Live;

/// <summary>Puts together what is known about a source now.</summary>
internal sealed class SourceStatusMaker(LiveReadings live, LatestAssessments assessments, ReadinessMaker readinessMaker, OpenRuns runs, TimeProvider clock)
{
    /// <summary>The status of a source with the given open alerts (those of other sources are left out).</summary>
    public async ValueTask<SourceStatusView> MakeAsync(
        LabSnapshot lab, ReferenceSource source, IReadOnlyList<Alert> openAlerts, CancellationToken cancellationToken)
    {
        IReadOnlyDictionary<string, Reading> newest = await live.NewestAsync(source.Key, cancellationToken).ConfigureAwait(false);
        IReadOnlyList<Assessment> latest = await assessments.ReadAsync(cancellationToken).ConfigureAwait(false);
        Instant now = Instant.Now(clock);
        RecordedRun? run = await runs.FindAsync(source.Key, cancellationToken).ConfigureAwait(false);
        SourceReadiness readiness = await readinessMaker.MakeAsync(
            new ReadinessInput(lab, source, [.. newest.Values], latest, openAlerts, now) { OpenRun = run?.Run }, cancellationToken).ConfigureAwait(false);
        List<NewestReadingView> shown = [];
        foreach (Channel channel in source.Channels)
        {
            if (newest.ContainsKey(channel.Id))
            {
                shown.Add(Show(lab, source, channel, newest, now));
            }
        }

        return new SourceStatusView(
            source.Key.ToString(),
            ReadinessMaker.Show(readiness),
            Reference(lab, source, newest),
            SetPoint(source, newest),
            shown.Count == 0 ? null : shown.Max(reading => reading.Time),
            shown.All(reading => reading.IsSilent),
            shown,
            AlertViews.Sorted(lab, openAlerts.Where(alert => alert.Source == source.Key)),
            run is null ? null : RunViews.Of(run));
    }

    private static NewestReadingView Show(LabSnapshot lab, ReferenceSource source, Channel channel, IReadOnlyDictionary<string, Reading> newest, Instant now)
    {
        Reading reading = newest[channel.Id];
        return new(
            channel.Id,
            reading.Time,
            Numbers.OrNull(reading.Value),
            Temperatures.IsTemperature(channel) ? Temperatures.Of(lab, source, channel, newest)?.Celsius : null,
            Names.OfFlags(reading.Quality),
            Silence.IsSilent(channel, reading.Time, now));
    }

    private static TemperatureView? Reference(LabSnapshot lab, ReferenceSource source, IReadOnlyDictionary<string, Reading> newest)
    {
        Channel? channel = source.ReferenceChannel
            ?? source.Channels.FirstOrDefault(candidate => candidate.Quantity == ChannelQuantity.ComparatorTemperature);
        return channel is not null && newest.ContainsKey(channel.Id)
            ? Temperatures.Of(lab, source, channel, newest)
            : null;
    }

    private static double? SetPoint(ReferenceSource source, IReadOnlyDictionary<string, Reading> newest)
    {
        Channel? channel = source.Channels.FirstOrDefault(candidate => candidate.Quantity == ChannelQuantity.SetPoint);
        return channel is not null && newest.TryGetValue(channel.Id, out Reading reading) ? Numbers.OrNull(reading.Value) : null;
    }
}
