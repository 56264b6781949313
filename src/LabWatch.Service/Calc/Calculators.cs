namespace LabWatch.Service.Calc;

/// <summary>All calculators, in the order of the help text.</summary>
internal static class Calculators
{
    public static IReadOnlyList<Calculator> All { get; } =
    [
        new PrtIts90Calculator(),
        new PrtCvdCalculator(),
        new ThermocoupleCalculator(),
        new RadiationThermometerCalculator(),
        new RadianceCalculator(),
        new CavityCalculator(),
        new StabilityCalculator(),
        new AllanCalculator(),
        new TrendCalculator(),
        new BudgetCalculator(),
        new DecisionCalculator(),
        new AttributionCalculator(),
        new DetectableDriftCalculator(),
        new BurnThresholdCalculator(),
        new DewPointCalculator(),
    ];

    /// <summary>The calculator of a name; null where there is none.</summary>
    public static Calculator? Find(string name) => All.FirstOrDefault(calculator => string.Equals(calculator.Name, name, StringComparison.Ordinal));
}
