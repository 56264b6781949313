using System.Diagnostics.Metrics;

namespace LabWatch.Alerts;

/// <summary>Figures of the alerts under the meter <c>LabWatch.Alerts</c>.</summary>
internal sealed class AlertsMetrics : IDisposable
{
    /// <summary>Name of the meter.</summary>
    public const string MeterName = "LabWatch.Alerts";

    private readonly Meter _meter;
    private readonly Counter<long> _attempts;

    public AlertsMetrics(IMeterFactory? factory = null)
    {
        _meter = factory?.Create(MeterName) ?? new Meter(MeterName);
        _attempts = _meter.CreateCounter<long>("labwatch.alerts.attempts", "{attempt}", "Attempts to hand a message to a notifier, by notifier and result.");
    }

    /// <summary>Shows a figure that is read when somebody looks.</summary>
    public void Observe(string name, string unit, string description, Func<long> value) => _meter.CreateObservableGauge(name, value, unit, description);

    /// <summary>Shows a total that is read when somebody looks.</summary>
    public void ObserveTotal(string name, string unit, string description, Func<long> value) => _meter.CreateObservableCounter(name, value, unit, description);

    /// <summary>A message was handed over.</summary>
    public void Sent(string notifier) => Count(notifier, "sent");

    /// <summary>An attempt failed and is repeated.</summary>
    public void Failed(string notifier) => Count(notifier, "failed");

    /// <summary>A message was given up.</summary>
    public void GivenUp(string notifier) => Count(notifier, "given-up");

    /// <inheritdoc/>
    public void Dispose() => _meter.Dispose();

    private void Count(string notifier, string result) =>
        _attempts.Add(1, new KeyValuePair<string, object?>("notifier", notifier), new KeyValuePair<string, object?>("result", result));
}
