using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Criteria.AxialUniformityParts;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Assessments;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.EffectiveEmissivityParts;

/// <summary>The side results of an assessment of effective emissivity.</summary>
internal static class EmissivityFigures
{
    public static IReadOnlyList<AssessmentFigure> OfModel(ProfileBasis basis, BandRadiance? radiance, Baseline? baseline, LimitVerdict verdict)
    {
        List<AssessmentFigure> figures = [.. basis.Temperatures()];
        if (radiance is not null && baseline is not null)
        {
            BandModel model = radiance.Model;
            OpticsSide? emissivity = model.Sides.FirstOrDefault(side => side.Name == "emissivity");
            figures.Add(new("effective-emissivity", radiance.EffectiveEmissivity, "/"));
            figures.Add(new("isothermal-emissivity", radiance.Isothermal, "/"));
            figures.Add(new("baseline-emissivity", baseline.EffectiveEmissivity, "/"));
            figures.Add(new("radiance-temperature", radiance.RadianceCelsius, "Cel"));
            figures.Add(new("radiance-temperature-offset", UniformityFigures.Millikelvin(radiance.OffsetKelvin), "mK"));
            figures.Add(Exact("reflected-part", radiance.ReflectedPart));
            figures.Add(new("surroundings", basis.Evidence.Surroundings.RadianceCelsius, "Cel"));
            figures.Add(new("wall-emissivity", model.Optics.Emissivity, "/"));
            figures.Add(new("diffuse-fraction", model.Optics.DiffuseFraction, "/"));
            if (emissivity is not null)
            {
                figures.Add(Exact("sensitivity-to-wall-emissivity", (emissivity.High.Isothermal - emissivity.Low.Isothermal) / emissivity.Step));
            }

            figures.AddRange(Parts(radiance));
        }

        return Guarded(figures, verdict);
    }

    public static IReadOnlyList<AssessmentFigure> OfComparator(ProfileBasis basis, BandRadiance? radiance, Baseline? baseline, ComparatorEmissivity? found, LimitVerdict verdict)
    {
        List<AssessmentFigure> figures = [.. basis.Temperatures()];
        if (radiance is not null && baseline is not null && found is not null)
        {
            figures.Add(new("comparator-emissivity", found.EffectiveEmissivity, "/"));
            figures.Add(Exact("comparator-isothermal-emissivity", found.Isothermal));
            figures.Add(new("comparator-temperature", found.Point.Celsius, "Cel"));
            figures.Add(new("comparator-minus-model", UniformityFigures.Millikelvin(found.RadianceDifferenceKelvin), "mK"));
            figures.Add(new("effective-emissivity", radiance.EffectiveEmissivity, "/"));
            figures.Add(new("baseline-emissivity", baseline.EffectiveEmissivity, "/"));
            figures.Add(new("surroundings", basis.Evidence.Surroundings.RadianceCelsius, "Cel"));
        }

        return Guarded(figures, verdict);
    }

    /// <summary>Standard uncertainties that make up that of the effective emissivity.</summary>
    private static IEnumerable<AssessmentFigure> Parts(BandRadiance radiance) =>
    [
        Exact("u-wall-emissivity", double.Hypot(radiance.Part(ContributionKind.Emissivity), radiance.Part(ContributionKind.SecondEmissivity))),
        Exact("u-diffuse-fraction", radiance.Part(ContributionKind.DiffuseFraction)),
        Exact("u-wells", radiance.Part(ContributionKind.Well)),
        Exact("u-well-to-wall", radiance.Part(ContributionKind.WellToWall)),
        Exact("u-lip", double.Hypot(radiance.Part(ContributionKind.Lip), radiance.Part(ContributionKind.LipShape))),
        Exact("u-zones", radiance.Part(ContributionKind.Discretisation)),
        Exact("u-method", radiance.Part(ContributionKind.Method)),
    ];

    private static List<AssessmentFigure> Guarded(List<AssessmentFigure> figures, LimitVerdict verdict)
    {
        if (verdict.Obstacles.Count == 0)
        {
            figures.Add(new(FigureName.GuardBand, new(verdict.Conformity.GuardBand, 0), verdict.Unit));
        }

        return figures;
    }

    private static AssessmentFigure Exact(string name, double value) => new(name, new Estimate(value, 0), "/");
}
