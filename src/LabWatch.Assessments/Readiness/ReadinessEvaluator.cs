using LabWatch.Assessments.Criteria.StabilityParts;

namespace LabWatch.Assessments.Readiness;

/// <summary>
/// Answers "may I calibrate with this source now?" from what is known at one moment. Pure. What forbids calibration in a way that waiting
/// does not cure goes before where the source is on its way to, so that nobody waits in vain; every reason is listed in any state.
/// </summary>
public static class ReadinessEvaluator
{
    /// <summary>Judges a source.</summary>
    public static SourceReadiness Evaluate(ReadinessInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        SourceNow now = SourceNow.Of(input);
        IReadOnlyList<ReadinessReason> silence = ReadinessReasons.Silence(input, now);
        IReadOnlyList<ReadinessReason> unfit = ReadinessReasons.Unfit(input, now);
        IReadOnlyList<ReadinessReason> hazards = ReadinessReasons.Hazards(input);
        IReadOnlyList<ReadinessReason> place = ReadinessReasons.Place(now);
        IReadOnlyList<ReadinessReason> proof = ReadinessReasons.Stability(input, now);
        ReadinessState state =
            silence.Count > 0 ? ReadinessState.Unknown
            : IsOff(now) ? ReadinessState.Off
            : unfit.Concat(hazards).Concat(proof).Any(reason => reason.Blocks && !ReadinessReasons.IsCuredByWaiting(reason)) ? ReadinessState.NotFit
            : place.Any(reason => reason.Blocks) ? (now.Celsius < now.SetPointCelsius ? ReadinessState.Heating : ReadinessState.Cooling)
            : proof.Any(reason => reason.Blocks) ? ReadinessState.Settling
            : ReadinessState.Ready;
        List<ReadinessReason> reasons = [.. silence, .. unfit, .. hazards, .. silence.Count > 0 ? [] : place, .. silence.Count > 0 ? [] : proof];
        return new(input.Source.Key, state, [.. reasons.OrderByDescending(reason => reason.Blocks)]);
    }

    /// <summary>
    /// Off: nothing is put in although the source stands below its set point, or nothing is put in and there is no set point. A heater that
    /// rests while the source cools down, or is held by a chiller, is not off.
    /// </summary>
    private static bool IsOff(SourceNow now) =>
        now.HeaterIsOff is true
        && (double.IsNaN(now.SetPointCelsius)
            || now.SetPointCelsius - now.Celsius > StabilityObstacles.AtTemperatureKelvin(now.SetPointCelsius));
}
