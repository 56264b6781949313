using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.AxialUniformityParts;

/// <summary>An assessment of axial uniformity in plain words.</summary>
internal static class UniformityText
{
    public static string Of(ProfileBasis basis, WellSpread spread, LimitVerdict verdict)
    {
        string refusal = VerdictText.Refusal(verdict.Obstacles);
        if (spread.Coldest is not { } coldest || spread.Warmest is not { } warmest)
        {
            return refusal + basis.Wells();
        }

        string value = VerdictText.Sentence(
            "Largest difference between calibrated wells", verdict.Value.Value, verdict.Unit, verdict.Limit, verdict.Conformity, verdict.Obstacles.Count == 0);
        return $"{refusal}{value} {Place(warmest)} is the warmest, {Place(coldest)} the coldest; the gradient is {Gradient(spread.Gradient)} towards the bottom. "
            + $"{Effects(basis)}{basis.Wells()}";
    }

    private static string Place(WellPoint well) => $"{well.Channel.Id} with {Quantities.Fixed(well.Celsius, 3)} degC";

    private static string Gradient(Estimate gradient)
    {
        double expanded = 2 * gradient.StandardUncertainty;
        return $"{Quantities.Value(gradient.Value, expanded)} K/m (U = {Quantities.Significant(expanded)} K/m)";
    }

    private static string Effects(ProfileBasis basis) => string.Concat(basis.Radiances.Where(entry => entry.Radiance is not null).Select(entry => Effect(entry.Band, entry.Radiance!)));

    private static string Effect(WorkingBand band, BandRadiance radiance)
    {
        Estimate emissivity = radiance.ProfileEffect, kelvin = radiance.ProfileEffectKelvin;
        double u = CoverageFactor.For(emissivity.DegreesOfFreedom) * emissivity.StandardUncertainty;
        double uKelvin = CoverageFactor.For(kelvin.DegreesOfFreedom) * kelvin.StandardUncertainty * 1000;
        return $"In the band {band.Id} the profile changes e_eff by {Quantities.Value(emissivity.Value, u)} (U = {Quantities.Significant(u)}) and the radiance temperature by "
            + $"{Quantities.Value(kelvin.Value * 1000, uKelvin)} mK (U = {Quantities.Significant(uKelvin)} mK). ";
    }
}
