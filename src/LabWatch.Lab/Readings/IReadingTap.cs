namespace LabWatch.Lab.Readings;

/// <summary>
/// Sees every pack as it arrives, before anything is stored, so that hazards depend on no store. Implementations work in memory,
/// return at once, never block, never throw, and may be called from several threads (one source's packs in order).
/// </summary>
public interface IReadingTap
{
    /// <summary>Called once for each decoded pack, redeliveries included.</summary>
    void OnPack(ReadingPack pack);
}
