namespace LabWatch.Metrology.Thermometry;

/// <summary>Tolerance classes of industrial platinum resistance thermometers, IEC 60751:2022, 5.1.</summary>
public enum ToleranceClass
{
    /// <summary>Class AA, 0.1 + 0.0017 |t|.</summary>
    AA,

    /// <summary>Class A, 0.15 + 0.002 |t|.</summary>
    A,

    /// <summary>Class B, 0.3 + 0.005 |t|.</summary>
    B,

    /// <summary>Class C, 0.6 + 0.01 |t|.</summary>
    C,
}
