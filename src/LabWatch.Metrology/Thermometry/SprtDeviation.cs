namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// Deviation function W - Wr(W) of a standard platinum resistance thermometer in one subrange of the ITS-90: Preston-Thomas 1990, equations 12,
/// 13 and 14. Immutable; no method allocates.
/// </summary>
public sealed class SprtDeviation
{
    private const double AluminiumKelvin = 933.473;

    private readonly double[] _coefficients;

    /// <summary>Makes a deviation function.</summary>
    /// <param name="subrange">The subrange.</param>
    /// <param name="coefficients">Its coefficients in the order of <see cref="SprtSubranges.Coefficients"/>.</param>
    /// <param name="ratioAtAluminium">
    /// W(933.473 K) of the thermometer, used by the term of d alone; NaN to compute it from a, b and c.
    /// </param>
    /// <exception cref="ArgumentException">The number of coefficients is not that of the subrange.</exception>
    public SprtDeviation(SprtSubrange subrange, IReadOnlyList<double> coefficients, double ratioAtAluminium = double.NaN)
    {
        ArgumentNullException.ThrowIfNull(coefficients);
        if (coefficients.Count != SprtSubranges.Coefficients(subrange).Count)
        {
            throw new ArgumentException("The number of coefficients is not that of the subrange.", nameof(coefficients));
        }

        Subrange = subrange;
        (MinimumKelvin, MaximumKelvin) = SprtSubranges.RangeKelvin(subrange);
        _coefficients = [.. coefficients];
        RatioAtAluminium = double.PositiveInfinity;
        if (subrange == SprtSubrange.WaterToSilver)
        {
            RatioAtAluminium = double.IsNaN(ratioAtAluminium) ? RatioAt(AluminiumKelvin) : ratioAtAluminium;
        }
    }

    /// <summary>The subrange.</summary>
    public SprtSubrange Subrange { get; }

    /// <summary>Lower end of the subrange, kelvin.</summary>
    public double MinimumKelvin { get; }

    /// <summary>Upper end of the subrange, kelvin.</summary>
    public double MaximumKelvin { get; }

    /// <summary>Coefficients in the order of <see cref="SprtSubranges.Coefficients"/>.</summary>
    public IReadOnlyList<double> Coefficients => _coefficients;

    /// <summary>W(933.473 K), above which the term of d applies; infinity in the other subranges.</summary>
    public double RatioAtAluminium { get; }

    /// <summary>W - Wr at a measured ratio W.</summary>
    public double Value(double ratio)
    {
        ReadOnlySpan<double> c = _coefficients;
        double excess = ratio - 1;
        if (Subrange > SprtSubrange.ArgonToWater)
        {
            double beyond = Math.Max(0, ratio - RatioAtAluminium);
            return (excess * (c[0] + (excess * (Or0(c, 1) + (excess * Or0(c, 2)))))) + (Or0(c, 3) * beyond * beyond);
        }

        double log = Math.Log(ratio);
        return Subrange == SprtSubrange.ArgonToWater
            ? excess * (c[0] + (c[1] * log))
            : (excess * (c[0] + (c[1] * excess))) + (Power(log, FirstPower) * Polynomial.Value(c[2..], log));
    }

    /// <summary>Derivative of <see cref="Value"/> by W.</summary>
    public double Slope(double ratio)
    {
        ReadOnlySpan<double> c = _coefficients;
        double excess = ratio - 1;
        if (Subrange > SprtSubrange.ArgonToWater)
        {
            double beyond = Math.Max(0, ratio - RatioAtAluminium);
            return c[0] + (excess * ((2 * Or0(c, 1)) + (3 * excess * Or0(c, 2)))) + (2 * Or0(c, 3) * beyond);
        }

        double log = Math.Log(ratio);
        return Subrange == SprtSubrange.ArgonToWater
            ? c[0] + (c[1] * (log + (excess / ratio)))
            : c[0] + (2 * c[1] * excess)
                + (((FirstPower * Power(log, FirstPower - 1) * Polynomial.Value(c[2..], log)) + (Power(log, FirstPower) * Polynomial.Slope(c[2..], log))) / ratio);
    }

    /// <summary>The ratio W that the thermometer has at a temperature (kelvin): Wr + deviation, solved for W.</summary>
    public double RatioAt(double kelvin)
    {
        double reference = Its90.Ratio(kelvin);
        double ratio = reference;
        for (int step = 0; step < 20; step++)
        {
            double change = (ratio - Value(ratio) - reference) / (1 - Slope(ratio));
            ratio -= change;
            if (Math.Abs(change) < 1e-15 * ratio)
            {
                break;
            }
        }

        return ratio;
    }

    /// <summary>Power of ln W that c1 stands with: i + n with n = 2, 0 and 1 in the three low subranges.</summary>
    private int FirstPower => Subrange switch
    {
        SprtSubrange.HydrogenToWater => 3,
        SprtSubrange.NeonToWater => 1,
        _ => 2,
    };

    private static double Or0(ReadOnlySpan<double> coefficients, int index) => index < coefficients.Length ? coefficients[index] : 0;

    private static double Power(double value, int exponent) => exponent switch
    {
        0 => 1,
        1 => value,
        2 => value * value,
        _ => value * value * value,
    };
}
