using LabWatch.Assessments.Criteria.StabilityParts;

namespace LabWatch.Assessments.Readiness;

/// <summary>Where the source stands and where it is to go.</summary>
internal static class PlaceReasons
{
    public static IReadOnlyList<ReadinessReason> Of(ReadinessInput input, SourceNow now)
    {
        if (double.IsNaN(now.SetPointCelsius))
        {
            return now.HeaterIsOff is true
                ? [new(ReasonCode.SetPoint, $"The heater is off and there is no set point; {now.Reference?.Id} reads {Wording.Plain(now.Celsius)} degC.", true)]
                : [new(ReasonCode.SetPoint, "This source does not report a set point.", false)];
        }

        if (!now.SetPointIsInRange)
        {
            string range = $"{Wording.Plain(input.Source.MinimumCelsius)} to {Wording.Plain(input.Source.MaximumCelsius)} degC";
            string heater = now.HeaterIsOff is true ? "The heater is off, and the" : "The";
            return [new(
                ReasonCode.SetPoint,
                $"{heater} set point of {Wording.Plain(now.SetPointCelsius)} degC is outside the range of the source ({range}); {now.Reference?.Id} reads {Wording.Plain(now.Celsius)} degC.",
                true)];
        }

        double away = now.Celsius - now.SetPointCelsius;
        bool far = Math.Abs(away) > StabilityObstacles.AtTemperatureKelvin(now.SetPointCelsius);
        string off = far && away < 0 && now.HeaterIsOff is true ? ", and the heater is off" : string.Empty;
        return far
            ? [new(
                ReasonCode.AtTemperature,
                $"It stands at {Wording.Plain(now.Celsius)} degC, {Wording.Plain(Math.Abs(away))} K {(away < 0 ? "below" : "above")} the set point of {Wording.Plain(now.SetPointCelsius)} degC{off}.",
                true) { PassesByWaiting = off.Length == 0 }]
            : [new(ReasonCode.AtTemperature, $"It stands at {Wording.Plain(now.Celsius)} degC; the set point is {Wording.Plain(now.SetPointCelsius)} degC.", false)];
    }
}
