using System.Diagnostics.Metrics;

namespace LabWatch.Service.Api.Streaming;

/// <summary>Counters of the stream.</summary>
internal sealed class StreamMetrics
{
    private readonly UpDownCounter<int> _clients;
    private readonly Counter<long> _cut;

    /// <summary>Makes the counters.</summary>
    public StreamMetrics(IMeterFactory meters)
    {
        ArgumentNullException.ThrowIfNull(meters);
        Meter meter = meters.Create("LabWatch.Service");
        _clients = meter.CreateUpDownCounter<int>("labwatch.stream.clients", "{client}", "Pages that listen to changes now.");
        _cut = meter.CreateCounter<long>("labwatch.stream.cut", "{client}", "Listeners cut because they did not keep up.");
    }

    /// <summary>A listener came or went.</summary>
    public void Clients(int change) => _clients.Add(change);

    /// <summary>A listener was cut.</summary>
    public void WasCut() => _cut.Add(1);
}
