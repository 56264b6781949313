using LabWatch.Lab.Time;
using LabWatch.Simulator.Noise;
using LabWatch.Simulator.Sources;

namespace LabWatch.Simulator.Faults;

/// <summary>
/// Faults of the demo that come by themselves, a pure function of seed, time and start of the live part: seldom before it, one within minutes of it, then one
/// in each slot of two hours.
/// </summary>
/// <param name="seed">Seed of the demo.</param>
/// <param name="designs">The sources.</param>
/// <param name="liveStart">When the live part began; null for a schedule without one.</param>
internal sealed class FaultSchedule(long seed, IReadOnlyList<SourceDesign> designs, Instant? liveStart)
{
    /// <summary>Time from the start of the live part to its first fault.</summary>
    public static TimeSpan FirstFaultAfter { get; } = TimeSpan.FromSeconds(150);

    private const long SlotSecond = 7200;
    private const double ShareOfHistorySlots = 0.02;
    private const double BridgedCaseCelsius = 95;
    private static readonly long Stream = CounterNoise.Stream("fault-schedule");

    private readonly Dictionary<long, ActiveFault?> _slots = [];
    private readonly ActiveFault? _first = First(designs, liveStart);

    /// <summary>The scheduled faults that work at an instant (at most two).</summary>
    public IEnumerable<ActiveFault> At(Instant at)
    {
        if (_first is { } first && first.Covers(at))
        {
            yield return first;
        }

        if (Slot(Math.DivRem(at.Microseconds, SlotSecond * Instant.MicrosecondsPerSecond, out _)) is { } slot && slot.Covers(at))
        {
            yield return slot;
        }
    }

    private ActiveFault? Slot(long index)
    {
        if (!_slots.TryGetValue(index, out ActiveFault? fault))
        {
            if (_slots.Count > 100)
            {
                _slots.Clear();
            }

            fault = Draw(index);
            _slots[index] = fault;
        }

        return fault;
    }

    private ActiveFault? Draw(long index)
    {
        Instant from = Instant.FromUnixSeconds(index * SlotSecond);
        bool live = liveStart is { } start && from >= start;
        if (!live && CounterNoise.Uniform(seed, Stream, index) > ShareOfHistorySlots)
        {
            return null;
        }

        long offset = 600 + (long)(3000 * CounterNoise.Uniform(seed, Stream + 1, index));
        TimeSpan duration = TimeSpan.FromSeconds(900 + (long)(1500 * CounterNoise.Uniform(seed, Stream + 2, index)));
        Instant begin = from + TimeSpan.FromSeconds(offset);
        FaultOrder order = Menu((int)(Menus * CounterNoise.Uniform(seed, Stream + 3, index)), begin);
        return new ActiveFault(FormattableString.Invariant($"s-{index}"), order, begin, begin + duration, Scheduled: true);
    }

    private const int Menus = 9;

    private FaultOrder Menu(int choice, Instant at)
    {
        TimeSpan slowly = TimeSpan.FromMinutes(5);
        return choice switch
        {
            0 or 1 => Bridge(designs, at),
            2 => new FaultOrder("fir", FaultKind.PurgeLoss) { Size = 1 },
            3 => new FaultOrder("fir", FaultKind.ThermometerDrift) { Channel = "well-bottom", Size = 0.08, Onset = slowly },
            4 => new FaultOrder("hazel", FaultKind.SensorSilent) { Channel = "outer-case" },
            5 => new FaultOrder("rowan", FaultKind.ComparatorDrift) { Channel = "comparator-8-14", Size = 0.9, Onset = slowly },
            6 => new FaultOrder("hazel", FaultKind.ThermometerStuck) { Channel = "well-middle" },
            7 => new FaultOrder("rowan", FaultKind.CoatingFall) { Size = 0.12, Onset = slowly },
            _ => new FaultOrder("fir", FaultKind.ClockSkew) { Size = 90.4 },
        };
    }

    private static ActiveFault? First(IReadOnlyList<SourceDesign> designs, Instant? liveStart)
    {
        if (liveStart is not { } start || !designs.Any(design => design.Id == "rowan"))
        {
            return null;
        }

        Instant begin = start + FirstFaultAfter;
        return new ActiveFault("s-first", Bridge(designs, begin), begin, begin + TimeSpan.FromMinutes(14), Scheduled: true);
    }

    // A thermal bridge that would bring the case to the same temperature whatever the furnace is set to:
    // what flows through it equals what the case gives to the room.
    private static FaultOrder Bridge(IReadOnlyList<SourceDesign> designs, Instant at)
    {
        SourceDesign rowan = designs.First(design => design.Id == "rowan");
        double inside = rowan.Routine.At(at.Microseconds / Instant.MicrosecondsPerSecond);
        double size = rowan.Heat.CaseToRoomConductance * (BridgedCaseCelsius - 22) / Math.Max(20, inside - BridgedCaseCelsius);
        return new FaultOrder("rowan", FaultKind.InsulationDamage) { Size = Math.Round(Math.Clamp(size, 0.5, 20), 2), Onset = TimeSpan.FromSeconds(20) };
    }
}
