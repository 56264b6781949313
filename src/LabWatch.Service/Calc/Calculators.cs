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
        new IndicatedTemperatureCalculator(),
        new RadianceCalculator(),
        new CavityCalculator(),
        new StabilityCalculator(),
        new AllanCalculator(),
        new TrendCalculator(),
        new SteadyStateCalculator(),
        new SpikesCalculator(),
        new ControlChartCalculator(),
        new BudgetCalculator(),
        new DecisionCalculator(),
        new DecisionRiskCalculator(),
        new AgreementCalculator(),
        new AttributionCalculator(),
        new DetectableDriftCalculator(),
        new BurnThresholdCalculator(),
        new DewPointCalculator(),
        new CoolingCalculator(),
    ];

    /// <summary>The calculator of a name; null where there is none.</summary>
    public static Calculator? Find(string name) => All.FirstOrDefault(calculator => string.Equals(calculator.Name, name, StringComparison.Ordinal));
}
