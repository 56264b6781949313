using System.Diagnostics.Metrics;

namespace LabWatch.Intake.Diagnostics;

/// <summary>One counter whose total can also be read.</summary>
internal sealed class CountedTotal(Meter meter, string name, string unit, string description)
{
    private readonly Counter<long> _counter = meter.CreateCounter<long>(name, unit, description);
    private long _total;

    public long Total => Interlocked.Read(ref _total);

    public void Add(long count)
    {
        if (count > 0)
        {
            Interlocked.Add(ref _total, count);
            _counter.Add(count);
        }
    }
}
