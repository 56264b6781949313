using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Statistics;

public sealed class TimeSeriesChecks : CheckSuiteTests<TimeSeriesSuite>;

public sealed class ControlChartChecks : CheckSuiteTests<ControlChartSuite>;
