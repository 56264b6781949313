namespace LabWatch.Assessments.Readiness;

/// <summary>
/// Reads a source's readiness out of what is known about it. Pure. What forbids calibration in a way that waiting
/// does not cure goes before where the source is on its way to, so that nobody waits in vain; every reason is listed in any state.
/// </summary>
public static class ReadinessEvaluator
{
    /// <summary>Judges a source.</summary>
    public static SourceReadiness Evaluate(ReadinessInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        SourceNow now = SourceNow.Of(input);
        IReadOnlyList<ReadinessReason> silence = SilenceReasons.OfReference(input, now);
        IReadOnlyList<ReadinessReason> place = silence.Count > 0 ? [] : PlaceReasons.Of(input, now);
        IReadOnlyList<ReadinessReason> proof = silence.Count > 0 ? [] : CriterionReasons.Of(input, now);
        List<ReadinessReason> reasons =
            [.. silence, .. HazardReasons.Of(input), .. CertificateReasons.Of(input, now), .. proof, .. place, .. SilenceReasons.OfOthers(input, now), .. RunReasons.Of(input)];
        ReadinessState state =
            silence.Count > 0 ? ReadinessState.Unknown
            : now.IsOff ? ReadinessState.Off
            : reasons.Any(reason => reason.Blocks && !reason.PassesByWaiting) ? ReadinessState.NotFit
            : place.Any(reason => reason.Blocks) ? (now.Celsius < now.SetPointCelsius ? ReadinessState.Heating : ReadinessState.Cooling)
            : proof.Any(reason => reason.Blocks) ? ReadinessState.Settling
            : ReadinessState.Ready;
        (ReadyForecast Forecast, ReadinessReason Reason)? forecast = ForecastReasons.Of(input, now, state);
        if (forecast is { } told)
        {
            reasons.Add(told.Reason);
        }

        return new(input.Source.Key, state, [.. reasons.OrderBy(Weight)]) { Forecast = forecast?.Forecast };
    }

    /// <summary>First what somebody has to cure, then what waiting cures and when, then what only informs.</summary>
    private static int Weight(ReadinessReason reason) =>
        reason.Blocks ? (reason.PassesByWaiting ? 1 : 0)
        : string.Equals(reason.Code, ReasonCode.Expected, StringComparison.Ordinal) ? 2
        : 3;
}
