namespace LabWatch.Lab.Limits;

/// <summary>Units in which the limit of a criterion may be given: those that its value can be given in.</summary>
public static class LimitUnits
{
    private static readonly string[] TemperatureDifference = ["mK", "K"];
    private static readonly string[] Share = ["%"];
    private static readonly string[] Ratio = ["/"];

    /// <summary>The units; empty where the criterion is not judged yet, so that any stands.</summary>
    public static IReadOnlyList<string> Of(string criterion) => criterion switch
    {
        CriterionCode.Stability or CriterionCode.AxialUniformity => TemperatureDifference,
        CriterionCode.EffectiveEmissivity => Ratio,
        CriterionCode.DataHealth => Share,
        _ => [],
    };
}
