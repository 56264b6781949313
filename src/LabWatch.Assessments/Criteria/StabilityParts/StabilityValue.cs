using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Instruments;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.StabilityParts;

/// <summary>The half-range with the contributions to its uncertainty, all in kelvin. See <see cref="StabilityCriterion"/> for what counts.</summary>
/// <param name="Statistics">Half-range, standard deviation, slope and counts.</param>
/// <param name="Sampling">Standard uncertainty from the sampling of the noise, sensitivity 1.</param>
/// <param name="Resolution">Standard uncertainty from the resolution of the readings.</param>
/// <param name="Scale">Standard uncertainty from the slope of the calibration.</param>
internal sealed record StabilityValue(StabilityResult Statistics, double Sampling, double Resolution, double Scale)
{
    /// <summary>The half-range with its combined standard uncertainty (JCGM 100:2008, 5.1.2 and G.4.1), kelvin.</summary>
    public Estimate HalfRange
    {
        get
        {
            double combined = Math.Sqrt((Sampling * Sampling) + (Resolution * Resolution) + (Scale * Scale));
            double samplingPart = Math.Pow(Sampling / combined, 4);
            double freedom = samplingPart > 0 ? Statistics.HalfRange.DegreesOfFreedom / samplingPart : double.PositiveInfinity;
            return Statistics.HalfRange.HasValue
                ? new(Statistics.HalfRange.Value, combined, double.IsNaN(combined) ? double.NaN : freedom)
                : Estimate.None;
        }
    }

    public static StabilityValue Of(StabilityEvidence evidence)
    {
        ReadOnlySpan<double> celsius = evidence.Within.Celsius.Span;
        StabilityResult statistics = Stability.Evaluate(evidence.Within.TimeMicroseconds.Span, celsius);
        Certificate? certificate = evidence.Certificates.At(evidence.Window.Start);
        double range = certificate is null ? double.NaN : certificate.MaximumCelsius - certificate.MinimumCelsius;
        double relative = Math.Sqrt(2) * evidence.Within.StandardUncertainty / range;
        return new(
            statistics,
            statistics.HalfRange.StandardUncertainty,
            ReadingNoise.SmallestStep(celsius) / Math.Sqrt(24),
            double.IsFinite(relative) ? relative * statistics.HalfRange.Value : 0);
    }

    /// <summary>The half-range in a unit of temperature difference (mK or K).</summary>
    public Estimate In(string unit)
    {
        double factor = StabilityUnit.PerKelvin(unit);
        Estimate halfRange = HalfRange;
        return halfRange.HasValue
            ? new(halfRange.Value * factor, halfRange.StandardUncertainty * factor, halfRange.DegreesOfFreedom)
            : Estimate.None;
    }
}
