using LabWatch.Assessments;
using LabWatch.Assessments.Readiness;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Live;

/// <summary>Judges the readiness of a source by the criteria and schedules in use, and puts it into the form of the API.</summary>
internal sealed class ReadinessMaker(IEnumerable<ICriterion> criteria, RecentReadings recent)
{
    private readonly ICriterion[] _criteria = [.. criteria];

    /// <summary>The readiness; recent readings are looked up where the source is on its way.</summary>
    public async ValueTask<SourceReadiness> MakeAsync(ReadinessInput input, CancellationToken cancellationToken)
    {
        ReadinessInput known = input with { Criteria = _criteria };
        SourceReadiness readiness = ReadinessEvaluator.Evaluate(known);
        return readiness.State is ReadinessState.Heating or ReadinessState.Cooling or ReadinessState.Settling
            && await recent.ReadAsync(input.Source, input.Now, cancellationToken).ConfigureAwait(false) is { } readings
            ? ReadinessEvaluator.Evaluate(known with { Recent = readings })
            : readiness;
    }

    /// <summary>A readiness as the API shows it.</summary>
    public static ReadinessView Show(SourceReadiness readiness) => new(
        Names.Of(readiness.State),
        [.. readiness.Reasons.Select(reason => new ReadinessReasonView(reason.Code, reason.Text, reason.Blocks, reason.Blocks && reason.PassesByWaiting))],
        readiness.Forecast is { } forecast && forecast != new ReadyForecast(null, null, null)
            ? new ReadyForecastView(forecast.ArrivesEarliest, forecast.ArrivesLatest, forecast.ReadyNotBefore)
            : null);
}
