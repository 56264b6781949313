namespace LabWatch.Metrology.Thermometry;

/// <summary>A defining fixed point of the ITS-90 (Preston-Thomas 1990, tables 1 and 2; the pressure effects are from memory).</summary>
/// <param name="Name">Substance and kind: TP triple, MP melting, FP freezing point.</param>
/// <param name="Kelvin">T90, kelvin.</param>
/// <param name="PressureEffect">dT/dp, 1e-8 K/Pa; NaN where not listed.</param>
/// <param name="ImmersionEffect">dT/dl with depth, mK/m; NaN where not listed.</param>
public sealed record FixedPoint(string Name, double Kelvin, double PressureEffect, double ImmersionEffect)
{
    /// <summary>The points from the triple point of oxygen on.</summary>
    public static IReadOnlyList<FixedPoint> All { get; } =
    [
        new("e-H2 TP", 13.8033, 34, 0.25),
        new("Ne TP", 24.5561, 16, 1.9),
        new("O2 TP", 54.3584, 12, 1.5),
        new("Ar TP", 83.8058, 25, 3.3),
        new("Hg TP", 234.3156, 5.4, 7.1),
        new("H2O TP", 273.16, -7.5, -0.73),
        new("Ga MP", 302.9146, -2.0, -1.2),
        new("In FP", 429.7485, 4.9, 3.3),
        new("Sn FP", 505.078, 3.3, 2.2),
        new("Zn FP", 692.677, 4.3, 2.7),
        new("Al FP", 933.473, 7.0, 1.6),
        new("Ag FP", 1234.93, 6.0, 5.4),
        new("Au FP", 1337.33, 6.1, 10),
        new("Cu FP", 1357.77, 3.3, 2.6),
    ];

    /// <summary>t90, degree Celsius, to the 0.1 mK that the scale states.</summary>
    public double Celsius => Math.Round(Kelvin - Its90.CelsiusOffset, 4);

    /// <summary>Temperature at a depth (metre) of the sensor below the surface of the substance, kelvin.</summary>
    public double KelvinAtDepth(double metre) => Kelvin + (ImmersionEffect * 1e-3 * metre);

    /// <summary>The point of a name; null where there is none.</summary>
    public static FixedPoint? Find(string name) => All.FirstOrDefault(point => string.Equals(point.Name, name, StringComparison.Ordinal));
}
