using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.EffectiveEmissivityParts;

/// <summary>The scope of one comparator: what it shows of the source against the baseline.</summary>
internal static class ComparatorJudgement
{
    public static CriterionResult Of(ProfileBasis basis, WorkingBand band, BandModel model, BandRadiance? radiance, ComparatorPoint point)
    {
        Baseline? baseline = radiance is null ? null : Baseline.Of(basis.Input.Source, model, radiance.Isothermal, basis.NominalCelsius, basis.Input.Window.End);
        ComparatorEmissivity? found = radiance is null ? null : ComparatorEmissivity.Of(radiance, point);
        Estimate departure = found is null || baseline is null ? Estimate.None : Departure(found.EffectiveEmissivity, baseline.EffectiveEmissivity);
        LimitVerdict verdict = LimitVerdict.Of(
            basis.Input,
            CriterionCode.EffectiveEmissivity,
            band.Id,
            basis.NominalCelsius,
            departure,
            [("/", 1)],
            [.. basis.Obstacles, .. model.Problems, .. point.Refusal is null ? [] : new[] { point.Refusal }]);
        verdict = Resolved(basis, point, found, verdict);
        return new(
            point.Channel.Id,
            verdict.Value,
            verdict.Unit,
            verdict.Limit,
            verdict.Conformity.CoverageFactor,
            verdict.Decision,
            verdict.Probability,
            EmissivityFigures.OfComparator(basis, radiance, baseline, found, verdict),
            Text(basis, band, point, baseline, found, verdict));
    }

    private static Estimate Departure(Estimate present, Estimate baseline) =>
        new(Math.Abs(present.Value - baseline.Value), double.Hypot(present.StandardUncertainty, baseline.StandardUncertainty), present.DegreesOfFreedom);

    /// <summary>A value that cannot resolve its limit decides nothing.</summary>
    private static LimitVerdict Resolved(ProfileBasis basis, ComparatorPoint point, ComparatorEmissivity? found, LimitVerdict verdict) =>
        point.Refusal is null && found?.CannotTell(verdict.Limit, basis.Evidence.Surroundings) is { } obstacle
            ? verdict with { Obstacles = [.. verdict.Obstacles, obstacle] }
            : verdict;

    private static string Text(ProfileBasis basis, WorkingBand band, ComparatorPoint point, Baseline? baseline, ComparatorEmissivity? found, LimitVerdict verdict)
    {
        string refusal = VerdictText.Refusal(verdict.Obstacles);
        if (found is null || baseline is null || point.Refusal is not null)
        {
            return refusal + (point.Celsius.HasValue ? $"{point.Channel.Id} shows {Quantities.Fixed(point.Celsius.Value, 2)} degC." : $"{point.Channel.Id} shows no temperature.");
        }

        Estimate e = found.EffectiveEmissivity;
        string value = VerdictText.Sentence(
            $"Departure of e_eff from its baseline, as {point.Channel.Id} shows it,", verdict.Value.Value, verdict.Unit, verdict.Limit, verdict.Conformity, verdict.Obstacles.Count == 0);
        Estimate difference = AxialUniformityParts.UniformityFigures.Millikelvin(found.RadianceDifferenceKelvin);
        return $"{refusal}{value} {point.Channel.Id} shows {Quantities.Fixed(point.Celsius.Value, 3)} degC (u = {Quantities.Significant(point.Celsius.StandardUncertainty)} K, through {point.Certificate}), "
            + $"{EmissivityText.Signed(difference, "mK")} from the model; that is e_eff = {EmissivityText.With(e)} in the band {band.Id} for the reference temperature of {Quantities.Fixed(basis.Evidence.Reference!.Celsius, 3)} degC. "
            + $"The baseline is {EmissivityText.At(baseline.EffectiveEmissivity.Value, e)} ({baseline.From}).{Traceability(basis, point)}";
    }

    private static string Traceability(ProfileBasis basis, ComparatorPoint point) =>
        point.ShowsChangeOnly
            ? " It was calibrated against this very source, so it shows change only: that it agrees is no proof of the value."
        : basis.Input.Source.Route is TraceabilityRoute.Radiometric
            ? " On the radiometric route it is the standard of this source: what it shows of e_eff rests on the thermometer in the well."
        : string.Empty;
}
