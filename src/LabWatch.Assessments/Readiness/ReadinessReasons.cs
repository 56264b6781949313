using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Readiness;

/// <summary>The reasons for a source's readiness, each one sentence.</summary>
internal static class ReadinessReasons
{
    public const string NoData = "no-data";
    public const string SetPoint = "set-point";
    public const string AtTemperature = "at-temperature";
    public const string Certificate = "certificate";
    public const string Settling = "settling";

    /// <summary>Hazards that endanger people, not the measurement: they are told, but the source may be fit.</summary>
    private static readonly string[] HazardsToPeopleAlone = [HazardCode.HotSurface, HazardCode.ColdSurface, HazardCode.UnattendedHot, HazardCode.HazardSilent];

    private static readonly TimeSpan LeastSilence = TimeSpan.FromSeconds(60);
    private static readonly TimeSpan DueSoon = TimeSpan.FromDays(30);

    /// <summary>Whether a blocking reason goes away by waiting.</summary>
    public static bool IsCuredByWaiting(ReadinessReason reason) => reason.Code is Settling or AtTemperature or SetPoint or NoData;

    public static IReadOnlyList<ReadinessReason> Silence(ReadinessInput input, SourceNow now)
    {
        if (now.Reference is not { } channel)
        {
            return [new(NoData, "No thermometer is named that the temperature of this source is taken from.", true)];
        }

        if (now.LastReading is not { } last)
        {
            return [new(NoData, $"There is no reading of {channel.Id} yet.", true)];
        }

        TimeSpan silent = input.Now - last;
        TimeSpan longest = channel.Interval * 5 > LeastSilence ? channel.Interval * 5 : LeastSilence;
        return silent > longest ? [new(NoData, $"The newest reading of {channel.Id} is {Quantities.Duration(silent)} old.", true)]
            : double.IsNaN(now.Celsius) ? [new(NoData, $"The newest reading of {channel.Id} gives no temperature.", true)]
            : [];
    }

    public static IReadOnlyList<ReadinessReason> Unfit(ReadinessInput input, SourceNow now)
    {
        if (now.Reference is not { } channel)
        {
            return [];
        }

        if (input.Snapshot.CertificateInForce(channel.Key, input.Now) is not { } certificate)
        {
            return [new(Certificate, $"No certificate is in force for {channel.Id}.", true)];
        }

        List<ReadinessReason> reasons = [];
        if (certificate.DueAt is { } due)
        {
            reasons.AddRange(Due(certificate, due, input.Now));
        }

        double asked = double.IsNaN(now.SetPointCelsius) ? now.Celsius : now.SetPointCelsius;
        if (asked < certificate.MinimumCelsius || asked > certificate.MaximumCelsius)
        {
            reasons.Add(new(
                Certificate,
                $"{Plain(asked)} degC is outside the range of certificate {certificate.Number} ({Plain(certificate.MinimumCelsius)} to {Plain(certificate.MaximumCelsius)} degC).",
                true));
        }

        return reasons;
    }

    public static IReadOnlyList<ReadinessReason> Hazards(ReadinessInput input) =>
        [.. input.OpenAlerts
            .Where(alert => alert.Source == input.Source.Key && alert.IsHazard && alert.ReturnedAt is null)
            .Select(alert => new ReadinessReason(alert.Code, alert.Headline, !HazardsToPeopleAlone.Contains(alert.Code, StringComparer.Ordinal)))];

    public static IReadOnlyList<ReadinessReason> Place(SourceNow now)
    {
        if (now.HeaterIsOff is true && double.IsNaN(now.SetPointCelsius))
        {
            return [new(SetPoint, $"The heater is off and there is no set point; {now.Reference?.Id} reads {Plain(now.Celsius)} degC.", true)];
        }

        if (double.IsNaN(now.SetPointCelsius))
        {
            return [new(SetPoint, "This source does not report a set point.", false)];
        }

        double away = now.Celsius - now.SetPointCelsius;
        bool far = Math.Abs(away) > StabilityObstacles.AtTemperatureKelvin(now.SetPointCelsius);
        string heater = far && away < 0 && now.HeaterIsOff is true ? ", and the heater is off" : string.Empty;
        return far
            ? [new(
                AtTemperature,
                $"It stands at {Plain(now.Celsius)} degC, {Plain(Math.Abs(away))} K {(away < 0 ? "below" : "above")} the set point of {Plain(now.SetPointCelsius)} degC{heater}.",
                true)]
            : [new(AtTemperature, $"It stands at {Plain(now.Celsius)} degC; the set point is {Plain(now.SetPointCelsius)} degC.", false)];
    }

    public static IReadOnlyList<ReadinessReason> Stability(ReadinessInput input, SourceNow now)
    {
        Assessment? latest = input.Assessments
            .Where(item => item.Source == input.Source.Key && string.Equals(item.Criterion, CriterionCode.Stability, StringComparison.Ordinal))
            .MaxBy(item => (item.Window.End, item.Revision));
        if (latest is null)
        {
            return [new(Settling, "Its stability has not been assessed yet.", true)];
        }

        TimeSpan age = input.Now - latest.Window.End;
        double setPoint = CriterionResult.Figure(latest.Figures, FigureName.SetPoint);
        if (age > LongestAge(latest))
        {
            return [new(Settling, $"The latest assessment of its stability is {Quantities.Duration(age)} old.", true)];
        }

        if (Math.Abs(setPoint - now.SetPointCelsius) > SetPointHistory.SameWithinKelvin)
        {
            return [new(Settling, $"Its stability was last assessed at {Plain(setPoint)} degC, not at {Plain(now.SetPointCelsius)} degC.", true)];
        }

        return latest.Decision is Decision.NotDecided
            ? [new(Settling, latest.Explanation, true)]
            : [new(CriterionCode.Stability, latest.Explanation, latest.Decision is Decision.Fail or Decision.ConditionalFail)];
    }

    /// <summary>Two windows on the default schedule: one may be late, two may not.</summary>
    private static TimeSpan LongestAge(Assessment latest) =>
        (2 * StabilityCriterion.DefaultSchedule.Every) + (latest.Window.Duration / 2);

    private static IEnumerable<ReadinessReason> Due(Certificate certificate, Instant due, Instant now)
    {
        if (due <= now)
        {
            yield return new(Certificate, $"Certificate {certificate.Number} has been overdue for {Quantities.Duration(now - due)}.", true);
        }
        else if (due - now < DueSoon)
        {
            yield return new(Certificate, $"Certificate {certificate.Number} is due in {Quantities.Duration(due - now)}.", false);
        }
    }

    private static string Plain(double value) => Quantities.Fixed(value, 2).TrimEnd('0').TrimEnd('.');
}
