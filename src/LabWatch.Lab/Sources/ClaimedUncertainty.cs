using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Sources;

/// <summary>A contribution to the uncertainty of a source's radiance temperature as the laboratory's own budget claims it.</summary>
/// <param name="Contribution">What contributes (a slug). Those that the service measures have names of their own; any other is taken as claimed.</param>
/// <param name="StandardUncertaintyKelvin">Standard uncertainty, kelvin, zero or positive.</param>
/// <param name="DegreesOfFreedom">Degrees of freedom, positive; infinite where exactly known.</param>
/// <param name="Shape">Distribution.</param>
/// <param name="From">Where it comes from, in words.</param>
public sealed record ClaimedUncertainty(
    string Contribution, double StandardUncertaintyKelvin, double DegreesOfFreedom, DistributionShape Shape, string From)
{
    /// <summary>Working band it applies to; null for all.</summary>
    public string? Band { get; init; }

    /// <summary>Lowest set point it applies to, degree Celsius; null where open.</summary>
    public double? MinimumCelsius { get; init; }

    /// <summary>Highest set point it applies to, degree Celsius; null where open.</summary>
    public double? MaximumCelsius { get; init; }

    /// <summary>Whether it applies to a band at a set point.</summary>
    public bool AppliesTo(string band, double celsius) =>
        (Band is null || string.Equals(Band, band, StringComparison.Ordinal)) && !(celsius < MinimumCelsius) && !(celsius > MaximumCelsius);
}
