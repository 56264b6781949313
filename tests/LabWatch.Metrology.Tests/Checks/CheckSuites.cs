namespace LabWatch.Metrology.Tests.Checks;

/// <summary>All suites, in the order of the validation page. One instance each, so that every value is computed once a run.</summary>
internal static class CheckSuites
{
    public static IReadOnlyList<CheckSuite> All { get; } =
    [
        new Thermometry.Its90Suite(),
        new Thermometry.Iec60751Suite(),
        new Thermometry.ThermocoupleSuite(),
        new Thermometry.FixedPointSuite(),
        new Radiometry.PlanckSuite(),
        new Uncertainty.GumSuite(),
        new Uncertainty.ConformitySuite(),
        new Hazards.HazardSuite(),
        new Statistics.TimeSeriesSuite(),
        new Statistics.ControlChartSuite(),
        new Attribution.CombinationSuite(),
        new Cavities.SphereSuite(),
        new Cavities.DiffuseCavitySuite(),
        new Cavities.MirrorCavitySuite(),
        new Cavities.ZoneWeightSuite(),
        new Cavities.NonIsothermalSuite(),
    ];

    public static T Get<T>()
        where T : CheckSuite => All.OfType<T>().Single();
}
