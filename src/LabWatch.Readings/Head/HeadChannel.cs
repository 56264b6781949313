using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Readings.Head;

/// <summary>A channel known to the store, with its newest durable reading.</summary>
internal sealed class HeadChannel(int number, string name)
{
    public int Number { get; } = number;

    public string Name { get; } = name;

    /// <summary>The newest durable reading by device time; null before the first.</summary>
    public Reading? Newest { get; private set; }

    /// <summary>Takes a durable reading as the newest where it is later.</summary>
    public void OfferNewest(long time, double value, ReadingQuality quality)
    {
        if (Newest is null || time > Newest.Value.Time.Microseconds)
        {
            Newest = new Reading(Name, new Instant(time), value, quality);
        }
    }
}
