using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Planning;

/// <summary>The planner's progress, written by the planner alone.</summary>
internal sealed class PlannerState(TimeProvider clock) : IPlannerState
{
    private readonly Lock _lock = new();
    private PlannerStatus _current = PlannerStatus.None;

    public PlannerStatus Current
    {
        get
        {
            lock (_lock)
            {
                return _current;
            }
        }
    }

    public void Started() => Change(status => status with { LastRun = Instant.Now(clock) });

    public void Waiting(int windowsDue, int hoursWaiting) => Change(status => status with { WindowsDue = windowsDue, HoursWaiting = hoursWaiting });

    public void Recorded(int count) => Change(status => status with { Recorded = status.Recorded + count });

    public void Succeeded() => Change(status => status with { LastSuccess = Instant.Now(clock), LastError = null });

    public void Failed(string error) => Change(status => status with { LastError = error });

    private void Change(Func<PlannerStatus, PlannerStatus> change)
    {
        lock (_lock)
        {
            _current = change(_current);
        }
    }
}
