using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Uncertainty;

public sealed class ConformityCheckTests : CheckSuiteTests<ConformitySuite>;
