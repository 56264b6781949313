using LabWatch.Assessments.Cavities;
using LabWatch.Metrology.Cavities;

namespace LabWatch.Assessments.Attribution;

/// <summary>How the candidates show in the radiance temperature of a band, to first order.</summary>
/// <param name="PerEmissivity">Kelvin for each unit of wall emissivity.</param>
/// <param name="PerGradient">Kelvin for each kelvin by which the bottom is warmer than the reference well.</param>
/// <param name="PerSignal">Kelvin for each unit of relative signal: L/(dL/dT).</param>
/// <param name="PerSurroundings">Kelvin for each kelvin of the surroundings.</param>
internal readonly record struct BandSensitivity(double PerEmissivity, double PerGradient, double PerSignal, double PerSurroundings)
{
    private const double IceKelvin = 273.15;

    /// <summary>The sensitivities of a model at a temperature; null where there is no model.</summary>
    public static BandSensitivity? Of(BandModel model, double celsius, double surroundingsCelsius)
    {
        if (model.Weights is not { } weights)
        {
            return null;
        }

        double own = celsius + IceKelvin, around = surroundingsCelsius + IceKelvin;
        double radiance = model.Radiance.Radiance(own), background = model.Radiance.Radiance(around);
        double seen = (weights.Isothermal * radiance) + (weights.IsothermalComplement * background);
        double slope = model.Radiance.RadianceSlope(model.Radiance.Temperature(seen));
        double bottom = 0;
        for (int i = 0; i < weights.Weights.Length; i++)
        {
            bottom += weights.Counts.Grid.Zones[i].Surface == CavitySurface.Bottom ? weights.Weights[i] : 0;
        }

        (_, double complement) = weights.Slopes();
        return new(
            -complement * (radiance - background) / slope,
            bottom * model.Radiance.RadianceSlope(own) / slope,
            seen / slope,
            weights.IsothermalComplement * model.Radiance.RadianceSlope(around) / slope);
    }
}
