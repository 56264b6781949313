namespace LabWatch.Metrology.Thermometry;

/// <summary>Subranges of the ITS-90 in which a deviation function is defined (Preston-Thomas 1990, 3.3.1 to 3.3.3, table 4).</summary>
public enum SprtSubrange
{
    /// <summary>13.8033 K to 273.16 K: a, b, c1 to c5.</summary>
    HydrogenToWater,

    /// <summary>24.5561 K to 273.16 K: a, b, c1 to c3.</summary>
    NeonToWater,

    /// <summary>54.3584 K to 273.16 K: a, b, c1.</summary>
    OxygenToWater,

    /// <summary>83.8058 K to 273.16 K: a, b.</summary>
    ArgonToWater,

    /// <summary>234.3156 K to 302.9146 K: a, b.</summary>
    MercuryToGallium,

    /// <summary>273.15 K to 302.9146 K: a.</summary>
    WaterToGallium,

    /// <summary>273.15 K to 429.7485 K: a.</summary>
    WaterToIndium,

    /// <summary>273.15 K to 505.078 K: a, b.</summary>
    WaterToTin,

    /// <summary>273.15 K to 692.677 K: a, b.</summary>
    WaterToZinc,

    /// <summary>273.15 K to 933.473 K: a, b, c.</summary>
    WaterToAluminium,

    /// <summary>273.15 K to 1234.93 K: a, b, c, d.</summary>
    WaterToSilver,
}
