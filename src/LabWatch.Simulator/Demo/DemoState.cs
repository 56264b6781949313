using LabWatch.Lab.Time;
using LabWatch.Simulator.Faults;

namespace LabWatch.Simulator.Demo;

/// <summary>What a demo keeps between two starts.</summary>
/// <param name="Format">Format of the file.</param>
/// <param name="Seed">Seed that it was first started with.</param>
/// <param name="Origin">Start of the history; hidden drifts count from here.</param>
/// <param name="LiveStart">When it was first started, whole second.</param>
/// <param name="Live">State up to which, its second included, every live pack was acknowledged; null before the first.</param>
/// <param name="History">Stretches still to be filled, and the first one for the progress, in order of time.</param>
/// <param name="Commanded">Commanded faults.</param>
internal sealed record DemoState(
    int Format, long Seed, Instant Origin, Instant LiveStart, LabState? Live, IReadOnlyList<HistorySegment> History, IReadOnlyList<ActiveFault> Commanded)
{
    /// <summary>The format that this program reads and writes.</summary>
    public const int PresentFormat = 1;

    /// <summary>A demo that starts for the first time.</summary>
    public static DemoState First(long seed, int days, Instant now)
    {
        long live = LabSimulation.SecondOf(now);
        long from = live - (days * 86400L);
        HistorySegment[] history = days > 0 ? [new HistorySegment(from, live, from, null)] : [];
        return new DemoState(PresentFormat, seed, Instant.FromUnixSeconds(from), Instant.FromUnixSeconds(live), null, history, []);
    }
}
