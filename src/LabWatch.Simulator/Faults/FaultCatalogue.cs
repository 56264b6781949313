namespace LabWatch.Simulator.Faults;

/// <summary>All kinds of faults with their sizes.</summary>
public static class FaultCatalogue
{
    /// <summary>Every kind once, in the order of <see cref="FaultKind"/>.</summary>
    public static IReadOnlyList<FaultTraits> All { get; } =
    [
        new(FaultKind.ThermometerDrift, "thermometer-drift", "K", -50, 50, 0.1, true),
        new(FaultKind.ThermometerStuck, "thermometer-stuck", "1", 1, 1, 1, true),
        new(FaultKind.CoatingFall, "coating-fall", "1", 0, 0.5, 0.05, false),
        new(FaultKind.ComparatorDrift, "comparator-drift", "K", -50, 50, 0.5, true),
        new(FaultKind.PurgeLoss, "purge-loss", "1", 0, 1, 1, false),
        new(FaultKind.Frost, "frost", "1", 0, 1, 0.5, false),
        new(FaultKind.HeaterRelayStuck, "heater-relay-stuck", "1", 0, 1, 1, false),
        new(FaultKind.InsulationDamage, "insulation-damage", "W/K", 0, 20, 2, false),
        new(FaultKind.OpenShutter, "open-shutter", "1", 1, 1, 1, false),
        new(FaultKind.SensorSilent, "sensor-silent", "1", 1, 1, 1, true),
        new(FaultKind.ClockSkew, "clock-skew", "s", -3600, 3600, 90.4, false),
    ];

    /// <summary>The traits of a kind; throws for a value that is no kind.</summary>
    public static FaultTraits Of(FaultKind kind) =>
        All.FirstOrDefault(traits => traits.Kind == kind) ?? throw new ArgumentOutOfRangeException(nameof(kind), kind, "Not a kind of fault.");

    /// <summary>The traits of a kind by its name in commands; null where there is none of that name.</summary>
    public static FaultTraits? Find(string? name) => All.FirstOrDefault(traits => string.Equals(traits.Name, name, StringComparison.Ordinal));
}
