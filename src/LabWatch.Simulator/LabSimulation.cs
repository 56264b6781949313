using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Simulator.Faults;
using LabWatch.Simulator.Room;
using LabWatch.Simulator.Sources;

namespace LabWatch.Simulator;

/// <summary>
/// The demo lab as a physical model, without clock or network: it moves as fast as it is asked to. Physics always runs in whole seconds, so a step of 10 s is
/// bit for bit ten steps of 1 s, and the same seed with the same commands gives the same telemetry on the same build and platform.
/// </summary>
public sealed class LabSimulation : ILabSimulation
{
    /// <summary>How long a simulation runs before its first reading, so that nothing is left of the state it was built in.</summary>
    public static TimeSpan SpinUp { get; } = TimeSpan.FromDays(1);

    private readonly Lock _gate = new();
    private readonly RoomClimate _room;
    private readonly FaultBook _book;
    private readonly FaultSchedule? _schedule;
    private readonly SourceSimulation[] _sources;
    private readonly long?[] _buffer;
    private long _second;

    /// <summary>A demo lab that has been running for <see cref="SpinUp"/> at an instant, without scheduled faults.</summary>
    /// <param name="seed">Draws the hidden truth, the weather and all noise.</param>
    /// <param name="start">Where it starts, truncated to the second; hidden drifts count from here.</param>
    public LabSimulation(long seed, Instant start)
        : this(new LabHistory(seed, start), new FaultBook(DemoLab.Designs, []), schedule: null)
    {
        Settle(SecondOf(start));
    }

    internal LabSimulation(LabHistory history, FaultBook book, FaultSchedule? schedule)
    {
        _room = new RoomClimate(history.Seed);
        _book = book;
        _schedule = schedule;
        _sources = [.. DemoLab.Designs.Select(design => new SourceSimulation(history, design))];
        _buffer = new long?[DemoLab.Designs.Max(design => design.Channels.Count)];
    }

    /// <inheritdoc/>
    public Instant Now => Instant.FromUnixSeconds(Volatile.Read(ref _second));

    /// <inheritdoc/>
    public IReadOnlyList<ActiveFault> ActiveFaults
    {
        get
        {
            lock (_gate)
            {
                Instant now = Instant.FromUnixSeconds(_second);
                IEnumerable<ActiveFault> scheduled = _schedule?.At(now) ?? [];
                return [.. scheduled, .. _book.Commanded.Where(fault => fault.End is not { } end || end > now)];
            }
        }
    }

    /// <summary>Ids of the sources.</summary>
    public static IReadOnlyList<string> SourceIds { get; } = [.. DemoLab.Designs.Select(design => design.Id)];

    /// <inheritdoc/>
    public IReadOnlyList<Finding> Inject(FaultOrder order)
    {
        ArgumentNullException.ThrowIfNull(order);
        lock (_gate)
        {
            return _book.Inject(order, Instant.FromUnixSeconds(_second + 1));
        }
    }

    /// <inheritdoc/>
    public IReadOnlyList<Finding> Clear(string id)
    {
        lock (_gate)
        {
            return _book.Clear(id, Instant.FromUnixSeconds(_second + 1));
        }
    }

    /// <summary>Moves on by a whole number of seconds, one or more.</summary>
    public void Advance(int seconds)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(seconds);
        lock (_gate)
        {
            AdvanceLocked(_second + seconds);
        }
    }

    /// <summary>What the device of a source sends now, silent channels left out. Throws for an unknown source.</summary>
    public IReadOnlyList<SimulatedReading> Read(string source)
    {
        lock (_gate)
        {
            SourceSimulation simulation = Source(source);
            simulation.Read(_second, _buffer);
            Instant time = DeviceTime(simulation);
            List<SimulatedReading> readings = [];
            for (int i = 0; i < simulation.Design.Channels.Count; i++)
            {
                ChannelDesign channel = simulation.Design.Channels[i];
                if (_buffer[i] is { } scaled)
                {
                    readings.Add(new SimulatedReading(channel.Id, time, scaled / Math.Pow(10, channel.Decimals), channel.Unit));
                }
            }

            return readings;
        }
    }

    /// <summary>What is really the case in a source. Throws for an unknown source.</summary>
    public HiddenTruth Truth(string source) => Source(source).Truth;

    internal IReadOnlyList<SourceSimulation> Sources => _sources;

    internal long Second => Volatile.Read(ref _second);

    /// <summary>Runs up to a second from the state it was built in, over <see cref="SpinUp"/> or another time.</summary>
    internal void Settle(long second, TimeSpan? over = null)
    {
        lock (_gate)
        {
            _second = second - (long)(over ?? SpinUp).TotalSeconds;
            AdvanceLocked(second);
        }
    }

    internal void AdvanceTo(long second)
    {
        lock (_gate)
        {
            AdvanceLocked(second);
        }
    }

    /// <summary>Moves to a second and writes each source's pack.</summary>
    internal void Produce(long second, SenmlWriter writer, Action<int, byte[]> pack)
    {
        lock (_gate)
        {
            AdvanceLocked(second);
            for (int i = 0; i < _sources.Length; i++)
            {
                _sources[i].Read(second, _buffer);
                pack(i, writer.Write(i, DeviceTime(_sources[i]), _buffer));
            }
        }
    }

    /// <summary>Carries out a command and keeps it while no second can pass.</summary>
    internal IReadOnlyList<Finding> Commanding(Func<LabSimulation, IReadOnlyList<Finding>> command, Action keep)
    {
        lock (_gate)
        {
            IReadOnlyList<Finding> findings = command(this);
            if (findings.Count == 0)
            {
                keep();
            }

            return findings;
        }
    }

    internal LabState Capture()
    {
        lock (_gate)
        {
            return new LabState(_second, _sources.ToDictionary(source => source.Design.Id, source => source.Capture(), StringComparer.Ordinal));
        }
    }

    /// <summary>Takes over a state; without one it settles up to the second that the state would have had.</summary>
    internal void Take(LabState? state, long second)
    {
        if (state is null)
        {
            Settle(second);
            return;
        }

        lock (_gate)
        {
            _second = state.Second;
            foreach (SourceSimulation source in _sources)
            {
                source.Restore(state.Sources[source.Design.Id]);
            }

            MoveSources(static (source, second, room, effects) => source.Observe(second, room, effects));
        }
    }

    internal static long SecondOf(Instant instant) => instant.Floor(Instant.MicrosecondsPerSecond).Microseconds / Instant.MicrosecondsPerSecond;

    private void AdvanceLocked(long second)
    {
        while (_second < second)
        {
            Volatile.Write(ref _second, _second + 1);
            MoveSources(static (source, second, room, effects) => source.Step(second, room, effects));
        }
    }

    private void MoveSources(Action<SourceSimulation, long, RoomClimate, FaultEffects> move)
    {
        _room.Set(_second);
        Instant now = Instant.FromUnixSeconds(_second);
        IReadOnlyList<ActiveFault> commanded = _book.Commanded;
        ActiveFault? first = null;
        List<ActiveFault>? all = null;
        if (_schedule is not null)
        {
            foreach (ActiveFault fault in _schedule.At(now))
            {
                Collect(fault, ref first, ref all);
            }
        }

        for (int i = 0; i < commanded.Count; i++)
        {
            if (commanded[i].Covers(now))
            {
                Collect(commanded[i], ref first, ref all);
            }
        }

        foreach (SourceSimulation source in _sources)
        {
            move(source, _second, _room, first is null ? FaultEffects.None : EffectsOn(source.Design.Id, now, first, all));
        }
    }

    private static void Collect(ActiveFault fault, ref ActiveFault? first, ref List<ActiveFault>? all)
    {
        if (first is null)
        {
            first = fault;
        }
        else
        {
            (all ??= []).Add(fault);
        }
    }

    private static FaultEffects EffectsOn(string source, Instant now, ActiveFault first, List<ActiveFault>? others)
    {
        FaultEffects? effects = null;
        foreach (ActiveFault fault in others is null ? [first] : others.Prepend(first))
        {
            if (string.Equals(fault.Order.Source, source, StringComparison.Ordinal))
            {
                (effects ??= new FaultEffects()).Add(fault.Order, fault.MagnitudeAt(now));
            }
        }

        return effects ?? FaultEffects.None;
    }

    private Instant DeviceTime(SourceSimulation source) =>
        Instant.FromUnixSeconds(_second) + TimeSpan.FromMilliseconds(Math.Round(1000 * source.Effects.ClockSkew));

    private SourceSimulation Source(string id) =>
        _sources.FirstOrDefault(source => string.Equals(source.Design.Id, id, StringComparison.Ordinal))
        ?? throw new ArgumentException($"The simulation has no source {id}.", nameof(id));
}
