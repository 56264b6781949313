using LabWatch.Intake.Diagnostics;
using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>Writes refusals of one device to the log: the first at once, then one line in ten seconds, so that a device cannot fill the log.</summary>
internal sealed class RefusalNote(DeviceDesk desk)
{
    private static readonly TimeSpan Between = TimeSpan.FromSeconds(10);
    private readonly Lock _lock = new();
    private long? _writtenAt;
    private int _unwritten;

    public void Write(string client, string reason)
    {
        int more;
        lock (_lock)
        {
            if (_writtenAt is { } at && desk.Clock.GetElapsedTime(at) < Between)
            {
                _unwritten++;
                return;
            }

            _writtenAt = desk.Clock.GetTimestamp();
            (more, _unwritten) = (_unwritten, 0);
        }

        IntakeLog.EmbeddedRefused(desk.Logger, Finding.Quote(client) ?? string.Empty, reason, more);
    }
}
