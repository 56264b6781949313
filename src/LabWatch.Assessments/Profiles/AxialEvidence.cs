using LabWatch.Assessments.Cavities;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Profiles;

/// <summary>What is known about the temperatures along a source's axis and around it over a window.</summary>
/// <param name="Source">The source.</param>
/// <param name="Window">The window.</param>
/// <param name="Cavity">Geometry and view.</param>
/// <param name="Wells">The wells used, from the bottom to the aperture.</param>
/// <param name="Reference">The one that gives the reference temperature; null where it gives none.</param>
/// <param name="Lip">The aperture lip; null where nothing usable measures it.</param>
/// <param name="Surroundings">What the cavity reflects.</param>
/// <param name="Comparators">The comparators, in the order of the channels.</param>
/// <param name="LeftOut">Wells that are not used, each as a clause with its reason.</param>
/// <param name="Obstacles">Why the wells that should be used do not suffice, each as a clause; empty where they do.</param>
public sealed record AxialEvidence(
    ReferenceSource Source,
    TimeWindow Window,
    CavityDescription Cavity,
    IReadOnlyList<WellPoint> Wells,
    WellPoint? Reference,
    LipPoint? Lip,
    SurroundingsPoint Surroundings,
    IReadOnlyList<ComparatorPoint> Comparators,
    IReadOnlyList<string> LeftOut,
    IReadOnlyList<string> Obstacles)
{
    /// <summary>Whether the radiance of a cavity with this profile can be computed.</summary>
    public bool HasProfile => Reference is not null;

    /// <summary>What was assumed or left out, as sentences.</summary>
    public IEnumerable<string> Notes()
    {
        if (LeftOut.Count > 0)
        {
            yield return $"Left out: {string.Join("; ", LeftOut)}.";
        }

        if (Lip is null)
        {
            yield return "No lip thermometer gives a usable value: the wall is taken as warm as the well nearest to the aperture, and what a lip at room temperature would change is in the uncertainty.";
        }
        else if (!Lip.IsCalibrated)
        {
            yield return FormattableString.Invariant($"No certificate is in force for {Lip.Channel}: a standard uncertainty of {Lip.StandardUncertainty:0.0#} K is taken.");
        }

        if (!Surroundings.IsMeasured)
        {
            yield return FormattableString.Invariant($"Nothing measures the air: {SurroundingsPoint.UsualCelsius} degC with a standard uncertainty of {SurroundingsPoint.UsualUncertaintyKelvin} K is taken.");
        }
    }
}
