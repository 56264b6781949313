namespace LabWatch.Assessments.Readiness;

/// <summary>Codes of reasons that are neither a criterion nor a hazard.</summary>
internal static class ReasonCode
{
    public const string NoData = "no-data";
    public const string Silent = "silent";
    public const string SetPoint = "set-point";
    public const string AtTemperature = "at-temperature";
    public const string Certificate = "certificate";
    public const string Settling = "settling";
    public const string Run = "run";
    public const string Expected = "expected";
}
