using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Evaluation;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria.Verdicts;

/// <summary>What both criteria of the cavity rest on in one window.</summary>
/// <param name="Input">The input.</param>
/// <param name="Evidence">Temperatures along the axis and around.</param>
/// <param name="SetPoint">The set point.</param>
/// <param name="Obstacles">Why nothing can be decided, apart from limits and single comparators.</param>
/// <param name="Radiances">The radiance in each band, in the order of the bands; null where it cannot be computed.</param>
internal sealed record ProfileBasis(
    CriterionInput Input,
    AxialEvidence Evidence,
    SetPointHistory SetPoint,
    IReadOnlyList<string> Obstacles,
    IReadOnlyList<(WorkingBand Band, BandModel Model, BandRadiance? Radiance)> Radiances)
{
    /// <summary>The temperature that picks limits and baselines: the set point, or the reference temperature where the source reports none; NaN where neither is known.</summary>
    public double NominalCelsius => double.IsFinite(SetPoint.Celsius) ? SetPoint.Celsius : Evidence.Reference?.Celsius ?? double.NaN;

    public static ProfileBasis Of(CriterionInput input, CriterionSchedule schedule, ICavityModels models)
    {
        ArgumentNullException.ThrowIfNull(input);
        AxialEvidence evidence = AxialReader.Read(input.Snapshot, input.Source, input.Window, input.Readings);
        (SetPointHistory setPoint, IReadOnlyList<string> settling) = SettledObstacles.Of(input, schedule);
        List<(WorkingBand, BandModel, BandRadiance?)> radiances = [];
        foreach (WorkingBand band in input.Source.Bands)
        {
            BandModel model = models.ModelOf(input.Source, band);
            radiances.Add((band, model, BandRadianceEvaluation.Of(model, evidence)));
        }

        return new(input, evidence, setPoint, [.. settling, .. evidence.Obstacles, .. NoReference(evidence)], radiances);
    }

    /// <summary>Set point and reference temperature, by which the limit is looked up again.</summary>
    public IEnumerable<AssessmentFigure> Temperatures()
    {
        if (double.IsFinite(SetPoint.Celsius))
        {
            yield return new(FigureName.SetPoint, new(SetPoint.Celsius, 0), "Cel");
        }

        if (Evidence.Reference is { } reference)
        {
            yield return new(FigureName.Mean, new(reference.Celsius, reference.StandardUncertainty), "Cel");
        }
    }

    /// <summary>Which wells count and which not, as sentences.</summary>
    public string Wells() => string.Join(' ', [
        Evidence.Wells.Count == 0
            ? "No well gives a temperature."
            : $"Wells: {string.Join(", ", Evidence.Wells.Select(well => $"{well.Channel.Id} at {VerdictText.Plain(well.PositionMillimetre)} mm through {well.Certificate}"))}.",
        .. Evidence.Notes()]);

    private static IEnumerable<string> NoReference(AxialEvidence evidence)
    {
        if (evidence.Reference is null && evidence.Obstacles.Count == 0)
        {
            yield return "no well with a certificate in force gives a reference temperature";
        }
    }
}
