namespace LabWatch.Metrology.Attribution;

/// <summary>A measured deviation of radiance temperature, measured less expected, and how each candidate would show in it (first order, signs as given).</summary>
/// <param name="Source">Id of the source.</param>
/// <param name="Comparator">Id of the comparator.</param>
/// <param name="Band">Id of the band.</param>
/// <param name="Kelvin">Deviation, kelvin.</param>
/// <param name="StandardUncertainty">Its standard uncertainty without what a candidate stands for, kelvin.</param>
/// <param name="KelvinPerEmissivity">Kelvin for each unit of wall emissivity (the derivative through the cavity and the band).</param>
/// <param name="KelvinPerGradient">Kelvin for each kelvin of the assumed gradient; 0 where no gradient is considered.</param>
/// <param name="KelvinPerSignal">Kelvin for each unit of relative signal, lambda T^2/c2 (1 - exp(-c2/(lambda T))).</param>
public sealed record BandDeviation(
    string Source,
    string Comparator,
    string Band,
    double Kelvin,
    double StandardUncertainty,
    double KelvinPerEmissivity,
    double KelvinPerGradient,
    double KelvinPerSignal)
{
    /// <summary>Kelvin for each unit of a candidate: kelvin of thermometer error or gradient, unit of emissivity, unit of relative signal.</summary>
    internal double Sensitivity(Cause cause) => cause.Kind switch
    {
        CauseKind.ThermometerError when cause.Subject == Source => -1, // a thermometer that reads high makes the source look cold
        CauseKind.CoatingEmissivity when cause.Subject == Source => KelvinPerEmissivity,
        CauseKind.Gradient when cause.Subject == Source => KelvinPerGradient,
        CauseKind.ComparatorDrift when cause.Subject == Comparator && cause.Band == Band => KelvinPerSignal,
        CauseKind.OneBandAbsorption when cause.Subject == Source && cause.Band == Band => KelvinPerSignal,
        _ => 0,
    };
}
