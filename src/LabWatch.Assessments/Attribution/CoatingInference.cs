using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;
using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Attribution;

/// <summary>Which emissivities of the coating explain what a comparator showed, if all else is as stated.</summary>
/// <param name="Band">Id of the band.</param>
/// <param name="Channel">Channel of the comparator.</param>
/// <param name="Assessment">Id of the assessment that it is taken from.</param>
/// <param name="Stated">Emissivity of the lab file.</param>
/// <param name="ReflectedPart">Reflected part that the comparator shows: one minus effective emissivity, less what the profile takes away.</param>
/// <param name="Interval">The interval.</param>
/// <param name="Explanation">The same in words.</param>
public sealed record CoatingInference(string Band, string Channel, string Assessment, Estimate Stated, Estimate ReflectedPart, WallEmissivityInterval Interval, string Explanation)
{
    /// <summary>Emissivities that are thought possible before.</summary>
    public const double LowestPossible = 0.5;

    /// <summary>Infers the interval.</summary>
    /// <param name="model">Model of the band.</param>
    /// <param name="comparator">Assessment of effective emissivity by the comparator.</param>
    /// <param name="byModel">That by the model over the same window.</param>
    public static CoatingInference? Of(BandModel model, Assessment comparator, Assessment byModel)
    {
        ArgumentNullException.ThrowIfNull(model);
        ArgumentNullException.ThrowIfNull(comparator);
        ArgumentNullException.ThrowIfNull(byModel);
        Estimate shown = Figure(comparator, "comparator-emissivity");
        double deficit = Figure(byModel, "isothermal-emissivity").Value - Figure(byModel, "effective-emissivity").Value;
        if (model.Weights is not { } weights || !shown.HasValue || !double.IsFinite(deficit))
        {
            return null;
        }

        double diffuse = Figure(byModel, "u-diffuse-fraction").Value;
        Estimate reflected = new(1 - shown.Value - deficit, double.Hypot(shown.StandardUncertainty, double.IsFinite(diffuse) ? diffuse : 0));
        WallEmissivityInterval interval = WallEmissivityInterval.Explaining(weights.Counts, reflected.Value, 2 * reflected.StandardUncertainty, LowestPossible);
        return new(model.Band.Id, comparator.Scope, comparator.Id, model.Optics.Emissivity, reflected, interval, Text(model, comparator, reflected, interval));
    }

    private static Estimate Figure(Assessment assessment, string name) =>
        assessment.Figures.FirstOrDefault(figure => figure.Name == name)?.Value ?? Estimate.None;

    private static string Text(BandModel model, Assessment comparator, Estimate reflected, in WallEmissivityInterval interval)
    {
        string shown = $"{comparator.Scope} shows a reflected part of {Quantities.Value(reflected.Value, 2 * reflected.StandardUncertainty)} (U = {Quantities.Significant(2 * reflected.StandardUncertainty)})";
        string stated = $"the lab file states {Quantities.Fixed(model.Optics.Emissivity.Value, 3)} (u = {Quantities.Significant(model.Optics.Emissivity.StandardUncertainty)})";
        return interval switch
        {
            { IsEmpty: true } => $"{shown}. No emissivity of the coating from {LowestPossible} to 1 explains that: the temperature, the geometry or the comparator is off.",
            { HasInformation: false } => $"{shown}. No information about the coating: emissivities from {Quantities.Fixed(interval.Lower, 2)} to {Quantities.Fixed(interval.Upper, 2)} all explain it; {stated}.",
            _ => $"{shown}. Emissivities of the coating from {Quantities.Fixed(interval.Lower, 3)} to {Quantities.Fixed(interval.Upper, 3)} explain it, if all else is as stated; {stated}.",
        };
    }
}
