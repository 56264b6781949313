using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.EffectiveEmissivityParts;

/// <summary>The scope of one band: the model with the live profile against the baseline.</summary>
internal static class ModelJudgement
{
    public static CriterionResult Of(ProfileBasis basis, WorkingBand band, BandModel model, BandRadiance? radiance)
    {
        Baseline? baseline = radiance is null ? null : Baseline.Of(basis.Input.Source, model, radiance.Isothermal, basis.NominalCelsius, basis.Input.Window.End);
        Estimate departure = radiance is null || baseline is null ? Estimate.None : Departure(radiance, baseline);
        LimitVerdict verdict = LimitVerdict.Of(
            basis.Input, CriterionCode.EffectiveEmissivity, band.Id, basis.NominalCelsius, departure, [("/", 1)], [.. basis.Obstacles, .. model.Problems]);
        return new(
            band.Id,
            verdict.Value,
            verdict.Unit,
            verdict.Limit,
            verdict.Conformity.CoverageFactor,
            verdict.Decision,
            verdict.Probability,
            EmissivityFigures.OfModel(basis, radiance, baseline, verdict),
            Text(basis, band, model, radiance, baseline, verdict));
    }

    /// <summary>Magnitude of the departure; from the design value of the same model only the profile's effect is left.</summary>
    private static Estimate Departure(BandRadiance radiance, Baseline baseline)
    {
        Estimate present = baseline.IsDesignValue ? radiance.ProfileEffect : radiance.EffectiveEmissivity;
        double difference = baseline.IsDesignValue ? present.Value : present.Value - baseline.EffectiveEmissivity.Value;
        double u = baseline.IsDesignValue ? 0 : baseline.EffectiveEmissivity.StandardUncertainty;
        return new(Math.Abs(difference), double.Hypot(present.StandardUncertainty, u), present.DegreesOfFreedom);
    }

    private static string Text(ProfileBasis basis, WorkingBand band, BandModel model, BandRadiance? radiance, Baseline? baseline, LimitVerdict verdict)
    {
        string refusal = VerdictText.Refusal(verdict.Obstacles);
        if (radiance is null || baseline is null)
        {
            return refusal + basis.Wells();
        }

        string value = VerdictText.Sentence(
            $"Departure of e_eff from its baseline in the band {band.Id}", verdict.Value.Value, verdict.Unit, verdict.Limit, verdict.Conformity, verdict.Obstacles.Count == 0);
        Estimate e = radiance.EffectiveEmissivity, offset = UniformityMillikelvin(radiance.OffsetKelvin);
        return $"{refusal}{value} By the model e_eff is {EmissivityText.With(e)} for the reference temperature of {Quantities.Fixed(basis.Evidence.Reference!.Celsius, 3)} degC; "
            + $"without temperature differences it would be {EmissivityText.At(radiance.Isothermal.Value, e)}. The baseline is {EmissivityText.At(baseline.EffectiveEmissivity.Value, e)} ({baseline.From}). "
            + $"The radiance temperature lies {EmissivityText.Signed(offset, "mK")} from the reference temperature, with surroundings of "
            + $"{Quantities.Fixed(basis.Evidence.Surroundings.RadianceCelsius.Value, 1)} degC ({EmissivityText.Uncertainty(basis.Evidence.Surroundings.RadianceCelsius)} K), of which {Quantities.Significant(radiance.ReflectedPart)} is reflected. "
            + $"{EmissivityText.Method(model, radiance)} {basis.Wells()}";
    }

    private static Estimate UniformityMillikelvin(Estimate kelvin) => AxialUniformityParts.UniformityFigures.Millikelvin(kelvin);
}
