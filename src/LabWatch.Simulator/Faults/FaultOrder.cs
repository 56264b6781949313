namespace LabWatch.Simulator.Faults;

/// <summary>An order to make something go wrong.</summary>
/// <param name="Source">Id of the source in its site.</param>
/// <param name="Kind">What goes wrong.</param>
public sealed record FaultOrder(string Source, FaultKind Kind)
{
    /// <summary>Id of the channel concerned; null where the kind takes none.</summary>
    public string? Channel { get; init; }

    /// <summary>Size in the unit of <see cref="FaultCatalogue"/>; null for its default.</summary>
    public double? Size { get; init; }

    /// <summary>Time over which the fault grows from nothing to its size; zero for at once.</summary>
    public TimeSpan Onset { get; init; }

    /// <summary>Time from its start to its repair; null until it is cleared.</summary>
    public TimeSpan? Duration { get; init; }
}
