using LabWatch.Lab.Assessments;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.StabilityParts;

/// <summary>The side results of a stability assessment.</summary>
internal static class StabilityFigures
{
    public static IReadOnlyList<AssessmentFigure> Of(StabilityEvidence evidence, StabilityValue value, StabilityVerdict verdict)
    {
        StabilityResult statistics = value.Statistics;
        double factor = StabilityUnit.PerKelvin(verdict.Unit);
        List<AssessmentFigure> figures =
        [
            new(FigureName.Mean, Mean(evidence, statistics), "Cel"),
            new(FigureName.StandardDeviation, Deviation(statistics, factor), verdict.Unit),
            new(FigureName.Slope, statistics.SlopePerHour, "K/h"),
            new("u-sampling", Exact(value.Sampling * factor), verdict.Unit),
            new("u-resolution", Exact(value.Resolution * factor), verdict.Unit),
            new("u-scale", Exact(value.Scale * factor), verdict.Unit),
            new(FigureName.MeanCount, Exact(statistics.MeanCount), "1"),
            new(FigureName.ReadingCount, Exact(statistics.ReadingCount), "1"),
            new(FigureName.LeftOutCount, Exact(evidence.Within.LeftOut), "1"),
            new(FigureName.OutsideCertificateCount, Exact(evidence.Within.OutsideCertificate), "1"),
        ];
        figures.AddRange(AllanFigures.Of(evidence, verdict.Unit, factor));
        if (double.IsFinite(evidence.SetPoint.Celsius))
        {
            figures.Insert(0, new(FigureName.SetPoint, Exact(evidence.SetPoint.Celsius), "Cel"));
        }

        if (verdict.Obstacles.Count == 0)
        {
            figures.Add(new(FigureName.GuardBand, Exact(verdict.Conformity.GuardBand), verdict.Unit));
        }

        return figures;
    }

    /// <summary>The mean temperature: here the calibration counts in full.</summary>
    private static Estimate Mean(StabilityEvidence evidence, StabilityResult statistics)
    {
        double noise = statistics.Mean.StandardUncertainty;
        double calibration = evidence.Within.StandardUncertainty;
        return statistics.Mean with { StandardUncertainty = Math.Sqrt((noise * noise) + (calibration * calibration)), DegreesOfFreedom = double.PositiveInfinity };
    }

    /// <summary>A standard deviation of normal values is uncertain by s/sqrt(2 v) (JCGM 100:2008, E.4.3).</summary>
    private static Estimate Deviation(StabilityResult statistics, double factor)
    {
        double freedom = Math.Max(1, statistics.EffectiveSampleSize - 1);
        double deviation = statistics.StandardDeviation * factor;
        return new(deviation, deviation / Math.Sqrt(2 * freedom), freedom);
    }

    private static Estimate Exact(double value) => new(value, 0);
}
