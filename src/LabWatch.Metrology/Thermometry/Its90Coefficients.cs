namespace LabWatch.Metrology.Thermometry;

/// <summary>Constants of the reference functions of the ITS-90: Preston-Thomas 1990, Metrologia 27, 3-10, table 4.</summary>
internal static class Its90Coefficients
{
    /// <summary>A(i) of equation 9a.</summary>
    public static ReadOnlySpan<double> LowRatio =>
    [
        -2.13534729, 3.1832472, -1.80143597, 0.71727204, 0.50344027, -0.61899395, -0.05332322, 0.28021362, 0.10715224,
        -0.29302865, 0.04459872, 0.11868632, -0.05248134,
    ];

    /// <summary>B(i) of equation 9b.</summary>
    public static ReadOnlySpan<double> LowTemperature =>
    [
        0.183324722, 0.240975303, 0.209108771, 0.190439972, 0.142648498, 0.077993465, 0.012475611, -0.032267127, -0.075291522,
        -0.05647067, 0.076201285, 0.123893204, -0.029201193, -0.091173542, 0.001317696, 0.026025526,
    ];

    /// <summary>C(i) of equation 10a.</summary>
    public static ReadOnlySpan<double> HighRatio =>
    [
        2.78157254, 1.64650916, -0.1371439, -0.00649767, -0.00234444, 0.00511868, 0.00187982, -0.00204472, -0.00046122,
        0.00045724,
    ];

    /// <summary>D(i) of equation 10b.</summary>
    public static ReadOnlySpan<double> HighTemperature =>
    [
        439.932854, 472.41802, 37.684494, 7.472018, 2.920828, 0.005184, -0.963864, -0.188732, 0.191203, 0.049025,
    ];
}
