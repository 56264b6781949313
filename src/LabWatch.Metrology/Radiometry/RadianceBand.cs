using System.Collections.Concurrent;

namespace LabWatch.Metrology.Radiometry;

/// <summary>
/// Blackbody radiance in a spectral band of uniform response, or at one wavelength, as a function of temperature, with its inverse and its
/// derivative. Immutable, safe to share between threads; no method allocates.
/// <para>
/// A band of some width keeps a table (ln L as polynomials of degree 7 in ln T on equal steps) over <see cref="TableMinimumKelvin"/> to
/// <see cref="TableMaximumKelvin"/>: radiance within 2e-12 relative and temperature within 2e-12 relative of the exact integral (tested);
/// outside the table the exact integral is used. One wavelength uses Planck's law in closed form.
/// </para>
/// </summary>
public sealed class RadianceBand
{
    /// <summary>Lowest temperature of the table, kelvin.</summary>
    public const double TableMinimumKelvin = 100;

    /// <summary>Highest temperature of the table, kelvin.</summary>
    public const double TableMaximumKelvin = 4000;

    private static readonly ConcurrentDictionary<(double Lower, double Upper), RadianceBand> Made = new();

    private readonly LogRadianceTable? _table;

    private RadianceBand(double lowerMicrometre, double upperMicrometre)
    {
        LowerMicrometre = lowerMicrometre;
        UpperMicrometre = upperMicrometre;
        _table = IsOneWavelength
            ? null
            : new(TableMinimumKelvin, TableMaximumKelvin, kelvin => Math.Log(BlackbodyIntegral.BandRadiance(lowerMicrometre, upperMicrometre, kelvin)));
    }

    /// <summary>Lower edge, micrometre.</summary>
    public double LowerMicrometre { get; }

    /// <summary>Upper edge, micrometre.</summary>
    public double UpperMicrometre { get; }

    /// <summary>Whether this is one wavelength: radiances are spectral then, W m^-2 sr^-1 um^-1, else W m^-2 sr^-1.</summary>
    public bool IsOneWavelength => LowerMicrometre == UpperMicrometre;

    /// <summary>
    /// The band between two wavelengths (vacuum, micrometre); one wavelength where they are equal. The few bands a laboratory uses are kept,
    /// because making the table takes about a millisecond; more than 1000 different ones are made anew each time.
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">The lower edge is not in 0.1 to 1000 um, or the upper is below it or above 1000 um.</exception>
    public static RadianceBand Of(double lowerMicrometre, double upperMicrometre)
    {
        if (!(lowerMicrometre is >= 0.1 and <= 1000))
        {
            throw new ArgumentOutOfRangeException(nameof(lowerMicrometre), lowerMicrometre, "An edge from 0.1 to 1000 um is needed.");
        }

        if (!(upperMicrometre >= lowerMicrometre && upperMicrometre <= 1000))
        {
            throw new ArgumentOutOfRangeException(nameof(upperMicrometre), upperMicrometre, "The upper edge must not be below the lower one, nor above 1000 um.");
        }

        return Made.Count < 1000
            ? Made.GetOrAdd((lowerMicrometre, upperMicrometre), static edges => new(edges.Lower, edges.Upper))
            : new(lowerMicrometre, upperMicrometre);
    }

    /// <summary>The band of one wavelength, micrometre.</summary>
    public static RadianceBand At(double micrometre) => Of(micrometre, micrometre);

    /// <summary>Blackbody radiance at a temperature (kelvin, positive).</summary>
    public double Radiance(double kelvin)
    {
        if (_table is null)
        {
            return PlanckLaw.Radiance(LowerMicrometre, kelvin);
        }

        return _table.Covers(kelvin)
            ? Math.Exp(_table.LogRadiance(Math.Log(kelvin)))
            : BlackbodyIntegral.BandRadiance(LowerMicrometre, UpperMicrometre, kelvin);
    }

    /// <summary>dL/dT at a temperature (kelvin, positive), radiance per kelvin.</summary>
    public double RadianceSlope(double kelvin) =>
        IsOneWavelength
            ? PlanckLaw.RadianceSlope(LowerMicrometre, kelvin)
            : BlackbodyIntegral.BandRadianceSlope(LowerMicrometre, UpperMicrometre, kelvin);

    /// <summary>Temperature of a radiance, kelvin: the radiance temperature in the band. NaN where the radiance is not positive and finite.</summary>
    public double Temperature(double radiance)
    {
        if (!(radiance > 0) || double.IsPositiveInfinity(radiance))
        {
            return double.NaN;
        }

        if (_table is null)
        {
            return PlanckLaw.Temperature(LowerMicrometre, radiance);
        }

        double logRadiance = Math.Log(radiance);
        return _table.CoversLogRadiance(logRadiance) ? Math.Exp(_table.LogKelvin(logRadiance)) : Root(logRadiance);
    }

    /// <summary>Newton's method on the exact integral, ln L against 1/T, which is nearly a straight line.</summary>
    private double Root(double logRadiance)
    {
        double kelvin = logRadiance < _table!.LowestLogRadiance ? TableMinimumKelvin : TableMaximumKelvin;
        for (int step = 0; step < 100; step++)
        {
            double radiance = BlackbodyIntegral.BandRadiance(LowerMicrometre, UpperMicrometre, kelvin);
            double slope = BlackbodyIntegral.BandRadianceSlope(LowerMicrometre, UpperMicrometre, kelvin);
            double reciprocal = (1 / kelvin) - ((logRadiance - Math.Log(radiance)) * radiance / (slope * kelvin * kelvin));
            double next = reciprocal > 0.1 / kelvin ? 1 / reciprocal : 10 * kelvin;
            if (!(Math.Abs(next - kelvin) > 1e-14 * kelvin))
            {
                return next;
            }

            kelvin = next;
        }

        return kelvin;
    }
}
