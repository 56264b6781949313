namespace LabWatch.Assessments.Forecasts;

/// <summary>Names of the quantities that are followed over time.</summary>
public static class TrackedQuantity
{
    /// <summary>Effective emissivity by the model less its baseline.</summary>
    public const string EmissivityDeparture = "emissivity-departure";

    /// <summary>Radiance temperature less reference temperature by the model, mK.</summary>
    public const string RadianceOffset = "radiance-temperature-offset";

    /// <summary>Effective emissivity that a comparator shows less its baseline.</summary>
    public const string ComparatorDeparture = "comparator-departure";

    /// <summary>Radiance temperature that a comparator shows less that of the model, mK.</summary>
    public const string ComparatorOffset = "comparator-minus-model";

    /// <summary>Mean of the reference well less that of the other wells, mK.</summary>
    public const string WellDifference = "reference-minus-wells";

    /// <summary>The value of the criterion itself, for those whose value is a magnitude.</summary>
    public const string CriterionValue = "value";

    /// <summary>Whether the quantity has a sign, so that there is a limit on either side.</summary>
    public static bool IsSigned(string quantity) => quantity != CriterionValue;

    /// <summary>Whether zero means something for it; else its change since the reference days is looked at.</summary>
    public static bool HasZero(string quantity) => quantity is EmissivityDeparture or ComparatorDeparture or CriterionValue;

    /// <summary>The quantity in a sentence.</summary>
    public static string NameOf(string quantity, string criterion) => quantity switch
    {
        EmissivityDeparture => "the departure of e_eff from its baseline, by the model,",
        RadianceOffset => "the offset of the radiance temperature, by the model,",
        ComparatorDeparture => "the departure of e_eff from its baseline, as the comparator shows it,",
        ComparatorOffset => "the difference between comparator and model",
        WellDifference => "the difference between the reference well and the other wells",
        _ => Lab.Limits.CriterionCode.NameOf(criterion),
    };
}
