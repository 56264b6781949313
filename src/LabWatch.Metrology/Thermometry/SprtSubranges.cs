namespace LabWatch.Metrology.Thermometry;

/// <summary>What a subrange of the ITS-90 consists of.</summary>
public static class SprtSubranges
{
    /// <summary>Ends of the subrange, kelvin.</summary>
    public static (double Minimum, double Maximum) RangeKelvin(SprtSubrange subrange) => subrange switch
    {
        SprtSubrange.HydrogenToWater => (13.8033, 273.16),
        SprtSubrange.NeonToWater => (24.5561, 273.16),
        SprtSubrange.OxygenToWater => (54.3584, 273.16),
        SprtSubrange.ArgonToWater => (83.8058, 273.16),
        SprtSubrange.MercuryToGallium => (234.3156, 302.9146),
        SprtSubrange.WaterToGallium => (273.15, 302.9146),
        SprtSubrange.WaterToIndium => (273.15, 429.7485),
        SprtSubrange.WaterToTin => (273.15, 505.078),
        SprtSubrange.WaterToZinc => (273.15, 692.677),
        SprtSubrange.WaterToAluminium => (273.15, 933.473),
        SprtSubrange.WaterToSilver => (273.15, 1234.93),
        _ => throw new ArgumentOutOfRangeException(nameof(subrange), subrange, "Not a subrange."),
    };

    /// <summary>Names of the coefficients of the subrange's deviation function, in order.</summary>
    public static IReadOnlyList<string> Coefficients(SprtSubrange subrange) => subrange switch
    {
        SprtSubrange.HydrogenToWater => ["a", "b", "c1", "c2", "c3", "c4", "c5"],
        SprtSubrange.NeonToWater => ["a", "b", "c1", "c2", "c3"],
        SprtSubrange.OxygenToWater => ["a", "b", "c1"],
        SprtSubrange.WaterToGallium or SprtSubrange.WaterToIndium => ["a"],
        SprtSubrange.WaterToAluminium => ["a", "b", "c"],
        SprtSubrange.WaterToSilver => ["a", "b", "c", "d"],
        _ => ["a", "b"],
    };
}
