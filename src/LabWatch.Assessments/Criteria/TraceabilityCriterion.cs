using LabWatch.Assessments.Criteria.TraceabilityParts;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Traceability: whether every link of the chain that the source's radiance rests on is there, valid, in range and inside its interval.
/// </summary>
/// <remarks>
/// <para><b>Source.</b> ISO/IEC 17025:2017, 6.4.4 to 6.4.10 (equipment calibrated, its interval kept) and 6.5 (an unbroken chain of calibrations); ILAC-P10; ILAC-G24 for intervals.</para>
/// <para><b>Value.</b> Age of a link in percent of its interval, of the worst link: certificates from their date to their due date, and the triple-point check of a resistance thermometer from its date over the
/// interval stated for its instrument. 100 % is due. It is a count of days and has no uncertainty.</para>
/// <para><b>Links</b> that results rest on: the reference (its channel, its instrument, its certificate), each other well with a certificate, the thermometer of a thermocouple's reference junctions, and on the
/// radiometric route the comparators. On the contact route comparators check and are told of.</para>
/// <para><b>Broken</b>, and so failed whatever the limit: no instrument or certificate in force where one is needed; the set point (else the temperature) outside the certificate's range; a standard that was
/// calibrated against this very source; one calibrated against another source of the laboratory while the reference of that had no certificate in force, or one overdue.</para>
/// <para><b>Decision.</b> Against the limit in force, in % (100 for what is due). Without a limit, or where no link has an interval, it is not decided, and what is broken is told.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
public sealed class TraceabilityCriterion(CriterionSchedule schedule) : ICriterion
{
    /// <summary>Windows of 1 h, one after the other, 30 s grace; the lead-in of a minute is not judged.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromHours(1), TimeSpan.FromHours(1), TimeSpan.FromMinutes(1), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.Traceability;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        return JunctionTemperatures.With(source, [.. source.Channels
            .Where(channel => channel.Quantity is ChannelQuantity.WellThermometer or ChannelQuantity.ComparatorTemperature or ChannelQuantity.ComparatorSignal or ChannelQuantity.SetPoint)
            .Select(channel => channel.Id)]);
    }

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        TraceChain chain = TraceChain.Of(input);
        TraceLink? worst = chain.Links.Where(link => link.Rests && double.IsFinite(link.UsedPercent)).MaxBy(link => link.UsedPercent);
        LimitVerdict verdict = LimitVerdict.Of(
            input, Code, band: null, chain.NominalCelsius, worst is null ? new(double.NaN, double.NaN) : new(worst.UsedPercent, 0), [("%", 1)],
            worst is null && chain.Broken.Count == 0 ? ["no interval is set for any link"] : []);
        bool fails = chain.Broken.Count > 0 && verdict.Limit is not null && verdict.Unit == verdict.Limit.Unit;
        List<AssessmentFigure> figures = [new("link-count", new(chain.Links.Count(link => link.Rests), 0), "/"), new("broken-count", new(chain.Broken.Count, 0), "/")];
        if (double.IsFinite(chain.NominalCelsius))
        {
            figures.Insert(0, new(FigureName.SetPoint, new(chain.NominalCelsius, 0), "Cel"));
        }

        if (worst?.DaysLeft is { } days)
        {
            figures.Add(new("days-left", new(days, 0), "d"));
        }

        return [new(
            string.Empty, verdict.Value, verdict.Unit, verdict.Limit, verdict.Conformity.CoverageFactor, fails ? Decision.Fail : verdict.Decision, fails ? null : verdict.Probability,
            figures, TraceText.Of(chain, worst, verdict, fails))];
    }
}
