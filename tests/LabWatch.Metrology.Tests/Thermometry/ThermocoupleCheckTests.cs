using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class ThermocoupleCheckTests : CheckSuiteTests<ThermocoupleSuite>;
