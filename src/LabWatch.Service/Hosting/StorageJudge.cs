using System.Globalization;
using LabWatch.Alerts;
using LabWatch.Lab.Alerts;

namespace LabWatch.Service.Hosting;

/// <summary>
/// Decides which alerts about storing stand. A trouble must last before it is told, so that a file that somebody locks for a moment wakes
/// nobody, and must be gone for a while before the alert ends.
/// </summary>
internal sealed class StorageJudge(IServiceAlerts alerts, string directory, TimeProvider clock)
{
    /// <summary>How long readings cannot be stored before it is told.</summary>
    public static readonly TimeSpan OnDelay = TimeSpan.FromSeconds(10);

    /// <summary>How long they must be stored again before the alert ends.</summary>
    public static readonly TimeSpan OffDelay = TimeSpan.FromSeconds(10);

    /// <summary>Less free than this share of the disk, and less than <see cref="LowBytes"/>, is nearly full.</summary>
    private const double LowShare = 0.05;

    private const long LowBytes = 2L << 30;

    private const double Hysteresis = 1.2;

    private long? _since;
    private long? _goodSince;
    private int? _damage;
    private bool? _isNotStored;
    private bool? _isNearlyFull;
    private string _reason = string.Empty;

    /// <summary>Judges what was found now.</summary>
    public void Judge(StorageState state)
    {
        JudgeStoring(state);
        JudgeDisk(state);
        JudgeDamage(state.Damage);
    }

    private void JudgeStoring(StorageState state)
    {
        long now = clock.GetTimestamp();
        if (state.Trouble is null && !state.CommitsStopped)
        {
            _since = null;
            _goodSince ??= now;
            if (_isNotStored != false && clock.GetElapsedTime(_goodSince.Value, now) >= OffDelay)
            {
                _isNotStored = false;
                alerts.Clear(ServiceAlertCode.ReadingsNotStored, "Readings are stored again.");
            }

            return;
        }

        _goodSince = null;
        _since ??= now;
        _reason = state.Trouble ?? _reason;
        if (_isNotStored != true && (state.CommitsStopped || clock.GetElapsedTime(_since.Value, now) >= OnDelay))
        {
            _isNotStored = true;
            alerts.Raise(ServiceAlertCode.ReadingsNotStored, AlertPriority.High, Headline(), What(state), ToDo());
        }
    }

    private string Headline() => $"Readings are not being stored: {(_reason.Length > 0 ? _reason : "nothing can be written.")}";

    private string What(StorageState state) => string.Create(CultureInfo.InvariantCulture, $"{Headline()} ") + (state.CommitsStopped
        ? "The buffer cannot take them either, so devices and broker are not given acknowledgements and keep what they hold; hazards are still watched. What a device cannot keep is lost."
        : string.Create(CultureInfo.InvariantCulture, $"They wait in the buffer on the disk of the service ({state.Buffered} messages) and are stored later; hazards are still watched."));

    private string ToDo() => $"Make room on the disk of {directory}, or make it writable again for the account of the service; look at the disk itself if it reports errors. The service goes on by itself, without a restart.";

    private void JudgeDisk(StorageState state)
    {
        if (state is not { FreeBytes: { } free, DiskBytes: > 0 and { } size })
        {
            return;
        }

        double low = Math.Min(LowBytes, size * LowShare);
        if (free < low && _isNearlyFull != true)
        {
            _isNearlyFull = true;
            string room = string.Create(CultureInfo.InvariantCulture, $"{free / 1e6:N0} MB of {size / 1e6:N0} MB are free");
            alerts.Raise(
                ServiceAlertCode.DiskNearlyFull, AlertPriority.Medium, $"The disk of the readings is nearly full: {room}.",
                $"The disk of {directory} is nearly full: {room}. When it is full, readings are no longer stored.", "Make room, or move the data to a larger disk.");
        }
        else if (free > Hysteresis * low && _isNearlyFull != false)
        {
            _isNearlyFull = false;
            alerts.Clear(ServiceAlertCode.DiskNearlyFull, "The disk of the readings has room again.");
        }
    }

    private void JudgeDamage(int damage)
    {
        if (damage == _damage)
        {
            return;
        }

        if (damage > 0)
        {
            alerts.Raise(
                ServiceAlertCode.ReadingsDamaged, AlertPriority.High, string.Create(CultureInfo.InvariantCulture, $"Stored readings are damaged or missing ({damage} pieces)."),
                "The store of readings found bytes that are not what was written, or commits that are gone. They are set aside and kept; the health page and the log name each piece. Assessments that need these readings cannot be made again from this store.",
                "Look at the disk. Restore a backup to another directory and compare; have devices send again what they buffered.");
        }
        else
        {
            alerts.Clear(ServiceAlertCode.ReadingsDamaged, "The store of readings has no damage.");
        }

        _damage = damage;
    }
}
