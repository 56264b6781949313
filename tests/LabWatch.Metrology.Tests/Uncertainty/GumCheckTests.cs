using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Uncertainty;

public sealed class GumCheckTests : CheckSuiteTests<GumSuite>;
