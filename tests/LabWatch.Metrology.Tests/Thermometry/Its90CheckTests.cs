using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class Its90CheckTests : CheckSuiteTests<Its90Suite>;
