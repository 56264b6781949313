using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Hazards;

public sealed class HazardCheckTests : CheckSuiteTests<HazardSuite>;
