using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.AxialUniformityParts;

/// <summary>The side results of an assessment of axial uniformity.</summary>
internal static class UniformityFigures
{
    public static IReadOnlyList<AssessmentFigure> Of(ProfileBasis basis, WellSpread spread, LimitVerdict verdict)
    {
        List<AssessmentFigure> figures = [.. basis.Temperatures()];
        if (spread.Gradient.HasValue)
        {
            figures.Add(new("gradient", spread.Gradient, "K/m"));
        }

        foreach (WellPoint well in spread.Wells)
        {
            figures.Add(new("mean-" + well.Channel.Id, new(well.Celsius, well.StandardUncertainty), "Cel"));
        }

        foreach ((WorkingBand band, BandModel _, BandRadiance? radiance) in basis.Radiances)
        {
            if (radiance is not null)
            {
                figures.Add(new("emissivity-effect-" + band.Id, radiance.ProfileEffect, "/"));
                figures.Add(new("radiance-temperature-effect-" + band.Id, Millikelvin(radiance.ProfileEffectKelvin), "mK"));
            }
        }

        if (verdict.Obstacles.Count == 0)
        {
            figures.Add(new(FigureName.GuardBand, new(verdict.Conformity.GuardBand, 0), verdict.Unit));
        }

        return figures;
    }

    internal static Estimate Millikelvin(Estimate kelvin) => new(kelvin.Value * 1000, kelvin.StandardUncertainty * 1000, kelvin.DegreesOfFreedom);
}
