using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Radiometry;

public sealed class PlanckCheckTests : CheckSuiteTests<PlanckSuite>;
