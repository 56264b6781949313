using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.Messages;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;

namespace LabWatch.Alerts.Hosting;

/// <summary>Raises an alert when no reading of any source arrives: a broker, a network or an account that failed silences all at once.</summary>
internal sealed class ReadingsWatch(HazardWatch watch, IServiceAlerts alerts, ILabSnapshotSource lab, AlertsOptions options, TimeProvider clock)
{
    private long _packs = -1;
    private long _movedAt = clock.GetTimestamp();
    private bool _isRaised;

    /// <summary>Looks whether anything has come. Called about once a second, from one thread.</summary>
    public void Tick()
    {
        long packs = watch.Packs;
        if (packs != _packs)
        {
            if (_isRaised && packs > 0)
            {
                _isRaised = false;
                alerts.Clear(ServiceAlertCode.NoReadings, AlertTexts.NoReadingsReturned);
            }

            _packs = packs;
            _movedAt = clock.GetTimestamp();
            return;
        }

        TimeSpan silence = clock.GetElapsedTime(_movedAt);
        if (!_isRaised && lab.Current.Sources.Count > 0 && silence >= options.NoReadingsAfter)
        {
            _isRaised = true;
            string length = Phrase.Duration(silence);
            alerts.Raise(
                ServiceAlertCode.NoReadings, AlertPriority.High, Phrase.Headline(AlertTexts.NoReadingsHeadline, length), Phrase.Fill(AlertTexts.NoReadingsWhat, length), AlertTexts.NoReadingsDo);
        }
    }
}
