namespace LabWatch.Lab.Limits;

/// <summary>Units in which the limit of a criterion may be given: those that its value can be given in.</summary>
public static class LimitUnits
{
    private static readonly string[] TemperatureDifference = ["mK", "K"];
    private static readonly string[] Rate = ["mK/h", "K/h"];
    private static readonly string[] Power = ["W", "mW"];
    private static readonly string[] Share = ["%"];
    private static readonly string[] Ratio = ["/"];

    /// <summary>The units; empty where the criterion is not judged yet, so that any stands.</summary>
    public static IReadOnlyList<string> Of(string criterion) => criterion switch
    {
        CriterionCode.Stability or CriterionCode.AxialUniformity or CriterionCode.ReferenceAgreement or CriterionCode.Budget => TemperatureDifference,
        CriterionCode.Settled => Rate,
        CriterionCode.EffectiveEmissivity => Ratio,
        CriterionCode.HeaterBalance => Power,
        CriterionCode.DataHealth or CriterionCode.Purge or CriterionCode.Surroundings or CriterionCode.Traceability => Share,
        _ => [],
    };
}
