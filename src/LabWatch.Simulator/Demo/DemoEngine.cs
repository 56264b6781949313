using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Simulator.Faults;

namespace LabWatch.Simulator.Demo;

/// <summary>
/// The state of the demo in motion: which stretches of history are still to be filled, where the live part is, which faults were commanded. Everything that
/// it hands out can be made again from its file alike, so a start, a lost connection and a crash go the same way.
/// </summary>
internal sealed class DemoEngine : ILabSimulation, IDemoProgress
{
    /// <summary>A live part that is behind by more than this is cut: what lies between becomes history.</summary>
    public static TimeSpan LongestCatchUp { get; } = TimeSpan.FromSeconds(60);

    /// <summary>Interval of the history.</summary>
    public const int HistoryStepSecond = 10;

    private static readonly TimeSpan KeepCommands = TimeSpan.FromDays(7);
    private static readonly TimeSpan LongestRerun = TimeSpan.FromDays(1);

    private readonly Lock _gate = new();
    private readonly DemoStateFile _file;
    private readonly FaultBook _book;
    private DemoState _state;
    private LabSimulation? _live;

    /// <summary>Goes on with the state of the data directory, or begins a new demo.</summary>
    public DemoEngine(DemoOptions options, TimeProvider clock)
    {
        _file = new DemoStateFile(options.DataDirectory);
        DemoState? kept = _file.Read();
        _state = kept ?? DemoState.First(options.Seed, options.Days, Instant.Now(clock));
        IsFirstStart = kept is null;
        _book = new FaultBook(DemoLab.Designs, _state.Commanded);
        _file.Write(_state);
        Current = Progress();
    }

    /// <summary>Whether the data directory held no demo before.</summary>
    public bool IsFirstStart { get; }

    /// <summary>The state as it is kept.</summary>
    public DemoState State => _state;

    /// <inheritdoc/>
    public HistoryProgress Current { get; private set; }

    /// <inheritdoc/>
    public Instant Now => _live?.Now ?? _state.LiveStart;

    /// <inheritdoc/>
    public IReadOnlyList<ActiveFault> ActiveFaults => _live?.ActiveFaults ?? [];

    /// <inheritdoc/>
    public IReadOnlyList<Finding> Inject(FaultOrder order) => Command(live => live.Inject(order));

    /// <inheritdoc/>
    public IReadOnlyList<Finding> Clear(string id) => Command(live => live.Clear(id));

    /// <summary>The live simulation, at the last second that needs no more sending. Cuts a stretch of history where it is too far behind the clock.</summary>
    public LabSimulation ResumeLive(Instant now)
    {
        long second = LabSimulation.SecondOf(now);
        LabState? kept = _state.Live;
        long reached = kept?.Second ?? (LabSimulation.SecondOf(_state.LiveStart) - 1);
        bool isBehind = second - reached > LongestCatchUp.TotalSeconds;
        LabSimulation live = NewSimulation();
        if (second - reached > LongestRerun.TotalSeconds)
        {
            live.Settle(second - 1);
        }
        else
        {
            live.Take(kept, reached);
        }

        if (isBehind)
        {
            live.AdvanceTo(second - 1);
            LabState resumed = live.Capture();
            HistorySegment gap = new(reached, second, reached, kept);
            Change(state => state with { Live = resumed, History = [.. state.History.Where(segment => !segment.IsDone), gap] });
        }

        _live = live;
        return live;
    }

    /// <summary>The first stretch of history that is not done; null where all is.</summary>
    public HistorySegment? NextHistory() => _state.History.FirstOrDefault(segment => !segment.IsDone);

    /// <summary>A simulation at the point where a stretch of history goes on.</summary>
    public LabSimulation ResumeHistory(HistorySegment segment)
    {
        LabSimulation simulation = NewSimulation();
        simulation.Take(segment.State, segment.DoneUpTo);
        return simulation;
    }

    /// <summary>Notes that history has been acknowledged up to the second of a state, and keeps it where asked to.</summary>
    public void HistoryDone(HistorySegment segment, LabState reached, bool keep)
    {
        HistorySegment Moved(HistorySegment old) =>
            old.From == segment.From && old.To == segment.To ? old with { DoneUpTo = reached.Second, State = reached.Second >= old.To - 1 ? null : reached } : old;
        Change(state => state with { History = [.. state.History.Select(Moved)] }, keep);
        Current = Progress();
    }

    /// <summary>Notes that live packs have been acknowledged up to the second of a state, and keeps it.</summary>
    public void LiveDone(LabState reached)
    {
        _book.Forget(Instant.FromUnixSeconds(reached.Second) - KeepCommands);
        Change(state => state with { Live = reached, Commanded = _book.Commanded });
    }

    private LabSimulation NewSimulation() =>
        new(new LabHistory(_state.Seed, _state.Origin), _book, new FaultSchedule(_state.Seed, DemoLab.Designs, _state.LiveStart));

    // A command is on disk before it can show in a reading: it works from the next second on, and that one waits for the gate of the simulation.
    private IReadOnlyList<Finding> Command(Func<LabSimulation, IReadOnlyList<Finding>> command)
    {
        if (_live is not { } live)
        {
            return [new Finding("not-started", "demo", "The demo has not started yet.", null, "Try again in a moment.")];
        }

        return live.Commanding(command, () => Change(state => state with { Commanded = _book.Commanded }));
    }

    private void Change(Func<DemoState, DemoState> change, bool keep = true)
    {
        lock (_gate)
        {
            _state = change(_state);
            if (keep)
            {
                _file.Write(_state);
            }
        }
    }

    private HistoryProgress Progress()
    {
        IReadOnlyList<HistorySegment> history = _state.History;
        if (history.Count == 0)
        {
            return new HistoryProgress(1, _state.Origin, _state.LiveStart, Done: true);
        }

        double whole = history.Sum(segment => (double)(segment.To - 1 - segment.From));
        double done = history.Sum(segment => (double)(Math.Min(segment.DoneUpTo, segment.To - 1) - segment.From));
        bool isDone = history.All(segment => segment.IsDone);
        return new HistoryProgress(
            isDone ? 1 : Math.Clamp(done / Math.Max(1, whole), 0, 1),
            Instant.FromUnixSeconds(history.Min(segment => segment.From)),
            Instant.FromUnixSeconds(history.Max(segment => segment.To)),
            isDone);
    }
}
