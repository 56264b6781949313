namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>How many messages a device may send: so many a second, and a burst of two seconds' worth.</summary>
internal sealed class DeviceRate(int perSecond, TimeProvider clock)
{
    private const double BurstSeconds = 2;
    private double _left = perSecond * BurstSeconds;
    private long _countedAt = clock.GetTimestamp();

    /// <summary>Counts a message; false where the device has sent too many.</summary>
    public bool TryTake()
    {
        long now = clock.GetTimestamp();
        _left = Math.Min(perSecond * BurstSeconds, _left + (perSecond * clock.GetElapsedTime(_countedAt, now).TotalSeconds));
        _countedAt = now;
        if (_left < 1)
        {
            return false;
        }

        _left--;
        return true;
    }
}
