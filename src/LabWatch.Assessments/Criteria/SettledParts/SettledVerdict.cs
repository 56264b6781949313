using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.SettledParts;

/// <summary>The decision whether a source has settled.</summary>
/// <param name="Limit">The slope against its limit, with the reasons where nothing is decided.</param>
/// <param name="Forecast">When it will have settled; null where it has, or it cannot be told.</param>
internal sealed record SettledVerdict(LimitVerdict Limit, SettlingForecast? Forecast)
{
    private static readonly (string Unit, double Factor)[] Units = [("mK/h", 1000), ("K/h", 1)];

    public static SettledVerdict Of(StabilityEvidence evidence, RestState state)
    {
        Estimate slope = state.Trend.SlopePerHour;
        Estimate magnitude = slope.HasValue ? slope with { Value = Math.Abs(slope.Value) } : Estimate.None;
        LimitVerdict bare = LimitVerdict.Of(evidence.Input, CriterionCode.Settled, null, evidence.SetPoint.Celsius, magnitude, Units, StabilityObstacles.Evidence(evidence));
        if (bare.Obstacles.Count > 0)
        {
            return new(bare, null);
        }

        double kelvin = bare.Limit!.Maximum / Units.Single(unit => unit.Unit == bare.Unit).Factor;
        List<string> moving = Moving(evidence, state, bare);
        SettlingForecast? forecast = moving.Count == 0 ? null : SettlingForecast.Of(
            evidence.Within, evidence.Window, evidence.SetPoint.Celsius, state.ToleranceKelvin, kelvin);
        bool isDecided = moving.Count == 0 || !(IsOnItsWay(evidence, state) || (bare.Decision is Decision.Pass or Decision.ConditionalPass));
        return new(isDecided ? bare : bare with { Obstacles = [$"it has not settled yet: {string.Join("; ", moving)}{Expected(forecast)}"] }, forecast);
    }

    /// <summary>Why it is not at rest, each as a clause; empty where it is.</summary>
    private static List<string> Moving(StabilityEvidence evidence, RestState state, LimitVerdict bare)
    {
        List<string> reasons = [];
        if (!state.IsAtSetPoint)
        {
            reasons.Add($"it stands {Quantities.Significant(Math.Abs(state.DistanceKelvin))} K {(state.DistanceKelvin < 0 ? "below" : "above")} its set point of {VerdictText.Plain(evidence.SetPoint.Celsius)} degC, "
                + $"and more than {Quantities.Significant(state.ToleranceKelvin)} K is too far");
        }

        if (bare.Decision is Decision.Fail or Decision.ConditionalFail)
        {
            reasons.Add($"it moves by {Quantities.Significant(bare.Value.Value)} {bare.Unit}, and {VerdictText.Plain(bare.Limit!.Maximum)} {bare.Unit} are permitted");
        }

        if (!state.IsSteady)
        {
            reasons.Add(double.IsNaN(state.Ratio)
                ? $"{Quantities.Count(state.Thinned)} independent readings at this set point are too few for its R-statistic, and {Quantities.Count(RestState.LeastThinned)} are needed"
                : $"its R-statistic is {Quantities.Fixed(state.Ratio, 2)}, and a steady source stays below {Quantities.Fixed(state.Critical, 2)}");
        }

        return reasons;
    }

    /// <summary>The set point changed lately, or the source was far from it before as well and has not come there.</summary>
    private static bool IsOnItsWay(StabilityEvidence evidence, RestState state) =>
        evidence.SetPoint.ChangedAt is not null || Math.Abs(evidence.Before.MeanCelsius - evidence.SetPoint.Celsius) > state.ToleranceKelvin;

    private static string Expected(SettlingForecast? forecast) => forecast is null
        ? string.Empty
        : $"; if it goes on so it can have settled in {Quantities.Duration(forecast.Earliest)} to {Quantities.Duration(forecast.Latest)}";
}
