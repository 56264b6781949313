using LabWatch.Lab.Limits;

namespace LabWatch.Alerts.Messages;

/// <summary>What is said of each criterion.</summary>
internal static class CriterionTexts
{
    /// <summary>What was measured, before its value in a headline; the placeholder stands for the scope.</summary>
    public static string Measured(string criterion) => criterion switch
    {
        CriterionCode.Stability => AlertTexts.MeasuredStability,
        CriterionCode.AxialUniformity => AlertTexts.MeasuredAxialUniformity,
        CriterionCode.EffectiveEmissivity => AlertTexts.MeasuredEffectiveEmissivity,
        CriterionCode.DataHealth => AlertTexts.MeasuredDataHealth,
        _ => CriterionCode.NameOf(criterion) + "{0}",
    };

    /// <summary>What to do when it is out of tolerance.</summary>
    public static string Do(string criterion) => criterion switch
    {
        CriterionCode.Stability => AlertTexts.DoStability,
        CriterionCode.AxialUniformity => AlertTexts.DoAxialUniformity,
        CriterionCode.EffectiveEmissivity => AlertTexts.DoEffectiveEmissivity,
        CriterionCode.DataHealth => AlertTexts.DoDataHealth,
        _ => AlertTexts.ToleranceDo,
    };
}
