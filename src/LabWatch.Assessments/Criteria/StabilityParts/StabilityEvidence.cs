using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Criteria.StabilityParts;

/// <summary>What the stability of one window is judged by.</summary>
/// <param name="Input">The input.</param>
/// <param name="Schedule">Lengths of window and lead-in.</param>
/// <param name="Reference">The reference thermometer's channel.</param>
/// <param name="Certificates">Certificates in force over window and lead-in.</param>
/// <param name="Before">Temperatures of the lead-in.</param>
/// <param name="Within">Temperatures of the window, with the counts of the window alone.</param>
/// <param name="HasSetPointChannel">Whether the source reports its set point.</param>
/// <param name="SetPoint">The set point over window and lead-in.</param>
internal sealed record StabilityEvidence(
    CriterionInput Input,
    CriterionSchedule Schedule,
    Channel Reference,
    CertificateTimeline Certificates,
    TemperatureSeries Before,
    TemperatureSeries Within,
    bool HasSetPointChannel,
    SetPointHistory SetPoint)
{
    public TimeWindow Window => Input.Window;

    /// <summary>The temperature that picks the limit: the set point, or the mean where the source does not report one.</summary>
    public double NominalCelsius => HasSetPointChannel ? SetPoint.Celsius : Within.MeanCelsius;

    public static StabilityEvidence Of(CriterionInput input, CriterionSchedule schedule)
    {
        Channel reference = input.Source.ReferenceChannel
            ?? throw new ArgumentException($"{input.Source.Key} has no reference channel.", nameof(input));
        TimeWindow span = schedule.SpanOf(input.Window);
        TimeWindow before = new(span.Start, input.Window.Start);
        CertificateTimeline certificates = CertificateTimeline.Of(input.Snapshot, reference.Key, span);
        Channel? setPoint = StabilityCriterion.SetPointChannel(input.Source);
        return new(
            input,
            schedule,
            reference,
            certificates,
            TemperatureSeries.Of(
                input.Readings.Find(reference.Id)?.Slice(before), reference, certificates, JunctionTemperatures.Of(input.Snapshot, reference, before, input.Readings)),
            TemperatureSeries.Of(
                input.Readings.Find(reference.Id)?.Slice(input.Window), reference, certificates, JunctionTemperatures.Of(input.Snapshot, reference, input.Window, input.Readings)),
            setPoint is not null,
            SetPointHistory.Of(setPoint is null ? null : input.Readings.Find(setPoint.Id)));
    }
}
