using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Profiles;

/// <summary>The effective emissivity that a departure is told from.</summary>
/// <param name="EffectiveEmissivity">The value.</param>
/// <param name="IsDesignValue">Whether it is the isothermal value of the model, because none is on record.</param>
/// <param name="From">Where it comes from, in words.</param>
public sealed record Baseline(Estimate EffectiveEmissivity, bool IsDesignValue, string From)
{
    /// <summary>
    /// The baseline of a band: of those on record at an instant the one with the nearest set point (of several the latest); else the design value.
    /// </summary>
    /// <param name="source">The source.</param>
    /// <param name="model">The model of the band.</param>
    /// <param name="isothermal">Isothermal effective emissivity of the model, with its uncertainty.</param>
    /// <param name="nominalCelsius">Set point; NaN where unknown.</param>
    /// <param name="at">The instant.</param>
    public static Baseline Of(ReferenceSource source, BandModel model, Estimate isothermal, double nominalCelsius, Instant at)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(model);
        EmissivityBaseline? nearest = source.Baselines
            .Where(baseline => string.Equals(baseline.Band, model.Band.Id, StringComparison.Ordinal) && baseline.At <= at)
            .OrderBy(baseline => double.IsNaN(nominalCelsius) ? 0 : Math.Abs(baseline.SetPointCelsius - nominalCelsius))
            .ThenByDescending(baseline => baseline.At)
            .FirstOrDefault();
        return nearest is null
            ? new(isothermal, true, "design value of an isothermal cavity, because no baseline is on record")
            : new(nearest.EffectiveEmissivity, false, $"{nearest.From}, at {Quantities.Fixed(nearest.SetPointCelsius, 1)} degC, {Moments.Text(nearest.At)}");
    }
}
