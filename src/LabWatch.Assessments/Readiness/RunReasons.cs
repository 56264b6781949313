using LabWatch.Assessments.Evaluation;

namespace LabWatch.Assessments.Readiness;

/// <summary>The calibration run that the source is in use by: told, so that nobody changes its set point.</summary>
internal static class RunReasons
{
    public static IReadOnlyList<ReadinessReason> Of(ReadinessInput input)
    {
        if (input.OpenRun is not { IsOpen: true } run || run.Source != input.Source.Key)
        {
            return [];
        }

        string band = run.Band is { } id ? $", {input.Source.NameOfScope(id)}" : string.Empty;
        return [new(
            ReasonCode.Run,
            $"In use since {Moments.Text(run.StartedAt)} by {run.StartedBy}: job {run.JobNumber}, {run.Item}, {Wording.Plain(run.SetPointCelsius)} degC{band}.",
            false)];
    }
}
