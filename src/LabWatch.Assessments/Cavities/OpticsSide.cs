using LabWatch.Metrology.Cavities;

namespace LabWatch.Assessments.Cavities;

/// <summary>The zone weights with one optical property of the wall moved down and up by about its standard uncertainty.</summary>
/// <param name="Name">What is moved: <c>emissivity</c>, <c>second-emissivity</c> or <c>diffuse-fraction</c>.</param>
/// <param name="Low">Weights with the lower value.</param>
/// <param name="High">Weights with the higher value.</param>
/// <param name="Step">Difference of the two values.</param>
/// <param name="StandardUncertainty">Standard uncertainty of the property.</param>
public sealed record OpticsSide(string Name, ZoneWeights Low, ZoneWeights High, double Step, double StandardUncertainty)
{
    /// <summary>By what a difference between the two results is multiplied to give the contribution of one standard uncertainty.</summary>
    public double Scale => StandardUncertainty / Step;
}
