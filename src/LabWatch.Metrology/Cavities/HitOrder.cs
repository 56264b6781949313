namespace LabWatch.Metrology.Cavities;

/// <summary>How many reflections a ray had before a hit, on each of the two materials of a cavity; a cavity of one material has the second at zero.</summary>
/// <param name="First">Reflections on the first material.</param>
/// <param name="Second">Reflections on the second material.</param>
public readonly record struct HitOrder(int First, int Second)
{
    /// <summary>All reflections.</summary>
    public int Total => First + Second;
}
